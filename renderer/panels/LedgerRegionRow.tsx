import { formatMeanSd, formatQuantity, NO_VALUE, visibleText } from '../../core/format/index.js';
import type { NoteContrast, NoteRegion, QuoteInForce } from '../../core/note/index.js';
import { FLAGS, isQuiet, type RegionValue } from '../../core/region/index.js';
import { quoteCells } from '../../core/report/quoteCells.js';
import { RoleKey } from './parts/RoleSignView.js';
import { FlagSign } from './parts/StateSign.js';

export interface LedgerRegionRowProps {
  readonly region: NoteRegion;
  /** Which kernel is quoted, by whom, and what the rules propose instead. */
  readonly quote: QuoteInForce;
  /** The contrasts in which it is the lumen; the last one is shown. */
  readonly contrasts: readonly NoteContrast[];
  readonly selected: boolean;
  readonly onSelect: (regionId: string) => void;
}

/** A region's row. A click anywhere on it selects it; so does its button, for those who use the keyboard. */
export function LedgerRegionRow(props: LedgerRegionRowProps) {
  const { region, quote, contrasts, selected, onSelect } = props;
  const contrast = contrasts.at(-1);
  return (
    <tr
      class="region"
      data-selected={selected}
      data-region={region.id}
      onClick={() => onSelect(region.id)}
    >
      <th scope="row">
        <button type="button" class="row-button" aria-pressed={selected}>
          <RoleKey role={region.role} />
          {region.label}
        </button>
      </th>
      <td class="text place" title={region.place}>
        {visibleText(region.place)}
      </td>
      <td>{formatQuantity((region.soft ?? region.sharp)?.areaMm2, 'areaMm2')}</td>
      <ValueCells kernel="soft" value={region.soft} contrast={contrast} />
      <ValueCells kernel="sharp" value={region.sharp} contrast={contrast} />
      <QuoteCell quote={quote} />
    </tr>
  );
}

/** The kernel that is quoted; a flag where the rules propose another one than the reader chose. */
function QuoteCell({ quote }: { readonly quote: QuoteInForce }) {
  const { sentence } = quoteCells(quote);
  const told = sentence === '' ? quote.reason : sentence;
  return (
    <td class={quote.quote === null ? 'text none' : 'text'} title={told || undefined}>
      <span class={quote.by === 'proposal' ? 'proposed' : ''}>{quote.quote ?? NO_VALUE}</span>
      {quote.instead !== undefined && (
        <span class="flag after">
          <FlagSign />
          <span class="visually-hidden">{told}</span>
        </span>
      )}
    </td>
  );
}

interface ValueCellsProps {
  readonly kernel: 'soft' | 'sharp';
  readonly value: RegionValue | null;
  readonly contrast: NoteContrast | undefined;
}

function ValueCells({ kernel, value, contrast }: ValueCellsProps) {
  const flags = (value?.flags ?? []).filter((flag) => !isQuiet(flag)).map(({ text }) => text);
  const reason = flags.join(' ') || undefined;
  const ratio = contrast?.[kernel];
  const why = contrast?.flags.map(({ text }) => text).join(' ');
  return (
    <>
      <td class={kernel} title={meanTitle(value, reason)}>
        {reason !== undefined && (
          <span class="flag">
            <FlagSign />
            <span class="visually-hidden">{reason}</span>
          </span>
        )}
        {formatMeanSd(value?.meanHu, value?.sdHu)}
      </td>
      <NumberCell text={formatQuantity(value?.snr, 'ratio')} title={reason} />
      <NumberCell
        text={formatQuantity(ratio, 'ratio')}
        title={contrast && [contrast.id, contrast.formula, why].filter(Boolean).join('. ')}
      />
    </>
  );
}

/** What stands behind a mean, in words; the flags of the value after it. */
function meanTitle(value: RegionValue | null, reason: string | undefined): string | undefined {
  if (value?.meanHu == null) return reason;
  const { meanHu, standardErrorHu, placementHu, flags } = value;
  const absent = flags.find(({ code }) => code === FLAGS.noStandardError.code);
  const error =
    standardErrorHu === null
      ? absent?.text
      : `Standard error of the mean, by noise alone: ${formatQuantity(standardErrorHu, 'hu')} HU.`;
  const placement =
    placementHu === null
      ? undefined
      : `Placement: the mean moves by up to ${formatQuantity(placementHu, 'hu')} HU with half a pixel or 0.25 mm of size.`;
  const mean = `Mean ${formatQuantity(meanHu, 'hu')} HU ± SD of the pixels.`;
  return [mean, error, placement, reason].filter((part) => part !== undefined).join(' ');
}

function NumberCell({
  text,
  title,
}: {
  readonly text: string;
  readonly title: string | undefined;
}) {
  return (
    <td class={text === NO_VALUE ? 'none' : ''} title={title}>
      {text}
    </td>
  );
}

import { formatFixed, formatQuantity, NO_VALUE } from '../../core/format/index.js';
import {
  type NoteProfile,
  type NoteProfileValue,
  type NoteStent,
  profileQuoteInForce,
} from '../../core/note/index.js';
import { stentSentence } from '../../core/report/stentSentence.js';
import { FlagSign } from './parts/StateSign.js';

export interface LedgerAcrossRowsProps {
  readonly stents: readonly NoteStent[];
  readonly profiles: readonly NoteProfile[];
  readonly selectedId: string | undefined;
  readonly onSelect: (id: string) => void;
}

/** The rows of fitted stents and of profiles: a stent has one result for both kernels, a profile a width on each. */
export function LedgerAcrossRows({
  stents,
  profiles,
  selectedId,
  onSelect,
}: LedgerAcrossRowsProps) {
  if (stents.length + profiles.length === 0) return null;
  return (
    <>
      <tr class="group">
        <th scope="rowgroup" colSpan={10}>
          Fitted stents and profiles
        </th>
      </tr>
      {stents.map((stent) => (
        <tr
          key={stent.id}
          class="region"
          data-selected={stent.id === selectedId}
          data-stent={stent.id}
          onClick={() => onSelect(stent.id)}
        >
          <Name label={stent.label} selected={stent.id === selectedId} />
          <td class="text place">{nominalText(stent.nominalMm)}</td>
          <td class="text fitted" colSpan={8} title={stentSentence(stent)}>
            {stent.fit?.reason !== undefined && stent.fit?.reason !== null && (
              <span class="flag">
                <FlagSign />
              </span>
            )}
            {stent.fit === null ? 'being fitted…' : stentSentence(stent)}
          </td>
        </tr>
      ))}
      {profiles.map((profile) => {
        const quote = profileQuoteInForce(profile);
        return (
          <tr
            key={profile.id}
            class="region"
            data-selected={profile.id === selectedId}
            data-profile={profile.id}
            onClick={() => onSelect(profile.id)}
          >
            <Name label={profile.label} selected={profile.id === selectedId} />
            <td class="text place">{nominalText(profile.nominalMm)}</td>
            <td />
            <WidthCell kernel="soft" value={profile.soft} />
            <WidthCell kernel="sharp" value={profile.sharp} />
            <td class="text" title={quote.reason}>
              <span class={quote.by === 'proposal' ? 'proposed' : ''}>
                {quote.quote ?? NO_VALUE}
              </span>
            </td>
          </tr>
        );
      })}
    </>
  );
}

function Name({ label, selected }: { readonly label: string; readonly selected: boolean }) {
  return (
    <th scope="row">
      <button type="button" class="row-button" aria-pressed={selected}>
        {label}
      </button>
    </th>
  );
}

function WidthCell({
  kernel,
  value,
}: {
  readonly kernel: 'soft' | 'sharp';
  readonly value: NoteProfileValue | null;
}) {
  const flags = (value?.flags ?? []).map(({ text }) => text).join(' ');
  const mm = (length: number | null | undefined) => formatQuantity(length, 'lengthMm');
  const peaks = value?.peakDistanceMm == null ? '' : ` · peaks ${mm(value.peakDistanceMm)} mm`;
  const text = value?.visibleWidthMm == null ? NO_VALUE : `${mm(value.visibleWidthMm)} mm${peaks}`;
  return (
    <td class={kernel} colSpan={3} title={flags === '' ? 'Visible width at half height' : flags}>
      {text}
    </td>
  );
}

function nominalText(nominalMm: number | undefined): string {
  return nominalMm === undefined ? '' : `nominal ${formatFixed(nominalMm, 2)} mm`;
}

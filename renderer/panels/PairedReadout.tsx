import { NO_VALUE, visibleText } from '../../core/format/index.js';
import type { NoteRegion } from '../../core/note/index.js';
import type { RegionValue } from '../../core/region/index.js';
import { RoleKey } from './parts/RoleSignView.js';
import { FlagSign } from './parts/StateSign.js';
import { absenceReason, flagTexts, type ReadoutRow, readoutRows } from './readoutRows.js';

export interface PairedReadoutProps {
  /** The selected region; undefined when none is. Its values may be fresher than the note's, while it is dragged. */
  readonly region: Pick<NoteRegion, 'label' | 'place' | 'role' | 'soft' | 'sharp'> | undefined;
  /** Unit of the stacks' values: HU as a rule. */
  readonly unit: string;
}

/** The selected region's numbers on both kernels, with the difference between them. */
export function PairedReadout({ region, unit }: PairedReadoutProps) {
  if (region === undefined) {
    return (
      <section class="readout">
        <p class="empty">Mark a region, or select one in the reading note, to see its numbers.</p>
      </section>
    );
  }
  const { soft, sharp } = region;
  const title = [region.label, region.place].filter((text) => text !== '').map(visibleText);
  const flags = flagTexts(soft, sharp);
  return (
    <section class="readout" data-role={region.role}>
      <h2>
        <RoleKey role={region.role} />
        <span>{title.join(' · ')}</span>
      </h2>
      <table>
        <caption class="visually-hidden">Values on both kernels</caption>
        <thead>
          <tr>
            <th scope="col">soft</th>
            <th scope="col">sharp − soft</th>
            <th scope="col">sharp</th>
          </tr>
        </thead>
        <tbody>
          {readoutRows(soft, sharp, unit).map((row) => (
            <tr key={row.name} class={row.aid ? 'band' : undefined}>
              <td class="soft" title={titleOf(row, row.soft, soft)}>
                {row.soft}
              </td>
              <th scope="row" title={row.help}>
                {row.name}
                {row.delta !== undefined && <span class="delta"> {row.delta}</span>}
              </th>
              <td class="sharp" title={titleOf(row, row.sharp, sharp)}>
                {row.sharp}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      {flags.length > 0 && (
        <ul
          class="flags"
          aria-label="Flags of this region"
          // biome-ignore lint/a11y/noNoninteractiveTabindex: in a low window Tab brings the flags into view
          tabIndex={0}
        >
          {flags.map((text) => (
            <li key={text}>
              <FlagSign />
              <span>{text}</span>
            </li>
          ))}
        </ul>
      )}
    </section>
  );
}

/** What a cell's number is; of an empty cell, why there is none. */
function titleOf(row: ReadoutRow, text: string, value: RegionValue | null): string | undefined {
  return (text === NO_VALUE ? absenceReason(row, value) : row.help) || undefined;
}

import { formatFixed } from '../../core/format/index.js';
import type { Density } from '../../core/note/index.js';
import { BAND_TABLES, bandEdges, bandShare, bandTable } from '../../core/plaque/index.js';
import { Choice } from '../panels/parts/Choice.js';

export interface BandsProps {
  /** Name of the selected plaque; undefined where no plaque is selected. */
  readonly label: string | undefined;
  /** Undefined while its slice is read. */
  readonly density: Density | undefined;
  readonly tableId: string;
  readonly frozen: boolean;
  readonly onTable: (id: string) => void;
}

const TABLES = BAND_TABLES.map(({ id, name }) => ({ value: id, text: name }));

/** How the selected plaque divides into density bands on the soft kernel, with all that must be said of it. */
export function Bands({ label, density, tableId, frozen, onTable }: BandsProps) {
  const table = bandTable(tableId);
  return (
    <div class="bands">
      <Choice label="Bands" value={tableId} options={TABLES} disabled={frozen} onChange={onTable} />
      {label === undefined ? (
        <p class="empty">Select a plaque region to see its density by bands, on the soft kernel.</p>
      ) : density === undefined || table === undefined ? (
        <p class="empty">The slice of this region is not read yet, or holds no HU.</p>
      ) : (
        <>
          {density.flags.length > 0 && (
            <ul class="band-flags">
              {density.flags.map(({ code, text }) => (
                <li key={code}>{text}</li>
              ))}
            </ul>
          )}
          <table class="data-table" aria-label={`Density of ${label} by bands, soft kernel`}>
            <tbody>
              {table.bands.map(({ name }, band) => (
                <Band
                  key={name}
                  name={name}
                  edges={bandEdges(table, band)}
                  share={bandShare(density, band) ?? 0}
                  areaMm2={(density.pixels[band] ?? 0) * density.pixelAreaMm2}
                />
              ))}
              {density.unassigned > 0 && (
                <Band
                  name="in no band"
                  edges={`below ${formatFixed(table.fromHu, 0)} HU`}
                  share={density.unassigned / density.n}
                  areaMm2={density.unassigned * density.pixelAreaMm2}
                />
              )}
            </tbody>
          </table>
          <p class="source">{table.source}</p>
        </>
      )}
    </div>
  );
}

interface BandProps {
  readonly name: string;
  readonly edges: string;
  readonly share: number;
  readonly areaMm2: number;
}

function Band({ name, edges, share, areaMm2 }: BandProps) {
  return (
    <tr>
      <th scope="row" title={edges}>
        {name}
        <span class="edges">{edges}</span>
      </th>
      <td class="number">{formatFixed(100 * share, 1)} %</td>
      <td class="number">{formatFixed(areaMm2, 1)} mm²</td>
    </tr>
  );
}

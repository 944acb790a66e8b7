import { formatFixed, formatQuantity } from '../../core/format/index.js';
import type { NoteEdge } from '../../core/note/index.js';
import { BAND_MM } from '../../core/region/index.js';
import type { NoiseAreaRow } from '../state/noiseRows.js';

export interface NoiseControlsProps {
  readonly areas: readonly NoiseAreaRow[];
  readonly edges: readonly NoteEdge[];
  /** 'all', 'E1' of an edge line, or 'area 3'. */
  readonly shown: string;
  readonly onShow: (shown: string) => void;
  /** Band of the edge line that is shown; undefined where none is. */
  readonly bandMm: number | undefined;
  readonly onBand: (bandMm: number) => void;
  readonly onDelete: () => void;
  readonly isDrawing: boolean;
  readonly onDraw: () => void;
  readonly disabled: boolean;
}

/** Chooses what the panel shows: all areas, one of them, or an edge line; and draws edge lines. */
export function NoiseControls(props: NoiseControlsProps) {
  const { areas, edges, shown, bandMm } = props;
  return (
    <div class="noise-controls">
      <select
        class="field"
        aria-label="Show"
        title="All uniform areas together, one of them, or an edge line. Choosing one goes to its slice."
        value={shown}
        onChange={(event) => props.onShow(event.currentTarget.value)}
      >
        <option value="all">{`All ${areas.length} uniform areas`}</option>
        {edges.length > 0 && (
          <optgroup label="Edge lines: rise, soft / sharp">
            {edges.map((edge) => (
              <option key={edge.id} value={edge.id}>
                {`${edge.label}: ${formatFixed(edge.soft?.riseMm, 2)} / ${formatFixed(edge.sharp?.riseMm, 2)} mm`}
              </option>
            ))}
          </optgroup>
        )}
        {areas.length > 0 && (
          <optgroup label="Uniform areas: SD, soft / sharp">
            {areas.map((area) => (
              <option key={area.number} value={`area ${area.number}`}>
                {`Area ${area.number}, slice ${area.slice ?? '–'}: ${formatQuantity(area.softSdHu, 'hu')} / ${formatQuantity(area.sharpSdHu, 'hu')} HU`}
              </option>
            ))}
          </optgroup>
        )}
      </select>
      {bandMm === undefined ? (
        <button
          type="button"
          class="button"
          aria-pressed={props.isDrawing}
          disabled={props.disabled}
          title="Draw a line across an edge, on either plate. Its rise and blur are measured on both kernels."
          onClick={props.onDraw}
        >
          Draw edge line
        </button>
      ) : (
        <>
          <label title="Width of the band around the line whose pixels are measured, mm. Plus and minus on the plate change it too.">
            Band
            <input
              type="number"
              class="field"
              min={BAND_MM.least}
              max={BAND_MM.most}
              step={0.5}
              value={bandMm}
              disabled={props.disabled}
              onChange={(event) => {
                const typed = event.currentTarget.valueAsNumber;
                if (typed >= BAND_MM.least && typed <= BAND_MM.most) props.onBand(typed);
                else event.currentTarget.value = String(bandMm);
              }}
            />
            mm
          </label>
          <button
            type="button"
            class="button"
            disabled={props.disabled}
            title="Delete this edge line"
            onClick={props.onDelete}
          >
            Delete
          </button>
        </>
      )}
    </div>
  );
}

import { add, normalise, scale, subtract } from '../../core/geometry/index.js';
import type { Kernel } from '../../core/note/index.js';
import type { BandLine } from '../../core/region/index.js';
import { isLineOnPlate, linesOn } from '../state/lineSelectors.js';
import { transformOf } from '../state/selectors.js';
import type { Store } from '../state/store.js';
import { bandCorners } from '../tools/lineOnPlate.js';
import { type PlateTransform, patientToPlate } from './plateTransform.js';

/** The lines of this slice and the one being drawn: the line, its band, and where it crosses the edge. */
export function LineMarks({ kernel, store }: { readonly kernel: Kernel; readonly store: Store }) {
  const state = store.state.value;
  const transform = transformOf(state, kernel);
  if (transform === undefined) return null;
  const { lineDraft, lineEnd, selected, note } = state;
  const lines = linesOn(state, kernel).filter(({ id }) => id !== lineDraft?.lineId);
  return (
    <g>
      {lines.map((line) => (
        <LineMark
          key={line.id}
          line={line}
          label={line.id}
          transform={transform}
          selected={line.id === selected}
          held={line.id === selected ? lineEnd : undefined}
          atMm={note?.edges.find(({ id }) => id === line.id)?.[kernel]?.atMm ?? undefined}
        />
      ))}
      {lineDraft !== undefined && isLineOnPlate(state, kernel, lineDraft) && (
        <LineMark line={lineDraft} label="" transform={transform} selected />
      )}
    </g>
  );
}

interface LineMarkProps {
  readonly line: BandLine;
  readonly label: string;
  readonly transform: PlateTransform;
  readonly selected: boolean;
  readonly held?: 'from' | 'to' | undefined;
  /** Where the edge lies, from the line's start, mm. */
  readonly atMm?: number | undefined;
}

function LineMark({ line, label, transform, selected, held, atMm }: LineMarkProps) {
  const from = patientToPlate(transform, line.fromMm);
  const to = patientToPlate(transform, line.toMm);
  const path = `M${from.x} ${from.y}L${to.x} ${to.y}`;
  const corners = bandCorners(line, transform).map((point) => patientToPlate(transform, point));
  const band = corners.map(({ x, y }, index) => `${index === 0 ? 'M' : 'L'}${x} ${y}`).join('');
  return (
    <g class="line-mark" data-line={label} data-selected={selected}>
      <path class="region-halo" d={path} />
      {band !== '' && <path class="line-band" d={`${band}Z`} />}
      <path class="line-line" d={path} />
      {atMm !== undefined && <path class="line-edge" d={edgeTick(line, atMm, transform)} />}
      {selected &&
        (['from', 'to'] as const).map((end) => {
          const { x, y } = end === 'from' ? from : to;
          const size = held === end ? 5 : 3;
          return (
            <rect
              key={end}
              class="line-handle"
              data-held={held === end}
              x={x - size}
              y={y - size}
              width={2 * size}
              height={2 * size}
            />
          );
        })}
      {label !== '' && (
        <text x={to.x + 6} y={to.y - 5}>
          {label}
        </text>
      )}
    </g>
  );
}

/** A stroke over the width of the band where the line crosses the edge. */
function edgeTick(line: BandLine, atMm: number, transform: PlateTransform): string {
  const along = normalise(subtract(line.toMm, line.fromMm));
  if (along === undefined) return '';
  const corners = bandCorners(line, transform);
  const [left, , , right] = corners;
  if (left === undefined || right === undefined) return '';
  const by = scale(along, atMm);
  const [a, b] = [left, right].map((corner) => patientToPlate(transform, add(corner, by)));
  return a === undefined || b === undefined ? '' : `M${a.x} ${a.y}L${b.x} ${b.y}`;
}

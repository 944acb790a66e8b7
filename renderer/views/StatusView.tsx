import { patientToPixel, type Vec3 } from '../../core/geometry/index.js';
import { isPadding, rescaled } from '../../core/intensity/index.js';
import type { Kernel } from '../../core/note/index.js';
import { useEngine } from '../engine.js';
import { StatusLine, type StatusLineProps } from '../panels/StatusLine.js';
import { type PlateTransform, patientToPlate, plateToPatient } from '../plates/plateTransform.js';
import type { Bench } from '../services/bench.js';
import type { AppState, Caret } from '../state/appState.js';
import { takesMarks } from '../state/regionSelectors.js';
import { shownSlice, transformOf } from '../state/selectors.js';
import { useSelected } from './useSelected.js';

/** The status line: values under the pointer, or under the crosshair, on both plates. */
export function StatusView() {
  const { store, bench } = useEngine();
  const place = useSelected((state) => state.hover ?? state.caret);
  const transform = useSelected((state) => place && transformOf(state, place.kernel));
  const message = useSelected((state) => state.message);
  const job = useSelected((state) => state.job);
  const pair = useSelected((state) => state.pair);
  const loadingText = useSelected(readingText);
  // The slices under the pointer change when the plates scroll, and values come when slices are read.
  useSelected((state) => state.plates);
  useSelected((state) => state.loading);
  return (
    <StatusLine
      cursor={cursorOf(store.now(), bench, placeOn(place, transform))}
      unit={pair?.soft.unit ?? 'HU'}
      single={pair !== undefined && pair.sharp === undefined}
      message={shownMessage(message, job, loadingText)}
    />
  );
}

function shownMessage(
  message: AppState['message'],
  job: AppState['job'],
  reading: string | undefined,
): StatusLineProps['message'] {
  if (job !== undefined) {
    const count = job.total === undefined ? '' : ` · ${job.done} of ${job.total}`;
    return { tone: 'plain', text: `${job.text}${count}` };
  }
  if (message !== undefined) {
    return { text: message.text, tone: message.tone === 'warning' ? 'warn' : 'plain' };
  }
  return reading === undefined ? undefined : { tone: 'plain', text: reading };
}

/** How far the stacks are read, and how many slices can't be shown; undefined when all is well. */
function readingText({ loading }: AppState): string | undefined {
  const done = loading.soft.done + loading.sharp.done;
  const total = loading.soft.total + loading.sharp.total;
  const gaps = loading.soft.gaps.size + loading.sharp.gaps.size;
  if (done < total) return `Reading slices · ${done} of ${total}`;
  if (gaps === 0) return undefined;
  return gaps === 1 ? '1 slice can’t be shown.' : `${gaps} slices can’t be shown.`;
}

/** The place of the patient under the pointer or the crosshair, on the plane of the shown slice. */
function placeOn(
  place: AppState['hover'] | AppState['caret'],
  transform: PlateTransform | undefined,
): Caret | undefined {
  if (place === undefined || transform === undefined) return undefined;
  const { kernel } = place;
  const point = 'point' in place ? place.point : patientToPlate(transform, place.pointMm);
  return { kernel, pointMm: plateToPatient(transform, point) };
}

function cursorOf(
  state: AppState,
  bench: Pick<Bench, 'shown'>,
  place: Caret | undefined,
): StatusLineProps['cursor'] {
  if (place === undefined || state.pair === undefined) return undefined;
  const on = (kernel: Kernel): number | null =>
    kernel === place.kernel || (takesMarks(state, kernel) && takesMarks(state, place.kernel))
      ? valueAt(state, bench, kernel, place.pointMm)
      : null;
  const grid = shownSlice(state, place.kernel)?.slice.image.grid;
  // Without a pixel spacing the place is a pixel's and not the patient's.
  const where = grid?.unscaled
    ? { pixel: patientToPixel(grid, place.pointMm) }
    : { positionMm: place.pointMm };
  return { ...where, soft: on('soft'), sharp: on('sharp') };
}

/** The value of the pixel at a place of the shown slice; null on padding, outside, and before it was read. */
function valueAt(
  state: AppState,
  bench: Pick<Bench, 'shown'>,
  kernel: Kernel,
  pointMm: Vec3,
): number | null {
  const shown = shownSlice(state, kernel);
  if (shown === undefined) return null;
  const { grid, pixels } = shown.slice.image;
  const pixel = patientToPixel(grid, pointMm);
  const [column, row] = [Math.round(pixel.column), Math.round(pixel.row)];
  if (column < 0 || row < 0 || column >= grid.columns || row >= grid.rows) return null;
  const value = bench.shown(kernel, shown.index)?.[row * grid.columns + column];
  return value === undefined || isPadding(value, pixels) ? null : rescaled(value, pixels);
}

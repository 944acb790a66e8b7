import { distance, subtract } from '../../core/geometry/index.js';
import { PROFILE_BAND_MM } from '../../core/note/index.js';
import { BAND_MM, type BandLine } from '../../core/region/index.js';
import { plateToPatient } from '../plates/plateTransform.js';
import type { AppState, LinePurpose } from '../state/appState.js';
import { linesOn, type MarkedLine } from '../state/lineSelectors.js';
import { transformOf } from '../state/selectors.js';
import { canMark } from './canMark.js';
import { hitLine, LEAST_LINE_MM, type LinePart, movedLine, straightened } from './lineOnPlate.js';
import { clickSetsCaret } from './setCaret.js';
import type { Tool, ToolPointer, ToolPort } from './tool.js';

/** Draws a line from press to release; with Shift in one of eight directions. */
export function lineTool(purpose: LinePurpose): Tool {
  return {
    id: purpose,
    click: clickSetsCaret,
    drag: (port, start) => {
      const before = port.now();
      const { kernel } = start;
      const transform = transformOf(before, kernel);
      if (transform === undefined || !canMark(port, kernel)) return undefined;
      const fromMm = plateToPatient(transform, start.point);
      const lineTo = ({ point, shift }: ToolPointer): BandLine => {
        const toMm = plateToPatient(transform, point);
        return {
          fromMm,
          toMm: shift ? straightened(fromMm, toMm, transform) : toMm,
          bandMm: bandOf(before, purpose),
        };
      };
      return {
        move: (pointer) =>
          port.change('Draw line', (state) => ({
            ...state,
            active: kernel,
            selected: undefined,
            lineDraft: { kernel, purpose, lineId: undefined, ...lineTo(pointer) },
          })),
        complete: (pointer) => placeLine(port, purpose, lineTo(pointer)),
        cancel: () => giveLineUp(port, before),
      };
    },
  };
}

const HOW_TO_DRAW: Readonly<Record<LinePurpose, string>> = {
  edge: 'Draw it across the edge, and well beyond it on both sides.',
  profile: 'Draw it across the vessel, from outside to outside.',
};

/** Puts a line into the note; one that is too short to be meant is told and dropped. */
export function placeLine(port: ToolPort, purpose: LinePurpose, line: BandLine): void {
  if (distance(line.fromMm, line.toMm) >= LEAST_LINE_MM) {
    port.placeLine(purpose, line);
    return;
  }
  const text = `The line is shorter than ${LEAST_LINE_MM} mm. ${HOW_TO_DRAW[purpose]}`;
  port.change('Line too short', (state) => ({
    ...state,
    lineDraft: undefined,
    message: { tone: 'warning', text },
  }));
}

/** Widths of bands by the purpose of the line, mm. */
export const BANDS_MM: Readonly<
  Record<LinePurpose, { readonly least: number; readonly most: number; readonly usual: number }>
> = { edge: BAND_MM, profile: PROFILE_BAND_MM };

/** The band of a new line: that of the last one drawn for this, so that a width once chosen stays. */
export function bandOf({ note }: Pick<AppState, 'note'>, purpose: LinePurpose): number {
  const drawn = purpose === 'edge' ? note?.edges : note?.profiles;
  return drawn?.at(-1)?.bandMm ?? BANDS_MM[purpose].usual;
}

export interface LineHit {
  readonly line: MarkedLine;
  readonly part: LinePart;
}

/** The line that a press takes hold of: the selected one by its ends or body, any other one by its body. */
export function lineAt(
  state: AppState,
  { kernel, point }: Pick<ToolPointer, 'kernel' | 'point'>,
): LineHit | undefined {
  const transform = transformOf(state, kernel);
  if (transform === undefined) return undefined;
  const lines = linesOn(state, kernel);
  const chosen = lines.filter(({ id }) => id === state.selected);
  const others = lines.filter(({ id }) => id !== state.selected).reverse();
  for (const line of [...chosen, ...others]) {
    const part = hitLine(line, transform, point, line.id === state.selected);
    if (part !== undefined) return { line, part };
  }
  return undefined;
}

/** Selects a line, moves it, or moves one of its ends. */
export function lineHandleTool({ line, part }: LineHit): Tool {
  return {
    id: 'line-handle',
    click: (port, { kernel }) =>
      port.change('Select line', (state) => ({
        ...state,
        active: kernel,
        selected: line.id,
        lineEnd: undefined,
      })),
    drag: (port, start) => {
      const before = port.now();
      const { kernel } = start;
      const transform = transformOf(before, kernel);
      if (transform === undefined) return undefined;
      const from = plateToPatient(transform, start.point);
      const lineTo = ({ point, shift }: ToolPointer): MarkedLine => {
        const by = subtract(plateToPatient(transform, point), from);
        const moved = { ...line, ...movedLine(line, part, by) };
        if (!shift || part === 'body') return moved;
        return part === 'to'
          ? { ...moved, toMm: straightened(moved.fromMm, moved.toMm, transform) }
          : { ...moved, fromMm: straightened(moved.toMm, moved.fromMm, transform) };
      };
      return {
        move: (pointer) =>
          port.change('Change line', (state) => ({
            ...state,
            active: kernel,
            selected: line.id,
            lineEnd: undefined,
            lineDraft: { kernel, lineId: line.id, ...lineTo(pointer) },
          })),
        complete: (pointer) => {
          const moved = lineTo(pointer);
          if (distance(moved.fromMm, moved.toMm) >= LEAST_LINE_MM)
            port.reshapeLine(line.purpose, line.id, moved);
          else giveLineUp(port, before);
        },
        cancel: () => giveLineUp(port, before),
      };
    },
  };
}

function giveLineUp(port: ToolPort, before: AppState): void {
  port.change('Give the line up', (state) => ({
    ...state,
    lineDraft: undefined,
    selected: before.selected,
  }));
}

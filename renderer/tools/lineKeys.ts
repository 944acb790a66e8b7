import { add, distance, type Vec3 } from '../../core/geometry/index.js';
import type { Kernel } from '../../core/note/index.js';
import { isSealed } from '../../core/note/life/index.js';
import type { BandLine } from '../../core/region/index.js';
import type { AppState, LinePurpose } from '../state/appState.js';
import { isLineOnPlate, type MarkedLine, selectedLine } from '../state/lineSelectors.js';
import { canMark } from './canMark.js';
import { LEAST_LINE_MM, movedLine } from './lineOnPlate.js';
import { BANDS_MM, bandOf, placeLine } from './lineTool.js';
import type { ToolPort } from './tool.js';

/** What a key press asks of the line that is drawn or selected. */
export type LineKey =
  | { readonly kind: 'move'; readonly by: Vec3 }
  | { readonly kind: 'widen'; readonly steps: 1 | -1 }
  /** Enter, with the crosshair's place on the slice. */
  | { readonly kind: 'enter'; readonly atMm: Vec3 }
  | { readonly kind: 'back' };

const BAND_STEP_MM = 0.5;

/**
 * Lines by key. With the tool: Enter begins a line at the crosshair, the arrows move its end, Enter places it. On the
 * selected line: the arrows move it, Enter takes hold of its start, then of its end, then of all of it again. Plus and
 * minus change the width of the band. True when the key was used.
 */
export function lineKey(port: ToolPort, kernel: Kernel, key: LineKey): boolean {
  const { lineDraft } = port.now();
  if (lineDraft !== undefined) return drawKey(port, key);
  const line = selectedLine(port.now());
  if (line !== undefined && isLineOnPlate(port.now(), kernel, line))
    return changeKey(port, line, key);
  if (key.kind !== 'enter') return false;
  const { selected, tool } = port.now();
  if (selected !== undefined || !isLineTool(tool)) return false;
  begin(port, kernel, tool, key.atMm);
  return true;
}

/** Whether a tool draws lines, and for what. */
export function isLineTool(tool: AppState['tool']): tool is LinePurpose {
  return tool === 'edge' || tool === 'profile';
}

function begin(port: ToolPort, kernel: Kernel, purpose: LinePurpose, atMm: Vec3): void {
  if (!canMark(port, kernel)) return;
  port.change('Begin a line', (state) => ({
    ...state,
    active: kernel,
    caret: { kernel, pointMm: atMm },
    lineDraft: {
      kernel,
      purpose,
      lineId: undefined,
      fromMm: atMm,
      toMm: atMm,
      bandMm: bandOf(state, purpose),
    },
    message: {
      tone: 'plain',
      text: 'The arrows move the end of the line, Enter places it, Esc gives it up.',
    },
  }));
}

function drawKey(port: ToolPort, key: LineKey): boolean {
  const draft = port.now().lineDraft;
  if (draft === undefined || draft.lineId !== undefined) return true;
  if (key.kind === 'enter') {
    // A line of no length yet is not placed by a second Enter: the end is still to be moved.
    if (distance(draft.fromMm, draft.toMm) > 0) placeLine(port, draft.purpose, draft);
    return true;
  }
  port.change('Change the line', (state) => {
    if (state.lineDraft === undefined) return state;
    if (key.kind === 'back') return { ...state, lineDraft: undefined };
    if (key.kind === 'widen')
      return {
        ...state,
        lineDraft: { ...draft, bandMm: widened(draft, key.steps, draft.purpose) },
      };
    const toMm = add(draft.toMm, key.by);
    return {
      ...state,
      lineDraft: { ...draft, toMm },
      caret: { kernel: draft.kernel, pointMm: toMm },
    };
  });
  return true;
}

function changeKey(
  port: ToolPort,
  line: NonNullable<ReturnType<typeof selectedLine>>,
  key: LineKey,
): boolean {
  const { note, lineEnd } = port.now();
  if (note === undefined || isSealed(note) || key.kind === 'back') return false;
  if (key.kind === 'enter') {
    const next = lineEnd === undefined ? 'from' : lineEnd === 'from' ? 'to' : undefined;
    port.change('Take hold of an end', (state) => ({
      ...state,
      lineEnd: next,
      message: { tone: 'plain', text: HELD[next ?? 'all'] },
    }));
    return true;
  }
  const next: MarkedLine =
    key.kind === 'widen'
      ? { ...line, bandMm: widened(line, key.steps, line.purpose) }
      : { ...line, ...movedLine(line, lineEnd ?? 'body', key.by) };
  if (distance(next.fromMm, next.toMm) < LEAST_LINE_MM) return true;
  port.reshapeLine(line.purpose, line.id, next, `${key.kind}:${line.id}:${lineEnd ?? ''}`);
  return true;
}

const HELD = {
  from: 'The arrows move the start of the line. Enter takes its end.',
  to: 'The arrows move the end of the line. Enter takes all of it.',
  all: 'The arrows move the whole line.',
} as const;

/** A band one step wider or narrower, within what can be measured. */
export function widened(
  { bandMm }: Pick<BandLine, 'bandMm'>,
  steps: number,
  purpose: LinePurpose,
): number {
  const { least, most } = BANDS_MM[purpose];
  return Math.min(most, Math.max(least, bandMm + steps * BAND_STEP_MM));
}

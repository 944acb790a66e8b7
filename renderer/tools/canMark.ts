import type { Kernel } from '../../core/note/index.js';
import { isUnscaled } from '../../core/stack/index.js';
import { VERIFIED } from '../state/history.js';
import { takesMarks } from '../state/regionSelectors.js';
import { shownSlice, stackOf } from '../state/selectors.js';
import type { ToolPort } from './tool.js';

/** Whether a region can be drawn on a plate now; where not, the reader is told why. */
export function canMark(port: ToolPort, kernel: Kernel): boolean {
  const state = port.now();
  if (shownSlice(state, kernel) === undefined) return false;
  if (state.note?.verification === 'VERIFIED') return tell(port, VERIFIED);
  const stack = stackOf(state, kernel);
  if (stack !== undefined && isUnscaled(stack)) return tell(port, NO_SCALE);
  if (!takesMarks(state, kernel)) return tell(port, ON_SOFT_ONLY);
  return true;
}

const NO_SCALE =
  'The files of this stack have no pixel spacing: it can be looked at, and nothing is measured on it.';
const ON_SOFT_ONLY =
  'Positions of the two stacks can’t be compared, so regions are drawn on the soft plate.';

function tell(port: ToolPort, text: string): false {
  port.change('Can’t mark', (state) => ({ ...state, message: { tone: 'warning', text } }));
  return false;
}

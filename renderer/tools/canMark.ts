import type { Kernel } from '../../core/note/index.js';
import { takesMarks } from '../state/regionSelectors.js';
import { shownSlice } from '../state/selectors.js';
import type { ToolPort } from './tool.js';

/** Whether a region can be drawn on a plate now; where not, the reader is told why. */
export function canMark(port: ToolPort, kernel: Kernel): boolean {
  const state = port.now();
  if (shownSlice(state, kernel) === undefined) return false;
  if (state.note?.verification === 'VERIFIED') return tell(port, VERIFIED);
  if (!takesMarks(state, kernel)) return tell(port, ON_SOFT_ONLY);
  return true;
}

const VERIFIED = 'This note is verified and can’t be changed.';
const ON_SOFT_ONLY =
  'Positions of the two stacks can’t be compared, so regions are drawn on the soft plate.';

function tell(port: ToolPort, text: string): false {
  port.change('Can’t mark', (state) => ({ ...state, message: { tone: 'warning', text } }));
  return false;
}

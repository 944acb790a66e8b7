import { add, type Vec3 } from '../../core/geometry/index.js';
import type { Kernel } from '../../core/note/index.js';
import { isSealed } from '../../core/note/life/index.js';
import { selectedStent, stentsOn } from '../state/stentSelectors.js';
import type { ToolPort } from './tool.js';

/** The arrows move the place of the selected stent, which is fitted anew. True when the key was used. */
export function moveSelectedStent(port: ToolPort, kernel: Kernel, by: Vec3): boolean {
  const state = port.now();
  const stent = selectedStent(state);
  if (stent === undefined || state.note === undefined || isSealed(state.note)) return false;
  if (!stentsOn(state, kernel).some(({ id }) => id === stent.id)) return false;
  port.moveStent(stent.id, add(stent.fit?.axisMm ?? stent.centreMm, by), `move:${stent.id}`);
  return true;
}

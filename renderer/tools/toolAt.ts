import type { AppState, ToolId } from '../state/appState.js';
import { courseAt, courseHandleTool } from './courseHandle.js';
import { cutTool } from './cutTool.js';
import { ellipseTool } from './ellipseTool.js';
import { isLineTool } from './lineKeys.js';
import { lineAt, lineHandleTool, lineTool } from './lineTool.js';
import { moveTool } from './moveTool.js';
import { outlineTool } from './outlineTool.js';
import { regionAt, selectTool } from './selectTool.js';
import { stentAt, stentHandleTool } from './stentHandle.js';
import { stentTool } from './stentTool.js';
import type { Tool, ToolPointer } from './tool.js';
import { windowTool } from './windowTool.js';
import { zoomTool } from './zoomTool.js';

const TOOLS: Readonly<Record<ToolId, Tool>> = {
  window: windowTool,
  move: moveTool,
  zoom: zoomTool,
  ellipse: ellipseTool,
  outline: outlineTool,
  stent: stentTool,
  cut: cutTool,
  edge: lineTool('edge'),
  profile: lineTool('profile'),
};

/** The tool that a press uses: a region that it takes hold of, else the chosen tool. */
export function toolAt(state: AppState, pointer: ToolPointer): Tool {
  // While points of an outline are being set, a press near another region still sets a point.
  if (state.openOutline !== undefined) return TOOLS[state.tool];
  // A course is set through marks, wherever they are.
  if (state.tool === 'cut') return TOOLS.cut;
  const course = courseAt(state, pointer);
  if (course !== undefined && state.note?.verification !== 'VERIFIED')
    return courseHandleTool(course);
  const line = lineAt(state, pointer);
  if (line !== undefined && state.note?.verification !== 'VERIFIED') return lineHandleTool(line);
  const stent = stentAt(state, pointer);
  if (stent !== undefined && state.note?.verification !== 'VERIFIED') return stentHandleTool(stent);
  if (state.tool === 'stent') return TOOLS.stent;
  // A line is drawn across marks: with its tool a press near the edge of a region begins a line.
  if (isLineTool(state.tool)) return TOOLS[state.tool];
  const hit = regionAt(state, pointer);
  const canChange = state.note?.verification !== 'VERIFIED';
  return hit !== undefined && canChange ? selectTool(hit) : TOOLS[state.tool];
}

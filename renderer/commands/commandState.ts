import { COMMANDS, type CommandId } from '../../core/commands/index.js';
import type { AppState } from '../state/appState.js';
import { selectedRegion } from '../state/regionSelectors.js';

/** Commands that need nothing opened. */
const ALWAYS: ReadonlySet<CommandId> = new Set([
  'folder.open',
  'folder.demonstration',
  'edit.settings',
  'view.smooth',
  'help.keys',
  'help.numbers',
  'help.cautions',
]);

const HU_WINDOWS: ReadonlySet<CommandId> = new Set([
  'window.vessel',
  'window.stent',
  'window.tissue',
  'window.lung',
]);

const NEEDS_REGIONS: ReadonlySet<CommandId> = new Set(['region.next', 'region.previous']);

/** Whether a command can be used now. */
export function isEnabled(state: AppState, id: CommandId): boolean {
  if (ALWAYS.has(id)) return true;
  if (id === 'folder.contents') return state.index !== undefined;
  if (id === 'pair.choose') return (state.index?.stacks.length ?? 0) > 0;
  const { pair, note } = state;
  if (pair === undefined || note === undefined) return false;
  if (HU_WINDOWS.has(id)) return pair.soft.unit === 'HU';
  if (id.startsWith('link.')) return pair.sharp !== undefined;
  if (NEEDS_REGIONS.has(id)) return note.regions.length > 0;
  if (id === 'edit.undo') return state.history.undo.length > 0;
  if (id === 'edit.redo') return state.history.redo.length > 0;
  if (id === 'contrast.new') return note.regions.length > 1;
  if (id === 'region.delete' || id === 'slice.region') return selectedRegion(state) !== undefined;
  return true;
}

/** Whether a command that can be on is on. */
export function isChecked(state: AppState, id: CommandId): boolean {
  if (id.startsWith('tool.')) return id === `tool.${state.tool}`;
  if (id.startsWith('role.')) return id === `role.${state.role}`;
  if (id === 'view.smooth') return state.smooth;
  if (id === 'link.scroll') return state.links.scroll;
  if (id === 'link.window') return state.links.window;
  return id === 'link.view' && state.links.view;
}

export function enabledCommands(state: AppState): readonly CommandId[] {
  return COMMANDS.flatMap(({ id }) => (isEnabled(state, id) ? [id] : []));
}

export function checkedCommands(state: AppState): readonly CommandId[] {
  return COMMANDS.flatMap(({ id }) => (isChecked(state, id) ? [id] : []));
}

import { COMMANDS, type CommandId } from '../../core/commands/index.js';
import { isMasked } from '../services/masking.js';
import type { AppState } from '../state/appState.js';
import { selectedLine } from '../state/lineSelectors.js';
import { isBlind, selectedRegion } from '../state/regionSelectors.js';
import { linksOf } from '../state/selectors.js';
import { selectedStent } from '../state/stentSelectors.js';

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

/** Commands that would show something of the first reading while it is read again. */
const TELLS_FIRST: ReadonlySet<CommandId> = new Set([
  'export.open',
  'export.csv',
  'export.html',
  'export.json',
  'edit.copyTable',
  'region.keyImage',
  'region.next',
  'region.previous',
  'region.delete',
  'slice.region',
  'note.open',
  'note.recheck',
  'contrast.new',
  'plot.visible',
  'plot.bands',
  'plot.stent',
  'view.residuals',
  'tool.edge',
  'tool.profile',
  'tool.stent',
  'tool.cut',
  'cut.delete',
  'repeat.begin',
  'agreement.open',
]);

/** Whether a command can be used now. */
export function isEnabled(state: AppState, id: CommandId): boolean {
  if (ALWAYS.has(id)) return true;
  if (id === 'folder.contents') return state.index !== undefined;
  if (id === 'pair.choose') return (state.index?.stacks.length ?? 0) > 0;
  const { pair, note } = state;
  if (pair === undefined || note === undefined) return false;
  if (isBlind(state) && TELLS_FIRST.has(id)) return false;
  if (id === 'repeat.skip' || id === 'repeat.finish') return isBlind(state);
  if (id === 'repeat.begin') {
    return note.regions.length > 0 && note.verification !== 'VERIFIED';
  }
  if (HU_WINDOWS.has(id)) return pair.soft.unit === 'HU';
  if (id === 'link.scroll' || id === 'link.view') {
    return pair.sharp !== undefined && state.compare.way === 'open';
  }
  if (id === 'pair.mask') return pair.soft.unit === 'HU' && note.verification !== 'VERIFIED';
  if (id === 'link.window' || id === 'pair.swap') return pair.sharp !== undefined;
  if (id.startsWith('compare.')) return pair.sharp !== undefined;
  if (id.startsWith('alternate.')) return state.compare.way === 'alternate';
  if (id === 'view.noiseAreas') return hasNoiseAreas(state) && state.cut === undefined;
  if (id === 'view.residuals') return note.stents.length > 0;
  if (id === 'cut.leave' || id === 'cut.delete') return state.cut !== undefined;
  if (NEEDS_REGIONS.has(id)) return note.regions.length > 0;
  if (id === 'edit.undo') return state.history.undo.length > 0;
  if (id === 'edit.redo') return state.history.redo.length > 0;
  if (id === 'contrast.new') return note.regions.length > 1;
  if ((id === 'region.delete' || id === 'slice.region') && isOtherSelected(state)) return true;
  if (id === 'region.delete' || id === 'slice.region' || id === 'region.keyImage')
    return selectedRegion(state) !== undefined;
  return true;
}

/** Whether a command that can be on is on. */
export function isChecked(state: AppState, id: CommandId): boolean {
  if (id.startsWith('tool.')) return id === `tool.${state.tool}`;
  if (id.startsWith('role.')) return id === `role.${state.role}`;
  if (id === 'view.smooth') return state.smooth;
  if (id === 'view.residuals') return state.residuals;
  if (id === 'pair.mask') return state.pair !== undefined && isMasked(state.pair);
  if (id === 'view.noiseAreas') return state.noiseAreas && hasNoiseAreas(state);
  if (id.startsWith('compare.')) {
    return state.pair?.sharp !== undefined && id === `compare.${state.compare.way}`;
  }
  const links = linksOf(state);
  if (id === 'link.scroll') return links.scroll;
  if (id === 'link.window') return links.window;
  return id === 'link.view' && links.view;
}

/** Whether a line or a stent is selected. */
function isOtherSelected(state: AppState): boolean {
  return selectedLine(state) !== undefined || selectedStent(state) !== undefined;
}

function hasNoiseAreas({ assessment }: AppState): boolean {
  return assessment.kind === 'done' && assessment.measured.areas.length > 0;
}

export function enabledCommands(state: AppState): readonly CommandId[] {
  return COMMANDS.flatMap(({ id }) => (isEnabled(state, id) ? [id] : []));
}

export function checkedCommands(state: AppState): readonly CommandId[] {
  return COMMANDS.flatMap(({ id }) => (isChecked(state, id) ? [id] : []));
}

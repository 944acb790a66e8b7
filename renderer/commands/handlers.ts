import type { CommandId } from '../../core/commands/index.js';
import { nextFileWindow, PRESETS } from '../../core/intensity/index.js';
import type { Note } from '../../core/note/index.js';
import type { Role } from '../../core/region/index.js';
import type { Shell } from '../host/shell.js';
import type { Bench } from '../services/bench.js';
import type { CompareWay, DialogId, Message, ToolId } from '../state/appState.js';
import { setCompare, switchKernel } from '../state/changes/compare.js';
import { deletePlane, leavePlane, scrollOrShift } from '../state/changes/cut.js';
import { goToRegion } from '../state/changes/goToRegion.js';
import { removeSelected, setRole, stepSelection } from '../state/changes/regions.js';
import { endRepeat, skipNext, startRepeat } from '../state/changes/repeat.js';
import { fitView, setWindow, toggleLink } from '../state/changes/view.js';
import { redo, undo } from '../state/history.js';
import { noiseAreasText } from '../state/noiseSelectors.js';
import { stackOf } from '../state/selectors.js';
import type { Store } from '../state/store.js';
import { zoomBy } from '../tools/zoomTool.js';
import { isEnabled } from './commandState.js';
import { copyTable, type ExportKind, exportNote } from './exportNote.js';

export interface CommandContext {
  readonly store: Store;
  readonly bench: Bench;
  readonly shell: Shell;
  /** Present time, ISO 8601. */
  readonly now: () => string;
}

/** Runs a command of the table; one that can't be used now does nothing. */
export type RunCommand = (id: CommandId) => void;

/** Each press of Enlarge or Reduce. */
const ZOOM_STEP = 1.25;

export function createCommands(context: CommandContext): RunCommand {
  const handlers = handlersOf(context);
  return (id) => {
    if (isEnabled(context.store.now(), id)) handlers[id]();
  };
}

/** A handler for every command: a command without one does not compile. */
function handlersOf(context: CommandContext): Readonly<Record<CommandId, () => void>> {
  const { store, bench, shell, now } = context;
  const dialog = (id: DialogId) => () =>
    store.change('Open dialog', (state) => ({ ...state, dialog: id }));
  const tool = (id: ToolId) => () =>
    store.change('Choose tool', (state) => ({
      ...state,
      tool: id,
      openOutline: undefined,
      courseStart: undefined,
    }));
  const role = (id: Role) => () => store.change('Choose role', setRole(id));
  const link = (which: 'scroll' | 'window' | 'view') => () =>
    store.change('Link', toggleLink(which));
  const compare = (way: CompareWay) => () => store.change('Compare', setCompare(way));
  const preset = (id: 'vessel' | 'stent' | 'tissue' | 'lung') => () => {
    const window = PRESETS.find((one) => one.id === id)?.window;
    if (window !== undefined) store.change('Window', setWindow(store.now().active, window));
  };
  const tell = (message: Message): void => store.change('Tell', (state) => ({ ...state, message }));
  const withNote = (work: (note: Note) => Promise<Message>) => () => {
    const { note } = store.now();
    if (note !== undefined) void work(note).then(tell);
  };
  const save = (kind: ExportKind) => withNote((note) => exportNote(note, kind, shell));
  const step = (by: 1 | -1) => () => {
    store.change('Select region', stepSelection(by));
    store.change('Go to region', goToRegion(bench.cuts));
  };
  const slice = (by: number) => () =>
    store.change('Scroll', (state) => scrollOrShift(state.active, by, bench.cuts, now())(state));
  const zoom = (factor: number) => () =>
    store.change('Zoom', (state) => zoomBy(state.active, factor)(state));

  return {
    'folder.open': () => {
      void shell.chooseFolder().then((folder) => {
        if (folder !== undefined) void bench.openFolder(folder);
      });
    },
    'folder.demonstration': () => {
      void bench.openDemonstration();
    },
    'pair.choose': dialog('choosePair'),
    'pair.swap': () => {
      void bench.swapPair();
    },
    'pair.mask': () => {
      void bench.turnMask();
    },
    'folder.contents': dialog('contents'),
    'export.open': dialog('export'),
    'export.csv': save('csv'),
    'export.html': save('html'),
    'export.json': save('json'),
    'edit.undo': () => {
      store.change('Undo', undo);
      bench.remeasure();
    },
    'edit.redo': () => {
      store.change('Redo', redo);
      bench.remeasure();
    },
    'edit.copyTable': withNote((note) => copyTable(note, navigator.clipboard)),
    'region.delete': () => store.change('Delete region', removeSelected(now())),
    'edit.settings': dialog('settings'),
    'tool.window': tool('window'),
    'tool.move': tool('move'),
    'tool.zoom': tool('zoom'),
    'slice.next': slice(1),
    'slice.previous': slice(-1),
    'slice.region': () => store.change('Go to region', goToRegion(bench.cuts)),
    'view.fit': () => store.change('Fit', (state) => fitView(state.active)(state)),
    'view.zoomIn': zoom(ZOOM_STEP),
    'view.zoomOut': zoom(1 / ZOOM_STEP),
    'view.smooth': () => store.change('Smooth', (state) => ({ ...state, smooth: !state.smooth })),
    'compare.open': compare('open'),
    'compare.fold': compare('fold'),
    'compare.alternate': compare('alternate'),
    'compare.difference': compare('difference'),
    'alternate.switch': () => store.change('Switch kernel', switchKernel),
    // Held, it is the keyboard that shows the other kernel and takes it back; chosen from a menu it is a switch.
    'alternate.hold': () => store.change('Switch kernel', switchKernel),
    'view.noiseAreas': () =>
      store.change('Outline noise areas', (state) => {
        const noiseAreas = !state.noiseAreas;
        const text = noiseAreas ? noiseAreasText(state) : undefined;
        const message = text === undefined ? state.message : ({ tone: 'plain', text } as const);
        return { ...state, noiseAreas, message };
      }),
    'plot.stent': () => store.change('Choose plot', (state) => ({ ...state, plot: 'stent' })),
    'view.residuals': () =>
      store.change('Show what is left over', (state) => ({
        ...state,
        residuals: !state.residuals,
      })),
    'plot.bands': () => store.change('Choose plot', (state) => ({ ...state, plot: 'bands' })),
    'plot.visible': () => store.change('Choose plot', (state) => ({ ...state, plot: 'visible' })),
    'window.file': () => {
      const state = store.now();
      const image = stackOf(state, state.active)?.slices[0].image;
      if (image !== undefined)
        store.change(
          'Window',
          setWindow(state.active, nextFileWindow(image, state.plates[state.active].window)),
        );
    },
    'window.vessel': preset('vessel'),
    'window.stent': preset('stent'),
    'window.tissue': preset('tissue'),
    'window.lung': preset('lung'),
    'link.scroll': link('scroll'),
    'link.window': link('window'),
    'link.view': link('view'),
    'tool.ellipse': tool('ellipse'),
    'tool.outline': tool('outline'),
    'tool.edge': tool('edge'),
    'tool.profile': tool('profile'),
    'tool.stent': tool('stent'),
    'tool.cut': tool('cut'),
    'cut.leave': () => store.change('Back to the slices', leavePlane),
    'cut.delete': () => {
      const planeId = store.now().cut?.planeId;
      if (planeId !== undefined) store.change('Delete the cut', deletePlane(planeId, now()));
    },
    'role.lumen': role('lumen'),
    'role.wall': role('wall'),
    'role.plaque': role('plaque'),
    'role.fat': role('fat'),
    'role.reference': role('reference'),
    'region.next': step(1),
    'region.previous': step(-1),
    'note.save': () => bench.saveNow(),
    'region.keyImage': dialog('keyImage'),
    'note.open': dialog('note'),
    'note.recheck': dialog('recheck'),
    'repeat.begin': () => {
      const { reader } = store.now().settings;
      store.change('Begin repeat', startRepeat(reader, now()));
    },
    'repeat.skip': () => store.change('Skip region', skipNext(now())),
    'repeat.finish': () => store.change('Finish repeat', endRepeat(now())),
    'agreement.open': dialog('agreement'),
    'contrast.new': dialog('newContrast'),
    'help.keys': dialog('keys'),
    'help.numbers': dialog('numbers'),
    'help.cautions': dialog('cautions'),
  };
}

import { COMMANDS, type CommandId } from '../../core/commands/index.js';
import { checkedCommands, enabledCommands } from '../commands/commandState.js';
import type { Engine } from '../engine.js';
import type { AppState } from '../state/appState.js';
import { isUnsaved } from '../state/selectors.js';

/**
 * Connects the page with its shell: menu commands and folders from outside come in, what can be used and whether
 * something is unsaved goes out. Dropped folders are opened where the shell can, else it is explained how to.
 */
export function connectShell(engine: Engine, host: Window): void {
  const { store, shell, bench, run, signal } = engine;
  const stops = [
    shell.onCommand((id) => {
      if (isCommand(id)) run(id);
    }),
    shell.onFolder((folder) => {
      void bench.openFolder(folder);
    }),
    store.watch((_name, after, before) => {
      if (isReported(after, before)) report(engine, after);
    }),
  ];
  signal.addEventListener('abort', () => {
    for (const stop of stops) stop();
  });
  report(engine, store.now());

  host.addEventListener('beforeunload', (event) => {
    if (isUnsaved(store.now())) event.preventDefault();
  });
  const root = host.document.documentElement;
  host.addEventListener('dragover', (event) => {
    event.preventDefault();
    if (event.dataTransfer !== null) event.dataTransfer.dropEffect = 'copy';
    root.dataset.drop = 'true';
  });
  host.addEventListener('dragleave', (event) => {
    // The pointer goes from element to element; only when it goes to none has it left the window.
    if (event.relatedTarget === null) delete root.dataset.drop;
  });
  host.addEventListener('drop', (event) => {
    // Without this a dropped file would replace the page.
    event.preventDefault();
    delete root.dataset.drop;
    const file = event.dataTransfer?.files[0];
    if (file !== undefined) void openDropped(engine, file);
  });
}

async function openDropped({ shell, bench, store }: Engine, file: File): Promise<void> {
  const folder = await shell.openDropped(file);
  if (folder !== undefined) return bench.openFolder(folder);
  const text =
    shell.kind === 'browser'
      ? 'A browser does not tell where a dropped folder lies. Use Open folder… instead.'
      : 'This can’t be opened. Drop a folder.';
  store.change('Warn', (state) => ({ ...state, message: { tone: 'warning', text } }));
}

const ids: ReadonlySet<string> = new Set(COMMANDS.map(({ id }) => id));

function isCommand(id: string): id is CommandId {
  return ids.has(id);
}

/** What the shell is told of; scrolling and pointing are none of it. */
function isReported(after: AppState, before: AppState): boolean {
  const keys = [
    'folder',
    'index',
    'pair',
    'note',
    'history',
    'save',
    'selected',
    'tool',
    'role',
    'links',
    'smooth',
    'compare',
    'assessment',
    'noiseAreas',
  ] as const satisfies readonly (keyof AppState)[];
  return keys.some((key) => after[key] !== before[key]);
}

function report({ shell }: Engine, state: AppState): void {
  const unsaved = isUnsaved(state);
  const folder = state.folder === undefined ? '' : ` · ${state.folder.name}`;
  shell.reportState({
    enabled: enabledCommands(state),
    checked: checkedCommands(state),
    unsaved,
    title: `${unsaved ? '• ' : ''}Diptych${folder}`,
  });
}

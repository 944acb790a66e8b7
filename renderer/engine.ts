import { createContext } from 'preact';
import { useContext } from 'preact/hooks';
import type { OpenFolder } from '../app/host/contract.js';
import { createCommands, type RunCommand } from './commands/handlers.js';
import type { HostClient } from './host/client.js';
import { type Shell, shellOf } from './host/shell.js';
import { type Bench, createBench } from './services/bench.js';
import { keepDensities } from './services/densities.js';
import { createFolderDialog, type FolderDialog } from './services/folderDialog.js';
import { createNoteLife, type NoteLife } from './services/noteLife.js';
import { createStore, type Store } from './state/store.js';
import type { ToolPort } from './tools/tool.js';
import { toolAt } from './tools/toolAt.js';
import { createToolMachine, type ToolMachine } from './tools/toolMachine.js';
import { createToolPort } from './tools/toolPort.js';

/** Everything that works behind the page's components. */
export interface Engine {
  readonly store: Store;
  readonly client: HostClient;
  readonly shell: Shell;
  readonly bench: Bench;
  /** The life of the note: verified, amended, measured again. */
  readonly life: NoteLife;
  readonly folderDialog: FolderDialog;
  readonly port: ToolPort;
  readonly machine: ToolMachine;
  readonly run: RunCommand;
  /** Present time, ISO 8601. */
  readonly now: () => string;
  readonly signal: AbortSignal;
}

/** Puts the engine together. `signal` ends everything that runs. */
export function createEngine(client: HostClient, host: Window, signal: AbortSignal): Engine {
  const store = createStore();
  const now = (): string => new Date().toISOString();
  const folderDialog = createFolderDialog(store, client, signal);
  const shell = shellOf(host, (): Promise<OpenFolder | undefined> => folderDialog.ask());
  const bench = createBench({
    store,
    client,
    signal,
    now,
    timeOfDay: () => new Date().toLocaleTimeString('en-GB', { hour: '2-digit', minute: '2-digit' }),
    newId: () => crypto.randomUUID(),
  });
  const life = createNoteLife({ store, client, bench, now, signal });
  keepDensities(store, bench, now, signal);
  const port = createToolPort(store, bench, now);
  const machine = createToolMachine(port, (pointer) => toolAt(store.now(), pointer));
  const run = createCommands({ store, bench, shell, now });
  return { store, client, shell, bench, life, folderDialog, port, machine, run, now, signal };
}

export const EngineContext = createContext<Engine | undefined>(undefined);

/** The engine of the page; only for components inside of it. */
export function useEngine(): Engine {
  const engine = useContext(EngineContext);
  if (engine === undefined) throw new Error('invalid use of a view: there is no engine around it');
  return engine;
}

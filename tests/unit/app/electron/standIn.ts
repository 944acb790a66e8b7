import { EventEmitter } from 'node:events';
import type { MenuItemConstructorOptions } from 'electron';
import type { SenderEvent } from '../../../../app/electron/ipc.js';
import type { ElectronParts } from '../../../../app/electron/parts.js';

/** The parts of a window that tests look at. */
interface StandInWindow extends EventEmitter {
  readonly given: Electron.BrowserWindowConstructorOptions;
  readonly webContents: EventEmitter;
  title: string;
  edited: boolean;
  isDestroyed(): boolean;
  close(): void;
}

/** Electron in the form that the shell uses, without a window: it records what it is told. */
export function standIn(options: { readonly userData: string; readonly first?: boolean }) {
  /** What was called, in order. */
  const calls: string[] = [];
  const sent: [channel: string, payload: unknown][] = [];
  const messages: string[] = [];
  const answers = {
    button: 0,
    folder: undefined as string | undefined,
    file: undefined as string | undefined,
  };
  const handlers = new Map<string, (event: SenderEvent, ...sent: unknown[]) => unknown>();
  const menus: MenuItemConstructorOptions[][] = [];
  const windows: StandInWindow[] = [];
  const served: ((request: Request) => Promise<Response>)[] = [];
  let ready: () => void = () => undefined;
  const whenReady = new Promise<void>((resolve) => {
    ready = resolve;
  });

  const app = Object.assign(new EventEmitter(), {
    isPackaged: true,
    commandLine: {
      appendSwitch: (name: string) => void calls.push(`switch ${name}`),
    },
    requestSingleInstanceLock: () => {
      calls.push('lock');
      return options.first ?? true;
    },
    enableSandbox: () => void calls.push('sandbox'),
    setPath: (name: string, path: string) => void calls.push(`path ${name} ${path}`),
    getPath: () => options.userData,
    whenReady: () => {
      calls.push('when ready');
      return whenReady;
    },
    setAppUserModelId: (id: string) => void calls.push(`app id ${id}`),
    setAboutPanelOptions: () => undefined,
    addRecentDocument: (path: string) => void calls.push(`recent ${path}`),
    clearRecentDocuments: () => void calls.push('clear recent'),
    quit: () => void calls.push('quit'),
    exit: (code: number) => void calls.push(`exit ${code}`),
  });

  const session = Object.assign(new EventEmitter(), {
    setSpellCheckerEnabled: (on: boolean) => void calls.push(`spellcheck ${on}`),
    setPermissionRequestHandler: () => void calls.push('permission requests'),
    setPermissionCheckHandler: () => void calls.push('permission checks'),
    setDevicePermissionHandler: () => void calls.push('device permissions'),
    webRequest: { onBeforeRequest: () => void calls.push('requests') },
    protocol: {
      handle: (scheme: string, handler: (request: Request) => Promise<Response>) => {
        calls.push(`serve ${scheme}`);
        served.push(handler);
      },
    },
  });

  function makeWindow(given: Electron.BrowserWindowConstructorOptions): StandInWindow {
    let destroyed = false;
    const webContents = Object.assign(new EventEmitter(), {
      send: (channel: string, payload: unknown) => void sent.push([channel, payload]),
      reload: () => void calls.push('reload'),
      setWindowOpenHandler: () => void calls.push('window open handler'),
    });
    const window: StandInWindow = Object.assign(new EventEmitter(), {
      given,
      title: '',
      edited: false,
      webContents,
      loadURL: async (url: string) => void calls.push(`load ${url}`),
      setTitle: (title: string) => {
        window.title = title;
      },
      setDocumentEdited: (edited: boolean) => {
        window.edited = edited;
      },
      getNormalBounds: () => ({ x: 10, y: 20, width: 1000, height: 700 }),
      isMaximized: () => false,
      isFullScreen: () => false,
      isMinimized: () => true,
      isDestroyed: () => destroyed,
      maximize: () => void calls.push('maximise'),
      restore: () => void calls.push('restore'),
      show: () => void calls.push('show'),
      focus: () => void calls.push('focus'),
      setFullScreen: () => void calls.push('full screen'),
      /** As Electron closes: ask the listeners, then the page, and go unless one objects. */
      close: () => {
        calls.push('close');
        const event = {
          prevented: false,
          preventDefault() {
            this.prevented = true;
          },
        };
        window.emit('close', event);
        if (event.prevented) return;
        destroyed = true;
        app.emit('window-all-closed');
      },
    });
    windows.push(window);
    app.emit('web-contents-created', {}, webContents);
    return window;
  }

  const parts = {
    app,
    BrowserWindow: function BrowserWindow(given: Electron.BrowserWindowConstructorOptions) {
      return makeWindow(given);
    },
    dialog: {
      showOpenDialog: async () => ({
        canceled: answers.folder === undefined,
        filePaths: answers.folder === undefined ? [] : [answers.folder],
      }),
      showSaveDialog: async () => ({
        canceled: answers.file === undefined,
        filePath: answers.file ?? '',
      }),
      showMessageBox: async (_window: unknown, box: { message: string; detail?: string }) => {
        messages.push(`${box.message}: ${box.detail}`);
        return { response: answers.button, checkboxChecked: false };
      },
      showErrorBox: (title: string, text: string) => void messages.push(`${title}: ${text}`),
    },
    ipcMain: {
      handle: (channel: string, listener: (event: SenderEvent, ...all: unknown[]) => unknown) =>
        void handlers.set(channel, listener),
      on: (channel: string, listener: (event: SenderEvent, ...all: unknown[]) => unknown) =>
        void handlers.set(channel, listener),
    },
    Menu: {
      buildFromTemplate: (template: MenuItemConstructorOptions[]) => {
        menus.push(template);
        return { items: [] };
      },
      setApplicationMenu: () => undefined,
    },
    nativeTheme: { themeSource: 'system', shouldUseDarkColors: true },
    powerMonitor: new EventEmitter(),
    protocol: {
      registerSchemesAsPrivileged: (schemes: { scheme: string }[]) =>
        void calls.push(`scheme ${schemes.map((one) => one.scheme).join()}`),
    },
    screen: {
      getAllDisplays: () => [{ id: 1, workArea: { x: 0, y: 0, width: 1920, height: 1080 } }],
      getPrimaryDisplay: () => ({ id: 1, workArea: { x: 0, y: 0, width: 1920, height: 1080 } }),
      getDisplayMatching: () => ({ id: 1 }),
    },
    session: {
      fromPartition: (name: string, given: { cache: boolean }) => {
        calls.push(`session ${name} cache ${given.cache}`);
        app.emit('session-created', session);
        return session;
      },
    },
  };

  return {
    parts: parts as unknown as ElectronParts,
    app,
    answers,
    calls,
    menus,
    messages,
    nativeTheme: parts.nativeTheme,
    powerMonitor: parts.powerMonitor,
    sent,
    ready,
    window: () => {
      const [window] = windows;
      if (window === undefined) throw new Error('no window was made');
      return window;
    },
    /** A request of the page to the host. */
    request: async (address: string, given?: RequestInit) => {
      const [handler] = served;
      if (handler === undefined) throw new Error('nothing is served');
      return handler(new Request(address, given));
    },
    /** A message of the page, as its preload script sends it. */
    fromPage: (channel: string, ...all: unknown[]) =>
      handlers.get(channel)?.({ senderFrame: { origin: 'app://local', parent: null } }, ...all),
  };
}

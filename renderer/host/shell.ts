import type { OpenFolder, ShellBridge } from '../../app/host/contract.js';

declare global {
  interface Window {
    /** Present in the Electron shell only. */
    readonly diptychShell?: ShellBridge;
  }
}

/** The bridge that the page uses, and which shell it is. */
export interface Shell extends ShellBridge {
  readonly kind: 'electron' | 'browser';
}

/**
 * The Electron shell's bridge when there is one, else the browser shell's own version: it saves by a
 * download, has no menu, and asks `chooseWithDialog` for a folder, because a page learns no paths.
 */
export function shellOf(
  host: Window,
  chooseWithDialog: () => Promise<OpenFolder | undefined>,
): Shell {
  const bridge = host.diptychShell;
  if (bridge !== undefined) {
    return {
      kind: 'electron',
      chooseFolder: () => bridge.chooseFolder(),
      openDropped: (file) => bridge.openDropped(file),
      saveFile: (name, bytes) => bridge.saveFile(name, bytes),
      onCommand: (listener) => bridge.onCommand(listener),
      onFolder: (listener) => bridge.onFolder(listener),
      reportState: (state) => bridge.reportState(state),
    };
  }
  return {
    kind: 'browser',
    chooseFolder: chooseWithDialog,
    openDropped: () => Promise.resolve(undefined),
    saveFile: (name, bytes) => Promise.resolve(download(host.document, name, bytes)),
    onCommand: () => () => {},
    onFolder: () => () => {},
    reportState: ({ title }) => {
      host.document.title = title;
    },
  };
}

/** Saves through the browser's own download; the browser asks for the place, or uses its usual folder. */
function download(page: Document, name: string, bytes: Uint8Array): boolean {
  const url = URL.createObjectURL(
    new Blob([new Uint8Array(bytes)], { type: 'application/octet-stream' }),
  );
  const link = page.createElement('a');
  link.href = url;
  link.download = name;
  link.click();
  // The download has taken its own hold of the bytes once the click's task is over.
  setTimeout(() => URL.revokeObjectURL(url), 10_000);
  return true;
}

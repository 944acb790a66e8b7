import type { OpenFolder } from '../host/contract.js';

/** Folders that come from outside the page: another start, the dock, the menu. */
export interface OutsideFolders {
  /** Hands a folder to the page, at once or as soon as it listens. */
  give(folder: OpenFolder): void;
  /** The page listens (true), or has gone (false). */
  listening(on: boolean): void;
}

/** Keeps folders back until the page can hear of them, so that none is lost while it loads. */
export function outsideFolders(send: (folder: OpenFolder) => void): OutsideFolders {
  let listens = false;
  let waiting: readonly OpenFolder[] = [];
  return {
    give: (folder) => {
      if (listens) send(folder);
      else waiting = [...waiting.filter((other) => other.grant !== folder.grant), folder];
    },
    listening: (on) => {
      listens = on;
      if (!on) return;
      const due = waiting;
      waiting = [];
      for (const folder of due) send(folder);
    },
  };
}

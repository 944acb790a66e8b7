import { join } from 'node:path';
import { createChooser } from './folders/chooser.js';
import { createGrants } from './folders/grants.js';
import { createRecents } from './folders/recents.js';
import { createHeaderCache } from './library/headerCache.js';
import { createLibrary } from './library/library.js';
import { createNotes } from './notes/notesStore.js';
import { listPageFiles } from './pageFiles.js';
import { createPresence } from './presence.js';
import type { EnsureDemonstration, Services } from './services.js';
import { createSettings } from './settings.js';
import { fileErrorReason } from './storage/fileError.js';
import type { UserFolders } from './userFolders.js';
import { programVersion } from './version.js';
import { workerFileHash } from './workerFile.js';

/** What the services are made of. */
export interface ServiceOptions {
  readonly folders: UserFolders;
  /** Folder of the built page. */
  readonly rendererDirectory: string;
  readonly ensureDemonstration: EnsureDemonstration;
  /** Where the folder chooser starts; the user's home by default. */
  readonly home?: string;
  /** Worker threads for reading headers; 0 reads in this thread. */
  readonly threads?: number;
  /** Hears of mistakes of the program itself; standard error by default. */
  readonly report?: (error: unknown) => void;
}

/** The services of one shell. Nothing is read or written but the list of the page's files. */
export function createServices(options: ServiceOptions): Services {
  const { folders } = options;
  const grants = createGrants();
  const recents = createRecents(folders.config);
  const settings = createSettings(folders.config);
  const notes = createNotes(join(folders.data, 'notes'));
  const report = options.report ?? ((error: unknown) => console.error(error));
  const cache = createHeaderCache({
    folder: join(folders.cache, 'headers'),
    reader: `${programVersion()} ${workerFileHash('index.worker')}`,
    report,
  });

  const library = createLibrary(grants, { threads: options.threads, cache });

  return {
    version: programVersion(),
    grants,
    recents: {
      ...recents,
      // What is forgotten leaves nothing behind: the cache of its headers names the patients.
      async remove(id) {
        const root = await recents.find(id);
        await recents.remove(id);
        if (root !== undefined) await cache.forget(root);
      },
      async clear() {
        await recents.clear();
        await cache.clear();
      },
    },
    settings,
    notes,
    library,
    chooser: createChooser(options.home),
    pages: listPageFiles(options.rendererDirectory),
    presence: createPresence(),
    report,
    async openFolder(path) {
      const opened = await grants.open(path);
      if (!opened.ok) return opened;
      library.warm().catch(report);
      const root = grants.find(opened.value.grant)?.root;
      try {
        const gone = root === undefined ? [] : await recents.add(root);
        // What is no longer listed could not be forgotten one by one.
        for (const path of gone) await cache.forget(path);
      } catch (error) {
        // The folder is open all the same; only the list of recent folders lacks it.
        if (fileErrorReason(error) === undefined) throw error;
        report(error);
      }
      return opened;
    },
    async openDemonstration(job) {
      const made = await options.ensureDemonstration(folders.data, job);
      return made.ok ? grants.open(made.value.folder) : made;
    },
    async settled() {
      await Promise.all([notes.settled(), settings.settled(), recents.settled(), cache.settled()]);
    },
  };
}

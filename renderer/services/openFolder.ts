import type { OpenFolder } from '../../app/host/contract.js';
import type { Result } from '../../core/result.js';
import type { HostClient, KeptNote } from '../host/client.js';
import type { PairState } from '../state/appState.js';
import { NOTHING_MARKED } from '../state/initialState.js';
import type { Store } from '../state/store.js';
import { type Candidate, candidateByOrder, candidateOfNote, studiesOf } from './choosePair.js';
import type { Jobs } from './jobs.js';
import type { FindPairs } from './proposals.js';

export interface OpenFolderOptions {
  readonly store: Store;
  readonly client: Pick<HostClient, 'index' | 'readNote'>;
  readonly jobs: Jobs;
  readonly findPairs: FindPairs;
  readonly usePair: (
    candidate: Candidate,
    chosenBy: PairState['chosenBy'],
    found: Result<KeptNote | undefined> | undefined,
  ) => Promise<void>;
  /** What was open is let go of. */
  readonly onClose: () => void;
}

/**
 * Opens a folder and what in it can be shown without asking: the pair of the kept note; else its only one or two
 * stacks; else, in one study, the best pair that is found where it is one without reservations. Otherwise the reader
 * chooses, and sees the pairs that were found.
 */
export function createOpenFolder(
  options: OpenFolderOptions,
): (folder: OpenFolder, characterSet?: string) => Promise<void> {
  const { store, client, jobs, findPairs, usePair, onClose } = options;
  const warn = (text: string): void =>
    store.change('Warn', (state) => ({ ...state, message: { tone: 'warning', text } }));
  return async (folder, characterSet) => {
    const running = await jobs.begin('Looking through the folder');
    if (running === undefined) return;
    onClose();
    store.change('Open folder', (state) => ({
      ...state,
      ...NOTHING_MARKED,
      folder,
      characterSet,
      index: undefined,
      pair: undefined,
      proposals: undefined,
      assessment: { kind: 'none' },
      note: undefined,
      dialog: undefined,
      message: undefined,
    }));
    const found = await client.index(folder.grant, jobs.progress(running), running, characterSet);
    if (running.aborted) return;
    jobs.end();
    if (!found.ok) return warn(found.refusal.text);
    const index = found.value;
    store.change('Folder read', (state) => ({ ...state, index }));
    const [study, ...others] = studiesOf(index.stacks);
    if (study === undefined) {
      store.change('Nothing to show', (state) => ({
        ...state,
        dialog: 'contents',
        message: { tone: 'warning', text: 'This folder holds no CT images that can be shown.' },
      }));
      return;
    }
    const kept = others.length === 0 ? await client.readNote(study, running) : undefined;
    if (running.aborted) return;
    const note = kept?.ok ? kept.value?.note : undefined;
    const ofNote = note === undefined ? undefined : candidateOfNote(note, index.stacks);
    if (ofNote !== undefined) return usePair(ofNote, 'note', kept);
    const byOrder = candidateByOrder(index.stacks);
    if (byOrder !== undefined) return usePair(byOrder, 'order', kept);
    const best = await findPairs(index.stacks, folder.grant);
    if (store.now().index !== index) return;
    if (others.length === 0 && best !== undefined) return usePair(best, 'order', kept);
    store.change('Choose a pair', (state) => ({ ...state, dialog: 'choosePair' }));
  };
}

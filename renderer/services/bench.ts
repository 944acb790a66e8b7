import type { OpenFolder } from '../../app/host/contract.js';
import { defaultWindow } from '../../core/intensity/index.js';
import type { Kernel, NoteRegion, RegionValues } from '../../core/note/index.js';
import { headerEvidence } from '../../core/pairing/index.js';
import { FLAGS, notMeasured, type Shape } from '../../core/region/index.js';
import type { Result } from '../../core/result.js';
import type { Stack } from '../../core/stack/index.js';
import type { HostClient, KeptNote } from '../host/client.js';
import type { PairState } from '../state/appState.js';
import { remeasured } from '../state/changes/remeasure.js';
import { showPair } from '../state/changes/view.js';
import { NOTHING_LOADED, NOTHING_MARKED } from '../state/initialState.js';
import type { Store } from '../state/store.js';
import type { PairVolumes } from '../volumes/loadPair.js';
import { createMeasureShape } from '../volumes/measureShape.js';
import type { StoredSlice } from '../volumes/volume.js';
import { type Autosave, createAutosave } from './autosave.js';
import { beginNote } from './beginNote.js';
import { changedValuesText } from './changedValuesText.js';
import {
  type Candidate,
  candidateByOrder,
  candidateOfNote,
  studiesOf,
  studyOf,
} from './choosePair.js';
import { createJobs } from './jobs.js';
import { loadVolumes } from './loadVolumes.js';
import { pairMessage } from './pairMessage.js';

export interface BenchOptions {
  readonly store: Store;
  readonly client: HostClient;
  readonly signal: AbortSignal;
  /** Present time, ISO 8601. */
  readonly now: () => string;
  readonly timeOfDay: () => string;
  readonly newId: () => string;
}

/** Opens folders and pairs, holds their pixels, measures on them, and keeps the note. */
export interface Bench {
  openFolder(folder: OpenFolder): Promise<void>;
  openDemonstration(): Promise<void>;
  /** Shows two stacks, or one alone, as the reader chose them. */
  choosePair(soft: Stack, sharp: Stack | undefined): Promise<void>;
  /** Gives up the long work that is running. */
  cancelJob(): void;
  /** Stored values of a slice; undefined until it was read. */
  stored(kernel: Kernel, index: number): StoredSlice | undefined;
  /** What a shape measures on both stacks now. */
  measure(shape: Shape): RegionValues;
  /** Measures all regions again, after slices have come or an undo. */
  remeasure(): void;
  saveNow(): void;
  readonly autosave: Autosave;
}

export function createBench(options: BenchOptions): Bench {
  const { store, client, signal, now } = options;
  let reading = new AbortController();
  let volumes: PairVolumes | undefined;

  const autosave = createAutosave({
    client,
    onState: (save) =>
      store.change('Note saved', (state) => ({
        ...state,
        save,
        message: 'text' in save ? { tone: 'warning', text: save.text } : state.message,
      })),
    timeOfDay: options.timeOfDay,
    signal,
  });
  store.watch((_name, after, before) => {
    if (after.note !== before.note && after.note !== undefined) autosave.save(after.note);
  });

  const measureShape = createMeasureShape((volume, index) => {
    const { pair, loading } = store.now();
    const kernel = volume.stack === pair?.soft ? 'soft' : 'sharp';
    return loading[kernel].gaps.has(index);
  });
  const measure = (shape: Shape): RegionValues => {
    if (volumes === undefined) return { soft: null, sharp: null };
    if (store.now().pair?.link !== 'index') return measureShape(shape, volumes);
    const { soft } = measureShape(shape, { soft: volumes.soft, sharp: undefined });
    const sharp = volumes.sharp && notMeasured(shape, FLAGS.positionsNotComparable);
    return { soft, sharp: sharp ?? null };
  };

  const remeasure = (): void => {
    const { note } = store.now();
    if (note === undefined || note.verification === 'VERIFIED') return;
    const result = remeasured(note, ({ shape }: NoteRegion) => measure(shape), now());
    if (result.note === note) return;
    const text = changedValuesText(result.changed);
    store.change('Measure', (state) => ({
      ...state,
      note: result.note,
      message: text === undefined ? state.message : { tone: 'warning', text },
    }));
  };

  const warn = (text: string): void =>
    store.change('Warn', (state) => ({ ...state, message: { tone: 'warning', text } }));

  const jobs = createJobs(store, autosave, signal);

  const usePair = async (
    candidate: Candidate,
    chosenBy: PairState['chosenBy'],
    found: Result<KeptNote | undefined> | undefined,
  ): Promise<void> => {
    const { soft, sharp } = candidate;
    const header = sharp === undefined ? undefined : headerEvidence(soft, sharp);
    if (header?.refusal !== undefined) {
      const text = `${header.refusal}. Choose another pair.`;
      store.change('Pair refused', (state) => ({
        ...state,
        dialog: 'choosePair',
        message: { tone: 'warning', text },
      }));
      return;
    }
    const grant = store.now().folder?.grant;
    if (grant === undefined) return;
    reading.abort();
    const mine = new AbortController();
    reading = mine;
    volumes = undefined;
    const pair: PairState = {
      soft,
      sharp,
      link: header?.link ?? 'position',
      evidence: header?.evidence ?? [],
      chosenBy,
    };
    const { settings, version } = store.now();
    const asked = found ?? (await client.readNote(studyOf(soft), signal));
    // While the note was on its way another pair may have been chosen.
    if (mine.signal.aborted) return;
    const kept = asked.ok ? asked.value : undefined;
    const note = beginNote(kept?.note, {
      pair,
      reader: settings.reader,
      version,
      now: now(),
      newId: options.newId,
    });
    if (asked.ok) autosave.begin(kept?.note ?? note, kept?.etag);
    else autosave.beginUnsaved(note, `Nothing is saved here. ${asked.refusal.text}`);
    store.change('Show pair', (state) => ({
      ...state,
      ...NOTHING_MARKED,
      pair,
      note,
      loading: { soft: NOTHING_LOADED, sharp: NOTHING_LOADED },
      dialog: undefined,
      message: pairMessage(pair),
    }));
    const window = defaultWindow(soft.slices[0].image);
    const sharpWindow = sharp === undefined ? window : defaultWindow(sharp.slices[0].image);
    store.change('Show the middle', showPair({ soft: window, sharp: sharpWindow }));
    const loaded = loadVolumes({
      store,
      client,
      grant,
      pair,
      onSlices: remeasure,
      signal: AbortSignal.any([mine.signal, signal]),
    });
    if (loaded.ok) volumes = loaded.value;
    else warn(loaded.refusal.text);
  };

  const openFolder = async (folder: OpenFolder): Promise<void> => {
    const running = await jobs.begin('Looking through the folder');
    if (running === undefined) return;
    reading.abort();
    volumes = undefined;
    store.change('Open folder', (state) => ({
      ...state,
      ...NOTHING_MARKED,
      folder,
      index: undefined,
      pair: undefined,
      note: undefined,
      dialog: undefined,
      message: undefined,
    }));
    const found = await client.index(folder.grant, jobs.progress(running), running);
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
    store.change('Choose a pair', (state) => ({ ...state, dialog: 'choosePair' }));
  };

  return {
    autosave,
    openFolder,
    openDemonstration: async () => {
      const running = await jobs.begin('Making the synthetic demonstration study');
      if (running === undefined) return;
      const made = await client.demonstration(jobs.progress(running), running);
      if (running.aborted) return;
      jobs.end();
      if (made.ok) await openFolder(made.value);
      else warn(made.refusal.text);
    },
    choosePair: async (soft, sharp) => {
      await autosave.settled();
      await usePair({ soft, sharp }, 'reader', undefined);
    },
    cancelJob: jobs.cancel,
    stored: (kernel, index) => volumes?.[kernel]?.slice(index),
    measure,
    remeasure,
    saveNow: () => {
      const { note, save } = store.now();
      if (save.kind === 'conflict') warn(save.text);
      else if (note !== undefined) autosave.saveNow(note);
    },
  };
}

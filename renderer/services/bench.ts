import type { OpenFolder } from '../../app/host/contract.js';
import { defaultWindow } from '../../core/intensity/index.js';
import type { Kernel, PairOverride } from '../../core/note/index.js';
import { checkSeal } from '../../core/note/life/index.js';
import type { Stack } from '../../core/stack/index.js';
import type { HostClient } from '../host/client.js';
import { KEEP_MEASURED, keepMeasured } from '../state/changes/assessment.js';
import { renewedCut } from '../state/changes/cut.js';
import { showPair } from '../state/changes/view.js';
import { NOTHING_LOADED, NOTHING_MARKED } from '../state/initialState.js';
import type { Store } from '../state/store.js';
import { type Cuts, createCuts } from '../volumes/cuts.js';
import type { PairVolumes } from '../volumes/loadPair.js';
import type { StoredSlice } from '../volumes/volume.js';
import { areShown } from './areShown.js';
import { createAssessment } from './assessment.js';
import { createAssessor } from './assessor.js';
import { type Autosave, createAutosave } from './autosave.js';
import { beginNote } from './beginNote.js';
import { studyOf } from './choosePair.js';
import { createFitting, type Fitting } from './fitting.js';
import { createJobs } from './jobs.js';
import { loadVolumes } from './loadVolumes.js';
import { asOnPlates } from './masking.js';
import { createMeasuring, type Measuring } from './measuring.js';
import { createOpenFolder } from './openFolder.js';
import { pageDigest } from './pageDigest.js';
import { createPairChanges, type UsePair } from './pairChanges.js';
import { pairMessage } from './pairMessage.js';
import { pairOf } from './pairOf.js';
import { createFindPairs } from './proposals.js';

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
export interface Bench extends Measuring {
  /** Opens a folder; with a character set, its texts are read in that one. */
  openFolder(folder: OpenFolder, characterSet?: string): Promise<void>;
  openDemonstration(): Promise<void>;
  /** Shows two stacks, or one alone, as the reader chose them, with the reasons for what the files differ in. */
  choosePair(
    soft: Stack,
    sharp: Stack | undefined,
    overrides?: readonly PairOverride[],
  ): Promise<void>;
  /** Puts soft and sharp in each other's place, as the reader asked. */
  swapPair(): Promise<void>;
  /** Leaves out what lies below all images and is not marked, or takes that back, on both stacks. */
  turnMask(): Promise<void>;
  /** Looks for pairs among the stacks of the folder, for the dialog. */
  proposePairs(signal?: AbortSignal): Promise<void>;
  /** Gives up the measuring of the pair. */
  cancelAssessment(): void;
  /** Measures the pair again. */
  assessAgain(): void;
  /** Gives up the long work that is running. */
  cancelJob(): void;
  /** Stored values of what a plate shows: a slice, or an oblique cut; undefined until it was read. */
  shown(kernel: Kernel, index: number): StoredSlice | undefined;
  /** Stored values of a slice of the pair; undefined until it was read. */
  stored(kernel: Kernel, index: number): StoredSlice | undefined;
  /** Asks for a slice that is not there, to look at it once. */
  askFor(kernel: Kernel, index: number): void;
  /** Oblique planes cut from both stacks. */
  readonly cuts: Cuts;
  /** Stents fitted on both stacks. */
  readonly fitting: Fitting;
  saveNow(): void;
  readonly autosave: Autosave;
}

const SEAL_BROKEN =
  'This note says that it is verified, but its content is not what was verified. Measure it again (Note menu), and do not rely on it.';

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
  store.watch((name, after, before) => {
    if (after.note === before.note || after.note === undefined) return;
    // Looking at a pair alone makes no note: its evidence is kept with the first mark, or where a note is kept already.
    if (name === KEEP_MEASURED && after.save.kind === 'none') return;
    autosave.save(after.note);
  });

  const cuts = createCuts(() => volumes);
  const measuring = createMeasuring(store, () => volumes, cuts, now);
  const fitting = createFitting({ store, volumes: () => volumes, cuts, now, signal });
  const remeasure = (): void => {
    store.change('Cut again', renewedCut(cuts));
    measuring.remeasure();
    fitting.refresh();
  };

  const warn = (text: string): void =>
    store.change('Warn', (state) => ({ ...state, message: { tone: 'warning', text } }));

  const jobs = createJobs(store, autosave, signal);
  const assessor = createAssessor(client);
  const findPairs = createFindPairs({ store, assessor, jobs });
  const assessment = createAssessment({
    store,
    assessor,
    now,
    onMeasured: remeasure,
    onWrongOrder: () => {
      void swap('measure');
    },
  });

  const usePair: UsePair = async (candidate, chosenBy, found, known) => {
    const { soft, sharp } = candidate;
    const made = pairOf(candidate, chosenBy);
    if (!made.ok) {
      const { text } = made.refusal;
      store.change('Pair refused', (state) => ({
        ...state,
        dialog: 'choosePair',
        message: { tone: 'warning', text },
      }));
      return;
    }
    const pair = known === undefined ? made.value : { ...made.value, evidence: known.evidence };
    const grant = store.now().folder?.grant;
    if (grant === undefined) return;
    reading.abort();
    const mine = new AbortController();
    reading = mine;
    volumes = undefined;
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
      assessment: known === undefined ? { kind: 'none' } : { kind: 'done', measured: known },
      compare: { ...state.compare, way: 'open', held: false },
      loading: { soft: NOTHING_LOADED, sharp: NOTHING_LOADED },
      dialog: undefined,
      message: pairMessage(pair),
    }));
    if (kept !== undefined && kept.note.verification === 'VERIFIED') {
      void checkSeal(kept.json, pageDigest).then((seal) => {
        if (seal === 'changed' && !mine.signal.aborted) warn(SEAL_BROKEN);
      });
    }
    const window = defaultWindow(soft.slices[0].image);
    const sharpWindow = sharp === undefined ? window : defaultWindow(sharp.slices[0].image);
    if (known !== undefined) store.change(KEEP_MEASURED, keepMeasured(known, now()));
    store.change('Show the middle', showPair({ soft: window, sharp: sharpWindow }));
    const life = AbortSignal.any([mine.signal, signal]);
    let isAssessed = known !== undefined;
    const loaded = loadVolumes({
      store,
      client,
      grant,
      pair,
      onSlices: () => {
        remeasure();
        // The first images come before anything is measured on others.
        if (isAssessed || !areShown(store.now(), volumes)) return;
        isAssessed = true;
        assessment.begin(pair, grant, life);
      },
      signal: life,
    });
    if (loaded.ok) volumes = loaded.value;
    else warn(loaded.refusal.text);
  };

  const openFolder = createOpenFolder({
    store,
    client,
    jobs,
    findPairs,
    usePair,
    onClose: () => {
      reading.abort();
      volumes = undefined;
    },
  });

  const { swap, turnMask } = createPairChanges({ store, autosave, usePair, warn });

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
    choosePair: async (soft, sharp, overrides = []) => {
      await autosave.settled();
      await usePair(asOnPlates({ soft, sharp, overrides }, store.now().pair), 'reader');
    },
    swapPair: () => swap('reader'),
    turnMask,
    proposePairs: async (given) => {
      const { index, folder } = store.now();
      if (index === undefined || folder === undefined) return;
      await findPairs(index.stacks, folder.grant, given);
    },
    cancelAssessment: assessment.cancel,
    assessAgain: () => {
      const { pair, folder } = store.now();
      if (pair === undefined || folder === undefined) return;
      assessment.begin(pair, folder.grant, AbortSignal.any([reading.signal, signal]));
    },
    cancelJob: jobs.cancel,
    shown: (kernel, index) => {
      const { cut, note } = store.now();
      if (cut === undefined) return volumes?.[kernel]?.slice(index);
      const plane = note?.planes.find(({ id }) => id === cut.planeId);
      return plane && cuts.stored(plane, kernel);
    },
    stored: (kernel, index) => volumes?.[kernel]?.slice(index),
    askFor: (kernel, index) => volumes?.[kernel]?.ask(index),
    cuts,
    fitting,
    ...measuring,
    remeasure,
    saveNow: () => {
      const { note, save } = store.now();
      if (save.kind === 'conflict') warn(save.text);
      else if (note !== undefined) autosave.saveNow(note);
    },
  };
}

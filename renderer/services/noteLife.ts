import {
  type FrameDigest,
  type Kernel,
  type MeasuredPlan,
  measuredDensities,
  measurePlan,
  type Note,
  planOf,
  slicesNeeded,
} from '../../core/note/index.js';
import {
  amendNote,
  type ChangedFrame,
  type ChangedNumber,
  changedDensities,
  changedFrames,
  changedNumbers,
  checkSeal,
  frameKey,
  pixelDigest,
  referencedFrames,
  type SealState,
  verifyNote,
} from '../../core/note/life/index.js';
import { FLAGS } from '../../core/region/index.js';
import { type Result, refuse, success } from '../../core/result.js';
import type { Stack } from '../../core/stack/index.js';
import type { HostClient } from '../host/client.js';
import { noiseOfKernel } from '../state/noiseOfKernel.js';
import { KERNELS } from '../state/selectors.js';
import type { Store } from '../state/store.js';
import type { StoredSlice } from '../volumes/volume.js';
import type { Bench } from './bench.js';
import { pageDigest } from './pageDigest.js';
import { whenStored } from './whenStored.js';

/** What a note that is measured again no longer gives; nothing where all lists are empty and the seal is not 'changed'. */
export interface Recheck {
  readonly seal: SealState;
  readonly values: readonly ChangedNumber[];
  readonly frames: readonly ChangedFrame[];
}

/** The life of the note that is shown: verified, amended, measured again. */
export interface NoteLife {
  /** Freezes the note under a name, with the pixels that its values rest on. */
  verify(by: string): Promise<Result<Note>>;
  /** Opens the verified note again; what was signed stays inside it. */
  amend(by: string, why: string): Promise<Result<Note>>;
  /** Computes every value from the images again. */
  recheck(): Promise<Result<Recheck>>;
}

export interface NoteLifeOptions {
  readonly store: Store;
  readonly client: Pick<HostClient, 'readNote'>;
  readonly bench: Pick<Bench, 'stored' | 'askFor' | 'autosave'>;
  /** Present time, ISO 8601. */
  readonly now: () => string;
  readonly signal: AbortSignal;
}

export function createNoteLife({ store, client, bench, now, signal }: NoteLifeOptions): NoteLife {
  /** Stored values of every slice that the note's regions lie on. */
  const readSlices = async (note: Note): Promise<ReadonlyMap<Stack, Slices>> => {
    const read = new Map<Stack, Slices>();
    const { pair } = store.now();
    if (pair === undefined) return read;
    for (const kernel of KERNELS) {
      const stack = pair[kernel];
      if (stack === undefined) continue;
      const slices = new Map<number, StoredSlice>();
      for (const index of slicesNeeded(planOf(note), stack, pair)) {
        const stored = await whenStored(store, bench, kernel, index, signal);
        if (stored !== undefined) slices.set(index, stored);
      }
      read.set(stack, slices);
    }
    return read;
  };

  const measured = (note: Note, read: ReadonlyMap<Stack, Slices>): Result<MeasuredPlan> => {
    const { pair } = store.now();
    if (pair === undefined) return refuse('no-pair', 'No pair is shown.');
    const noise = (kernel: Kernel) => noiseOfKernel(store.now(), kernel);
    return measurePlan(
      planOf(note),
      pair.soft,
      pair.sharp,
      (stack, index) => read.get(stack)?.get(index),
      pair.link === 'index' ? FLAGS.positionsNotComparable : undefined,
      { soft: noise('soft'), sharp: noise('sharp') },
    );
  };

  const densitiesOf = (note: Note, read: ReadonlyMap<Stack, Slices>): Note['densities'] => {
    const { pair } = store.now();
    if (pair === undefined) return [];
    const storedOf = (index: number) => read.get(pair.soft)?.get(index);
    const noise = noiseOfKernel(store.now(), 'soft');
    return measuredDensities(note, { soft: pair.soft, storedOf, noise });
  };

  /** The note as it stands in its file, once everything is written. */
  const asStored = async (note: Note): Promise<Result<unknown>> => {
    await bench.autosave.settled();
    const kept = await client.readNote(note.study.studyInstanceUid, signal);
    if (!kept.ok) return kept;
    return kept.value === undefined
      ? refuse('no-note', 'The note is not stored. Save it first.')
      : success(kept.value.json);
  };

  const present = (): Result<Note> => {
    const { note } = store.now();
    return note === undefined ? refuse('no-note', 'There is no note.') : success(note);
  };

  const putDown = (name: string, note: Note): void =>
    // What was done before can't be undone through a signature.
    store.change(name, (state) => ({ ...state, note, history: { undo: [], redo: [] } }));

  return {
    verify: async (by) => {
      const begun = present();
      if (!begun.ok) return begun;
      const read = await readSlices(begun.value);
      const note = present();
      if (!note.ok) return note;
      if (note.value !== begun.value) {
        return refuse('note-changed', 'The note changed meanwhile. Look at it, and verify again.');
      }
      const frames = await digestsOf(note.value, read);
      if (!frames.ok) return frames;
      const sealed = await verifyNote(
        { ...note.value, frames: frames.value },
        { by, at: now() },
        pageDigest,
      );
      if (sealed.ok) putDown('Verify note', sealed.value);
      return sealed;
    },
    amend: async (by, why) => {
      const note = present();
      if (!note.ok) return note;
      const stored = await asStored(note.value);
      if (!stored.ok) return stored;
      if ((await checkSeal(stored.value, pageDigest)) !== 'intact' || !isObject(stored.value)) {
        return refuse(
          'seal-changed',
          'The stored note is not what was verified, so it is left as it is. Measure it again and keep a copy of its file.',
        );
      }
      const amended = amendNote(note.value, stored.value, { by, at: now(), why });
      if (amended.ok) putDown('Amend note', amended.value);
      return amended;
    },
    recheck: async () => {
      const note = present();
      if (!note.ok) return note;
      const read = await readSlices(note.value);
      const fresh = measured(note.value, read);
      if (!fresh.ok) return fresh;
      const found = new Map<string, string>();
      for (const [stack, slices] of read) {
        for (const [index, stored] of slices) {
          const key = keyOf(stack, index);
          if (key !== undefined) found.set(key, await pixelDigest(stored, pageDigest));
        }
      }
      const stored = await asStored(note.value);
      return success({
        seal: stored.ok ? await checkSeal(stored.value, pageDigest) : 'not sealed',
        values: [
          ...changedNumbers(note.value, fresh.value),
          ...changedDensities(note.value, densitiesOf(note.value, read)),
        ],
        frames: changedFrames(note.value.frames, found),
      });
    },
  };
}

type Slices = ReadonlyMap<number, StoredSlice>;

/** Digest of every frame that a value rests on; refused where one can't be read: nothing unseen is signed. */
async function digestsOf(
  note: Note,
  read: ReadonlyMap<Stack, Slices>,
): Promise<Result<readonly FrameDigest[]>> {
  const byKey = new Map<string, StoredSlice>();
  for (const [stack, slices] of read) {
    for (const [index, stored] of slices) {
      const key = keyOf(stack, index);
      if (key !== undefined) byKey.set(key, stored);
    }
  }
  const digests: FrameDigest[] = [];
  for (const frame of referencedFrames(note)) {
    const stored = byKey.get(frameKey(frame));
    if (stored === undefined) {
      return refuse(
        'frame-missing',
        `Image ${frame.sopInstanceUid}, on which a value rests, can’t be read now. The note was not verified.`,
      );
    }
    digests.push({ ...frame, sha256: await pixelDigest(stored, pageDigest) });
  }
  return success(digests);
}

function keyOf(stack: Stack, index: number): string | undefined {
  const image = stack.slices[index]?.image;
  if (image === undefined) return undefined;
  const { sopInstanceUid, frame } = image;
  return frameKey({ sopInstanceUid, frameNumber: frame === undefined ? null : frame + 1 });
}

function isObject(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

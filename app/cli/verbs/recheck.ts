import { resolve } from 'node:path';
import {
  measuredDensities,
  type Note,
  parseNote,
  planOf,
  readJson,
  selectStack,
} from '../../../core/note/index.js';
import {
  type ChangedFrame,
  type ChangedNumber,
  changedDensities,
  changedFrames,
  changedNumbers,
  checkSeal,
  frameKey,
  pixelDigest,
  type SealState,
} from '../../../core/note/life/index.js';
import { success } from '../../../core/result.js';
import type { Stack } from '../../../core/stack/index.js';
import { type IndexedFolder, indexFolder } from '../../host/library/indexFolder.js';
import { type MeasuredStudy, measureStudy } from '../measureStudy.js';
import { nodeDigest } from '../nodeDigest.js';
import { readTextFile } from '../readTextFile.js';
import { recheckText } from '../recheckText.js';
import type { Verb } from '../verb.js';

/** What `recheck` finds; all lists are empty and the seal is not 'changed' when the note still holds. */
export interface RecheckDocument {
  readonly holds: boolean;
  readonly seal: SealState;
  readonly values: readonly ChangedNumber[];
  readonly frames: readonly ChangedFrame[];
  /** Stacks of the note that the folder does not have; nothing is measured again then. */
  readonly missing: readonly { readonly seriesInstanceUid: string; readonly text: string }[];
}

/** `recheck NOTE --in DIR`: measures a note again, and names what no longer holds. */
export const recheckVerb: Verb = {
  name: 'recheck',
  operands: ['NOTE'],
  options: [
    { name: 'in', value: 'DIR', required: true, help: 'folder with the images of the study' },
  ],
  summary: 'Measure a reading note again and list what no longer holds',
  details: `Every value is computed from the images again. Listed with both values is what differs, and by name the images
that are missing or whose pixels changed since the note was verified. Exit code 1 when something no longer holds.`,
  async run({ operands: [path = ''], values }, context) {
    const text = await readTextFile(resolve(context.cwd, path));
    if (!text.ok) return text;
    const json = readJson(text.value);
    if (!json.ok) return json;
    const note = parseNote(json.value);
    if (!note.ok) return note;
    const folder = await indexFolder(resolve(context.cwd, values.in ?? ''), context.job);
    if (!folder.ok) return folder;
    const seal = await checkSeal(json.value, nodeDigest);
    const { soft, sharp, missing } = stacksOf(note.value, folder.value);
    if (soft === undefined || missing.length > 0) {
      const frames = changedFrames(note.value.frames, new Map());
      return outcome({ holds: false, seal, values: [], frames, missing });
    }
    const study = await measureStudy(planOf(note.value), folder.value, { soft, sharp }, context);
    if (!study.ok) return study;
    const { measured, noise, read } = study.value;
    const densities = measuredDensities(note.value, {
      soft,
      storedOf: (index) => read.get(soft)?.stored.get(index),
      noise: noise.soft,
    });
    const differing = [
      ...changedNumbers(note.value, measured),
      ...changedDensities(note.value, densities),
    ];
    const frames = changedFrames(note.value.frames, await digestsOf(study.value));
    const holds = differing.length === 0 && frames.length === 0 && seal !== 'changed';
    return outcome({ holds, seal, values: differing, frames, missing });
  },
};

function outcome(document: RecheckDocument) {
  return success({
    document,
    text: recheckText(document),
    exitCode: document.holds ? (0 as const) : (1 as const),
  });
}

interface StacksOfNote {
  readonly soft: Stack | undefined;
  readonly sharp: Stack | undefined;
  readonly missing: RecheckDocument['missing'];
}

function stacksOf({ pair }: Note, { stacks }: IndexedFolder): StacksOfNote {
  const missing: { seriesInstanceUid: string; text: string }[] = [];
  const one = (reference: Note['pair']['soft'] | null): Stack | undefined => {
    if (reference === null) return undefined;
    const found = selectStack(reference, stacks);
    if (found.ok) return found.value;
    const { seriesInstanceUid } = reference;
    missing.push({ seriesInstanceUid, text: found.refusal.text });
    return undefined;
  };
  return { soft: one(pair.soft), sharp: one(pair.sharp), missing };
}

async function digestsOf({ read }: MeasuredStudy): Promise<ReadonlyMap<string, string>> {
  const digests = new Map<string, string>();
  for (const [stack, { stored }] of read) {
    for (const [index, pixels] of stored) {
      const image = stack.slices[index]?.image;
      if (image === undefined) continue;
      const { sopInstanceUid, frame } = image;
      const frameNumber = frame === undefined ? null : frame + 1;
      digests.set(frameKey({ sopInstanceUid, frameNumber }), await pixelDigest(pixels, nodeDigest));
    }
  }
  return digests;
}

import { createHash } from 'node:crypto';
import { mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { run } from '../../../../app/cli/run.js';
import type { RecheckDocument } from '../../../../app/cli/verbs/recheck.js';
import { decodeImage } from '../../../../core/dicom/index.js';
import type { Note } from '../../../../core/note/index.js';
import {
  type Digest,
  pixelDigest,
  referencedFrames,
  verifyNote,
} from '../../../../core/note/life/index.js';
import { pairFiles } from '../../core/note/noteFixture.js';
import { richNote } from '../../core/note/richNote.js';

const digest: Digest = async (bytes) => createHash('sha256').update(bytes).digest('hex');

let folder = '';

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'recheck-'));
  mkdirSync(join(folder, 'study'));
  pairFiles().forEach((bytes, index) => {
    writeFileSync(join(folder, 'study', `i${index}`), bytes);
  });
});

afterEach(() => rmSync(folder, { recursive: true }));

async function recheck(note: unknown): Promise<{ code: number; document: RecheckDocument }> {
  writeFileSync(join(folder, 'note.json'), JSON.stringify(note));
  const out: string[] = [];
  const code = await run(['recheck', 'note.json', '--in', 'study', '--json'], {
    out: (text) => out.push(text),
    err: () => undefined,
    cwd: folder,
    signal: new AbortController().signal,
    watched: false,
    threads: 0,
  });
  return { code, document: JSON.parse(out.join('')) as RecheckDocument };
}

/** The rich note, verified with the digests of the frames that it rests on. */
async function verified(note = richNote()): Promise<Note> {
  const digests = new Map<string, string>();
  for (const bytes of pairFiles()) {
    const decoded = await decodeImage(bytes);
    if (!decoded.ok) throw new Error(decoded.refusal.text);
    const { image, stored } = decoded.value;
    digests.set(image.sopInstanceUid, await pixelDigest(stored, digest));
  }
  const frames = referencedFrames(note).map((frame) => ({
    ...frame,
    sha256: digests.get(frame.sopInstanceUid) ?? '',
  }));
  const signed = { by: 'R. Example', at: '2026-01-11T09:00:00.000Z' };
  const result = await verifyNote({ ...note, frames }, signed, digest);
  if (!result.ok) throw new Error(result.refusal.text);
  return result.value;
}

/** Puts another value into the pixel at row 9, column 8 of the image that a value was measured on. */
function changePixelOf(sopInstanceUid: string): void {
  pairFiles().forEach((bytes, index) => {
    if (!Buffer.from(bytes).includes(sopInstanceUid)) return;
    const path = join(folder, 'study', `i${index}`);
    const file = readFileSync(path);
    const at = file.length - 20 * 30 * 2 + (9 * 30 + 8) * 2;
    file.writeUInt16LE(file.readUInt16LE(at) + 7, at);
    writeFileSync(path, file);
  });
}

describe('recheck', () => {
  it('reports nothing of a verified note whose images are as they were', async () => {
    const { code, document } = await recheck(await verified());
    expect(document).toEqual({
      holds: true,
      seal: 'intact',
      values: [],
      frames: [],
      missing: [],
    });
    expect(code).toBe(0);
  });

  it('names the slice and the values, old and new, after one pixel of it changed', async () => {
    const note = await verified();
    const lumen = note.regions[0];
    const uid = lumen?.soft?.sopInstanceUid ?? '';
    changePixelOf(uid);
    const { code, document } = await recheck(note);
    expect(code).toBe(1);
    expect(document.frames).toEqual([{ sopInstanceUid: uid, frameNumber: null, state: 'changed' }]);
    const mean = document.values.find(({ id, quantity }) => id === 'L1' && quantity === 'meanHu');
    expect(mean).toMatchObject({ kernel: 'soft', sopInstanceUid: uid });
    expect(mean?.before).toBe(lumen?.soft?.meanHu);
    // One of n pixels is 7 higher.
    expect(mean?.now).toBeCloseTo((lumen?.soft?.meanHu ?? 0) + 7 / (lumen?.soft?.n ?? 1), 9);
    expect(document.values.every(({ kernel }) => kernel === 'soft')).toBe(true);
  });

  it('names an image that is missing, and the values that rested on it', async () => {
    const note = await verified();
    const uid = note.regions[0]?.sharp?.sopInstanceUid ?? '';
    pairFiles().forEach((bytes, index) => {
      if (Buffer.from(bytes).includes(uid)) rmSync(join(folder, 'study', `i${index}`));
    });
    const { code, document } = await recheck(note);
    expect(code).toBe(1);
    expect(document.frames).toEqual([{ sopInstanceUid: uid, frameNumber: null, state: 'missing' }]);
    expect(document.values.some(({ id, now }) => id === 'L1' && now === null)).toBe(true);
  });

  it('names a series that is missing, and every frame of the note with it', async () => {
    const note = await verified();
    rmSync(join(folder, 'study'), { recursive: true });
    mkdirSync(join(folder, 'study'));
    const { code, document } = await recheck(note);
    expect(code).toBe(1);
    expect(document.missing).toHaveLength(2);
    expect(document.frames.map(({ state }) => state)).toEqual(note.frames.map(() => 'missing'));
  });

  it('sees a number of a verified note that was edited by hand, and gives the true one', async () => {
    const note = await verified();
    const edited = {
      ...note,
      regions: note.regions.map((region) =>
        region.id === 'L1' && region.soft !== null
          ? { ...region, soft: { ...region.soft, meanHu: 12 } }
          : region,
      ),
    };
    const { code, document } = await recheck(edited);
    expect([code, document.seal]).toEqual([1, 'changed']);
    expect(document.values).toEqual([
      expect.objectContaining({ id: 'L1', quantity: 'meanHu', before: 12 }),
    ]);
  });

  it('measures an unverified note too', async () => {
    const { code, document } = await recheck(richNote());
    expect(document.seal).toBe('not sealed');
    expect(document.values).toEqual([]);
    expect(code).toBe(0);
  });
});

describe('recheck of plaque density', () => {
  it('names the band whose count no longer holds', async () => {
    const note = richNote();
    const plaque = note.regions.find(({ role }) => role === 'plaque');
    const n = plaque?.soft?.n ?? 0;
    const density = {
      regionId: plaque?.id ?? '',
      table: 'six-classes',
      n,
      pixels: [1, n - 1, 0, 0, 0, 0],
      unassigned: 0,
      pixelAreaMm2: 0.125,
      flags: [],
    };
    const { code, document } = await recheck({ ...note, densities: [density] });
    expect(code).toBe(1);
    // The fixture’s soft values are 100 + column: all of them fibro-fatty.
    expect(document.values).toEqual([
      expect.objectContaining({
        id: plaque?.id,
        quantity: 'pixels of low attenuation',
        before: 1,
        now: 0,
      }),
      expect.objectContaining({
        id: plaque?.id,
        quantity: 'pixels of fibro-fatty',
        before: n - 1,
        now: n,
      }),
    ]);
  });
});

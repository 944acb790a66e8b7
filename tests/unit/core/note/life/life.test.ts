import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { type Note, parseNote } from '../../../../../core/note/index.js';
import {
  amendmentText,
  amendNote,
  canonicalJson,
  checkSeal,
  type Digest,
  setCompletion,
  verifyNote,
} from '../../../../../core/note/life/index.js';
import { richNote } from '../richNote.js';

const digest: Digest = async (bytes) => createHash('sha256').update(bytes).digest('hex');
const SIGNED = { by: 'R. Example', at: '2026-01-11T09:00:00.000Z' };
const AMENDED = { by: 'S. Sample', at: '2026-01-12T09:00:00.000Z', why: 'nominal size was wrong' };

async function verified(note: Note = richNote()): Promise<Note> {
  const result = await verifyNote(note, SIGNED, digest);
  if (!result.ok) throw new Error(result.refusal.text);
  return result.value;
}

const asJson = (note: Note): Record<string, unknown> =>
  JSON.parse(JSON.stringify(note)) as Record<string, unknown>;

describe('Verifying a note', () => {
  it('freezes it with name, time and the SHA-256 over its canonical JSON', async () => {
    const note = await verified();
    expect(note.verification).toBe('VERIFIED');
    const { sha256, ...open } = note.seal ?? { sha256: '' };
    expect(open).toEqual(SIGNED);
    // The hash is one that anybody can make again without this program.
    const text = canonicalJson({ ...note, seal: open });
    expect(sha256).toBe(createHash('sha256').update(text, 'utf8').digest('hex'));
    expect(await checkSeal(asJson(note), digest)).toBe('intact');
  });

  it('is refused without a name, and a second time', async () => {
    expect(await verifyNote(richNote(), { by: '  ', at: SIGNED.at }, digest)).toMatchObject({
      refusal: { code: 'no-name' },
    });
    expect(await verifyNote(await verified(), SIGNED, digest)).toMatchObject({
      refusal: { code: 'already-verified' },
    });
    expect(setCompletion(await verified(), 'COMPLETE', SIGNED.at)).toMatchObject({
      refusal: { code: 'verified' },
    });
  });

  it('lets every changed value be seen, whichever it is', async () => {
    const json = asJson(await verified());
    let changed = 0;
    for (const path of leaves(json)) {
      const copy = asJson(json as unknown as Note);
      alter(copy, path);
      expect(await checkSeal(copy, digest), path.join('.')).toBe('changed');
      changed += 1;
    }
    expect(changed).toBeGreaterThan(100);
  });

  it('covers fields that this version does not know, and the order of keys means nothing', async () => {
    const json = asJson(await verified());
    expect(await checkSeal({ ...json, later: 1 }, digest)).toBe('changed');
    expect(await checkSeal(Object.fromEntries(Object.entries(json).reverse()), digest)).toBe(
      'intact',
    );
    expect(await checkSeal({ ...json, seal: null }, digest)).toBe('changed');
    expect(await checkSeal(asJson(richNote()), digest)).toBe('not sealed');
  });
});

describe('Amending a verified note', () => {
  it('keeps what was there, with who, when and why, and its seal can still be checked', async () => {
    const note = await verified();
    const amended = amendNote(note, asJson(note), AMENDED);
    if (!amended.ok) throw new Error(amended.refusal.text);
    expect(amended.value.verification).toBe('UNVERIFIED');
    expect(amended.value.seal).toBeNull();
    expect(amended.value.amendments).toHaveLength(1);
    const [{ before, ...who } = { before: {} }] = amended.value.amendments;
    expect(who).toEqual(AMENDED);
    expect(await checkSeal({ ...before, amendments: [] }, digest)).toBe('intact');
    expect(parseNote(JSON.parse(JSON.stringify(amended.value))).ok).toBe(true);
  });

  it('says what is otherwise since', async () => {
    const note = await verified();
    const amended = amendNote(note, asJson(note), AMENDED);
    if (!amended.ok) throw new Error(amended.refusal.text);
    const [amendment] = amended.value.amendments;
    if (amendment === undefined) throw new Error('no amendment');
    expect(amendmentText(amendment, amended.value)).toEqual([]);
    const later: Note = { ...amended.value, comment: 'seen again', regions: [] };
    const text = amendmentText(amendment, later);
    expect(text.filter((line) => line.startsWith('Removed: '))).toHaveLength(note.regions.length);
    expect(text).toContain('The comment was changed.');
  });

  it('is refused without a reason, without a name, and where nothing is verified', async () => {
    const note = await verified();
    const code = (change: Partial<typeof AMENDED>, of = note) => {
      const result = amendNote(of, asJson(of), { ...AMENDED, ...change });
      return result.ok ? 'amended' : result.refusal.code;
    };
    expect(code({ why: ' ' })).toBe('no-reason');
    expect(code({ by: '' })).toBe('no-name');
    expect(code({}, richNote())).toBe('not-verified');
  });
});

type Path = readonly (string | number)[];

function leaves(value: unknown, path: Path = []): readonly Path[] {
  if (typeof value !== 'object' || value === null) return [path];
  return Object.entries(value).flatMap(([key, member]) => leaves(member, [...path, key]));
}

function alter(root: unknown, path: Path): void {
  const [last] = path.slice(-1);
  let at = root as Record<string | number, unknown>;
  for (const key of path.slice(0, -1)) at = at[key] as Record<string | number, unknown>;
  if (last === undefined) throw new Error('no path');
  const old = at[last];
  at[last] = typeof old === 'number' ? old + 1e-9 : typeof old === 'boolean' ? !old : `${old}.`;
}

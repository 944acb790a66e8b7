import { execFileSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import { mkdir, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { createHeaderCache } from '../../../../../app/host/library/headerCache.js';
import { indexFolder } from '../../../../../app/host/library/indexFolder.js';
import { CHARACTER_SET_CHOICES } from '../../../../../core/dicom/index.js';
import { ctSlice } from '../../../../corpus/ctSlice.js';
import { change } from '../../../../corpus/element.js';
import { enhancedCt } from '../../../../corpus/enhancedCt.js';
import { hostForTest } from '../hostForTest.js';
import { temporaryFolder } from '../temporaryFolder.js';

const PYTHON = '/usr/bin/python3';

/** 王^小东 in GBK (PS3.5 annex J), in a file that says ISO_IR 100. */
const GBK_NAME = Uint8Array.of(0xcd, 0xf5, 0x5e, 0xd0, 0xa1, 0xb6, 0xab);

const mislabelled = (name: Uint8Array): Uint8Array =>
  ctSlice({
    change: change(
      { tag: 0x00080005, vr: 'CS', value: 'ISO_IR 100' },
      { tag: 0x00100010, vr: 'PN', value: name },
    ),
  });

async function folderOf(files: Readonly<Record<string, Uint8Array>>): Promise<string> {
  const folder = join(await temporaryFolder(), 'study');
  await mkdir(folder);
  for (const [name, bytes] of Object.entries(files)) await writeFile(join(folder, name), bytes);
  return folder;
}

async function imageRead(folder: string, characterSet?: string) {
  const index = await indexFolder(folder, { threads: 0, characterSet });
  if (!index.ok) throw new Error(index.refusal.text);
  const [stack] = index.value.stacks;
  if (stack === undefined) throw new Error('no stack');
  return { stack, image: stack.slices[0].image };
}

describe('Texts that the reader has read in another character set (AWKWARD row 41)', () => {
  test('are read in it whatever the file states, and the stack says so', async () => {
    const folder = await folderOf({ a: mislabelled(GBK_NAME) });
    const stated = await imageRead(folder);
    expect(stated.image.identity.patientName).toBe('Íõ^Ð¡¶«');
    expect(stated.stack.findings).toEqual([]);
    const chosen = await imageRead(folder, 'GBK');
    expect(chosen.image.identity.patientName).toBe('王^小东');
    expect(chosen.stack.findings).toEqual([
      {
        code: 'character-set-chosen',
        text: 'Texts were read in the character set “GBK”, as the reader chose; the file states “ISO_IR 100”.',
      },
    ]);
  });

  test.each(CHARACTER_SET_CHOICES.map(({ stated, title }) => [title, stated]))(
    'leave numbers, positions and identifiers as they are: %s',
    async (_title, set) => {
      const folder = await folderOf({ a: mislabelled(GBK_NAME) });
      const [stated, chosen] = [await imageRead(folder), await imageRead(folder, set)];
      const { identity: _a, findings: _b, ...rest } = stated.image;
      expect(chosen.image).toMatchObject(rest);
      expect(chosen.image.identity.patientId).toBe(stated.image.identity.patientId);
      expect(chosen.image.findings.map(({ code }) => code)).toContain('character-set-chosen');
      expect(chosen.image.findings.map(({ code }) => code)).not.toContain('character-set-unknown');
    },
  );

  test('are read in it in the frames of a multi-frame image too', async () => {
    const folder = await folderOf({
      a: enhancedCt({ frames: [{ z: 0 }, { z: 1 }] }),
    });
    const { stack } = await imageRead(folder, 'ISO_IR 192');
    expect(stack.slices).toHaveLength(2);
    expect(stack.findings.filter(({ code }) => code === 'character-set-chosen')).toHaveLength(1);
  });

  test('are neither taken from the cache of headers nor put into it', async () => {
    const folder = await folderOf({ a: mislabelled(GBK_NAME) });
    const cache = createHeaderCache({
      folder: join(folder, '..', 'cache'),
      reader: 'r',
      report: (error) => {
        throw error;
      },
    });
    const read = async (characterSet?: string) => {
      const now = () => Date.now() + 10_000;
      const index = await indexFolder(folder, { threads: 0, cache, now, characterSet });
      await cache.settled();
      if (!index.ok) throw new Error(index.refusal.text);
      return index.value.stacks[0]?.slices[0].image.identity.patientName;
    };
    expect([await read(), await read('GBK'), await read()]).toEqual([
      'Íõ^Ð¡¶«',
      '王^小东',
      'Íõ^Ð¡¶«',
    ]);
  });

  test('can be asked of the host in the sets that are offered, and in no other', async () => {
    const { services, ask, reported } = await hostForTest();
    const opened = await services.openFolder(await folderOf({ a: mislabelled(GBK_NAME) }));
    if (!opened.ok) throw new Error(opened.refusal.text);
    const at = (set: string) =>
      ask(`/api/folders/${opened.value.grant}/index?characterSet=${encodeURIComponent(set)}`);
    expect(await (await at('GBK')).text()).toContain('王^小东');
    const other = await at('KOI8-R');
    expect(other.status).toBe(400);
    expect(await other.json()).toMatchObject({ code: 'no-such-character-set' });
    expect(reported).toEqual([]);
  });

  test.skipIf(!existsSync(PYTHON))('are the texts that pydicom reads in the same set', async () => {
    const names: readonly (readonly [string, Uint8Array])[] = [
      ['GBK', GBK_NAME],
      ['GB18030', GBK_NAME],
      ['ISO_IR 192', new TextEncoder().encode('Müller^Jörg')],
      ['ISO_IR 144', Uint8Array.of(0xbb, 0xee, 0xda, 0x63, 0xd5, 0xd1, 0xd8, 0xd9)],
      ['ISO_IR 126', Uint8Array.of(0xc4, 0xe9, 0xef, 0xed, 0xf5, 0xf3, 0xe9, 0xef, 0xf2)],
      ['ISO_IR 101', Uint8Array.of(0x57, 0xb3, 0x6f, 0x64, 0x65, 0x6b)],
    ];
    for (const [set, bytes] of names) {
      const folder = await folderOf({ a: mislabelled(bytes) });
      const script = [
        'import sys, json, pydicom',
        'from pydicom.charset import convert_encodings, decode_bytes',
        "raw = pydicom.dcmread(sys.argv[1]).get_item('PatientName').value",
        'print(json.dumps(decode_bytes(raw, convert_encodings([sys.argv[2]]), set()).strip()))',
      ].join('\n');
      const expected = JSON.parse(
        execFileSync(PYTHON, ['-c', script, join(folder, 'a'), set], { encoding: 'utf8' }),
      );
      expect((await imageRead(folder, set)).image.identity.patientName).toBe(expected);
    }
  });
});

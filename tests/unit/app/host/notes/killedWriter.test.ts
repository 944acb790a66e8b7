import { fork } from 'node:child_process';
import { mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { build } from 'vite';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createNotes } from '../../../../../app/host/notes/notesStore.js';
import { parseNote } from '../../../../../core/note/index.js';
import { sampleNote } from '../sampleNote.js';

/** A sample in every run; `npm run evidence -- kills` asks for more. */
const KILLS = Number(process.env.DIPTYCH_KILLS ?? 60);
/** Processes at a time, each with a folder of its own. */
const LANES = 4;
/** A version is stored in a few milliseconds: the kill falls anywhere in the first few of them. */
const LONGEST_LIFE_MS = 12;

let folder = '';

beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), 'killed-'));
  await build({
    configFile: false,
    logLevel: 'silent',
    build: {
      ssr: join(import.meta.dirname, 'writeForEver.ts'),
      outDir: join(folder, 'built'),
      rolldownOptions: { output: { entryFileNames: 'writer.mjs' } },
    },
    ssr: { noExternal: true },
  });
});

afterAll(() => rmSync(folder, { recursive: true }));

/** Starts a writer, kills it some time after it has stored its first version, and gives the last one it told of. */
function writeAndKill(notes: string, first: number, lifeMs: number): Promise<number> {
  return new Promise((resolve, reject) => {
    const writer = fork(join(folder, 'built', 'writer.mjs'), [notes, String(first)], {
      stdio: ['ignore', 'ignore', 'inherit', 'ipc'],
      execArgv: [],
    });
    let last = -1;
    writer.on('message', (version) => {
      if (last < 0) setTimeout(() => writer.kill('SIGKILL'), lifeMs);
      last = Number(version);
    });
    writer.on('exit', (code, signal) => {
      if (signal === 'SIGKILL') resolve(last);
      else reject(new Error(`the writer ended by itself: ${code}`));
    });
  });
}

describe('A note whose writer is killed at any moment', () => {
  it(`is the last one or the one before, and never broken, in ${KILLS} kills`, async () => {
    const note = sampleNote();
    const key = { reader: note.reader, studyInstanceUid: note.study.studyInstanceUid };
    let inFlight = 0;
    const lane = async (number: number): Promise<number> => {
      const place = join(folder, `notes${number}`);
      let kills = 0;
      let next = 0;
      for (; kills < KILLS / LANES; kills += 1) {
        // Lives of all lengths, evenly spread: the golden section never repeats a moment.
        const lifeMs = LONGEST_LIFE_MS * ((kills * 0.6180339887) % 1);
        const told = await writeAndKill(place, next, lifeMs);
        const stored = await createNotes(place).read(key);
        if (!stored.ok) throw new Error(`kill ${kills}: ${stored.refusal.text}`);
        const version = Number(stored.value.note.comment.split(' ')[0]);
        // What the writer told of is stored; the one that it was about to store may be there already.
        expect([told, told + 1]).toContain(version);
        if (version === told + 1) inFlight += 1;
        next = version + 1;
      }
      expectEarlierOnesWhole(place);
      return kills;
    };
    const kills = await Promise.all(Array.from({ length: LANES }, (_, number) => lane(number)));
    expect(kills.reduce((sum, count) => sum + count, 0)).toBe(KILLS);
    console.info(`${KILLS} kills, none lost; ${inFlight} came after the rename, before the answer`);
  }, 600_000);
});

function expectEarlierOnesWhole(place: string): void {
  for (const name of readdirSync(place, { recursive: true, encoding: 'utf8' })) {
    if (!name.endsWith('.json')) continue;
    const parsed = parseNote(JSON.parse(readFileSync(join(place, name), 'utf8')));
    expect(parsed.ok, name).toBe(true);
  }
}

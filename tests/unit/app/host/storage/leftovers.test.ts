import { mkdtempSync, readdirSync, rmSync, utimesSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { expect, it } from 'vitest';
import { removeLeftovers } from '../../../../../app/host/storage/leftovers.js';

it('removes what killed writers left, and nothing that is new or has another name', async () => {
  const folder = mkdtempSync(join(tmpdir(), 'leftovers-'));
  const files = {
    'note.json': 0,
    'note.json.0123456789ab.tmp': 0,
    'note.json.ba9876543210.tmp': 90,
  };
  for (const [name, at] of Object.entries({ ...files, 'mine.tmp': 0 })) {
    writeFileSync(join(folder, name), '{}');
    utimesSync(join(folder, name), at, at);
  }
  await removeLeftovers(folder, 100_000);
  expect(readdirSync(folder).sort()).toEqual([
    'mine.tmp',
    'note.json',
    'note.json.ba9876543210.tmp',
  ]);
  rmSync(folder, { recursive: true });
});

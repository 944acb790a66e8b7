import { describe, expect, it } from 'vitest';
import { crashPolicy } from '../../../../app/electron/crash.js';
import { outsideFolders } from '../../../../app/electron/outsideFolders.js';

describe('crashPolicy', () => {
  it('reloads after a crash, and does nothing after a clean end', () => {
    const decide = crashPolicy();
    expect(decide('clean-exit', 0)).toBe('nothing');
    expect(decide('crashed', 1)).toBe('reload');
    expect(decide('oom', 2)).toBe('reload');
  });

  it('gives up at the fourth end within a minute', () => {
    const decide = crashPolicy();
    expect([0, 10_000, 20_000, 59_999].map((ms) => decide('crashed', ms))).toEqual([
      'reload',
      'reload',
      'reload',
      'give-up',
    ]);
  });

  it('forgets ends that are a minute old', () => {
    const decide = crashPolicy();
    expect([0, 10_000, 20_000, 60_000].map((ms) => decide('crashed', ms))).toEqual([
      'reload',
      'reload',
      'reload',
      'reload',
    ]);
  });
});

describe('outsideFolders', () => {
  it('keeps folders back while the page does not listen, each once and in order', () => {
    const sent: string[] = [];
    const outside = outsideFolders((folder) => sent.push(folder.name));
    outside.give({ grant: '1', name: 'a' });
    outside.give({ grant: '2', name: 'b' });
    outside.give({ grant: '1', name: 'a' });
    expect(sent).toEqual([]);
    outside.listening(true);
    outside.listening(true);
    outside.give({ grant: '3', name: 'c' });
    outside.listening(false);
    outside.give({ grant: '4', name: 'd' });
    expect(sent).toEqual(['b', 'a', 'c']);
    outside.listening(true);
    expect(sent).toEqual(['b', 'a', 'c', 'd']);
  });
});

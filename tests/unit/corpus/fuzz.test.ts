import { describe, expect, it } from 'vitest';
import { nodeCodecs } from '../../../app/host/codecs/nodeCodecs.js';
import { corpusFiles, fuzz, fuzzInWords } from '../../corpus/fuzz/fuzz.js';
import { outcomeOf } from '../../corpus/fuzz/outcome.js';

describe('damaged files of the corpus', () => {
  it('are read, skipped or refused, and nothing else, in bounded time and memory', async () => {
    const report = await fuzz(20_000, 20260, nodeCodecs);
    process.stderr.write(`${fuzzInWords(report)}\n`);
    const { READ, SKIP, REFUSE } = report.outcomes;
    expect(READ + SKIP + REFUSE).toBe(20_000);
    // A run that reads nothing, or skips everything, has damaged nothing worth the name.
    expect(Math.min(READ, SKIP)).toBeGreaterThan(2000);
    expect(REFUSE).toBeGreaterThan(10);
    expect(report.grownMb).toBeLessThan(600);
  }, 120_000);

  it('come from files that are read whole', async () => {
    const read = await Promise.all(corpusFiles().map(({ bytes }) => outcomeOf(bytes, nodeCodecs)));
    expect(read.filter((outcome) => outcome === 'READ').length).toBeGreaterThan(50);
  });
});

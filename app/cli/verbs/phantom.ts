import { resolve } from 'node:path';
import { visibleText } from '../../../core/format/index.js';
import { refuse, success } from '../../../core/result.js';
import type { Verb } from '../verb.js';

/** `phantom --to DIR`: writes the demonstration study. */
export const phantomVerb: Verb = {
  name: 'phantom',
  operands: [],
  options: [
    { name: 'to', value: 'DIR', required: true, help: 'folder to write the study into' },
    { name: 'seed', value: 'N', help: 'another noise: a whole number from 0' },
    { name: 'slices', value: 'N', help: 'number of slices' },
  ],
  summary: 'Write the synthetic demonstration study as DICOM files, with its truth',
  details: 'Computed images of no patient. The same seed gives the same study.',
  async run({ values }, { cwd, job }) {
    const counts: { seed?: number; slices?: number } = {};
    for (const name of ['seed', 'slices'] as const) {
      const text = values[name];
      if (text === undefined) continue;
      if (!/^\d{1,9}$/.test(text)) {
        return refuse('bad-usage', `--${name} is “${text}”; it must be a whole number.`);
      }
      counts[name] = Number(text);
    }
    const directory = resolve(cwd, values.to ?? '');
    // Loaded only here: the other verbs start without the phantom.
    const { makeDemonstration } = await import('../../host/phantom/makeDemonstration.js');
    const made = await makeDemonstration(directory, {
      ...counts,
      ...(job.signal && { signal: job.signal }),
      ...(job.onProgress && { onProgress: job.onProgress }),
    });
    if (!made.ok) return made;
    return success({
      document: made.value,
      text: `Wrote ${made.value.files} synthetic DICOM files and their truth to ${visibleText(directory)}.\n`,
      exitCode: 0,
    });
  },
};

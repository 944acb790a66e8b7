import { resolve } from 'node:path';
import { formatFixed, NO_VALUE, visibleText } from '../../../core/format/index.js';
import {
  type PairAssessment,
  proposePairs,
  type ReadSlice,
  speaksAgainst,
} from '../../../core/pairing/index.js';
import { success } from '../../../core/result.js';
import type { Stack } from '../../../core/stack/index.js';
import { cancelled } from '../../host/library/cancelled.js';
import { indexFolder } from '../../host/library/indexFolder.js';
import { pairsDocument } from '../pairsDocument.js';
import { readSlices } from '../readSlices.js';
import { textTable } from '../textTable.js';
import type { Verb } from '../verb.js';

/** `pairs DIR`: which stacks of a folder are soft and sharp of one acquisition. */
export const pairsVerb: Verb = {
  name: 'pairs',
  operands: ['DIR'],
  options: [],
  summary: 'Propose which stacks of a folder are a pair, best first, with the evidence',
  details: `A few slices of each stack are read: which is soft and which is sharp is measured, and so is a shift
between the two. Exit code 1 when there is no pair, or the best one is refused.`,
  async run({ operands: [directory = ''] }, { cwd, job, say }) {
    const folder = await indexFolder(resolve(cwd, directory), job);
    if (!folder.ok) return folder;
    const { stacks } = folder.value;
    const read: ReadSlice = async (stack, sliceIndex) => {
      const slices = await readSlices(folder.value, stack, [sliceIndex], {
        ...(job.signal && { signal: job.signal }),
      });
      if (!slices.ok) return undefined;
      for (const { file, text } of slices.value.problems) {
        say(`${visibleText(file)}: ${visibleText(text)}`);
      }
      return slices.value.stored.get(sliceIndex);
    };
    const pairs = await proposePairs(stacks, read, {
      ...(job.signal && { signal: job.signal }),
      ...(job.onProgress && { onProgress: job.onProgress }),
    });
    if (job.signal?.aborted) return cancelled();
    const isFound = pairs.some(({ verdict }) => verdict !== 'refused');
    return success({
      document: pairsDocument(pairs),
      text: textOf(pairs, stacks),
      exitCode: isFound ? 0 : 1,
    });
  },
};

const VERDICT: Readonly<Record<PairAssessment['verdict'], string>> = {
  pair: 'a pair',
  reservations: 'with reservations',
  refused: 'refused',
};

function textOf(pairs: readonly PairAssessment[], stacks: readonly Stack[]): string {
  if (pairs.length === 0) {
    return stacks.length < 2
      ? `No pair: the folder holds ${stacks.length === 0 ? 'no stack' : 'one stack'}.\n`
      : 'No pair.\n';
  }
  const table = textTable(
    ['Pair', 'Verdict', 'Soft', 'Sharp', 'Phase %', 'Noise HU', 'Frequency /mm', 'Shift mm'],
    pairsDocument(pairs).pairs.map((entry, index) => {
      const { verdict, phasePercent, sharpness, shiftMm } = entry;
      const pair = pairs[index];
      return [
        index + 1,
        VERDICT[verdict],
        pair === undefined ? '' : nameOf(pair.soft),
        pair === undefined ? '' : nameOf(pair.sharp),
        phasePercent ?? NO_VALUE,
        both(sharpness.noiseSoftHu, sharpness.noiseSharpHu, 1),
        both(sharpness.frequencySoft, sharpness.frequencySharp, 2),
        formatFixed(shiftMm, 2),
      ];
    }),
  );
  return `${table}${pairs.map(evidenceText).join('')}`;
}

function nameOf({ slices: [{ image }] }: Stack): string {
  const { seriesNumber, seriesDescription, seriesInstanceUid } = image.acquisition;
  const name = [seriesNumber, seriesDescription].filter((part) => part !== undefined).join(' ');
  return name === '' ? seriesInstanceUid : name;
}

function both(soft: number | null, sharp: number | null, digits: number): string {
  return soft === null && sharp === null
    ? NO_VALUE
    : `${formatFixed(soft, digits)} / ${formatFixed(sharp, digits)}`;
}

const SIGN: Readonly<Record<string, string>> = { agrees: '=', differs: '≠', unknown: '?' };

/** What speaks against a pair first, then the rest. */
function evidenceText({ soft, sharp, evidence }: PairAssessment, index: number): string {
  const ordered = [
    ...evidence.filter(speaksAgainst),
    ...evidence.filter((one) => !speaksAgainst(one)),
  ];
  const lines = ordered.map(
    (one) =>
      `  ${speaksAgainst(one) ? '!' : ' '} ${SIGN[one.state] ?? ''} ${visibleText(one.text)}`,
  );
  return [
    `\n${index + 1}: soft ${visibleText(soft.key)}\n   sharp ${visibleText(sharp.key)}\n`,
    `${lines.join('\n')}\n`,
  ].join('');
}

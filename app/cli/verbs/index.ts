import { resolve } from 'node:path';
import { visibleText } from '../../../core/format/index.js';
import { success } from '../../../core/result.js';
import { indexFolder } from '../../host/library/indexFolder.js';
import { type IndexDocument, indexDocument } from '../indexDocument.js';
import { textTable } from '../textTable.js';
import type { Verb } from '../verb.js';

/** `index DIR`: what a folder holds. */
export const indexVerb: Verb = {
  name: 'index',
  operands: ['DIR'],
  options: [],
  summary: 'List the stacks in a folder, and every file left out with its reason',
  details: 'Only headers are read. Nothing in the folder is changed.',
  async run({ operands: [directory = ''] }, { cwd, job }) {
    const found = await indexFolder(resolve(cwd, directory), job);
    if (!found.ok) return found;
    const document = indexDocument(found.value);
    return success({ document, text: textOf(document), exitCode: 0 });
  },
};

function textOf({ files, stacks, leftOut }: IndexDocument): string {
  const table = textTable(
    [
      'Stack',
      'Patient ID',
      'Series',
      'Kernel label',
      'Phase %',
      'Slices',
      'Matrix',
      'Pixel mm',
      'Apart mm',
      'Unit',
    ],
    stacks.map((stack, index) => [
      index + 1,
      stack.patientId ?? '–',
      [stack.seriesNumber, stack.seriesDescription].filter((part) => part !== null).join(' '),
      stack.kernelLabel ?? '–',
      stack.phasePercent ?? '–',
      stack.slices,
      `${stack.rows} × ${stack.columns}`,
      stack.pixelSpacingMm?.join(' × ') ?? '–',
      stack.sliceSpacingMm ?? '–',
      stack.unit,
    ]),
  );
  const keys = stacks.flatMap((stack, index) => [
    `  ${index + 1}: ${visibleText(stack.key)}`,
    ...stack.findings.map(({ text }) => `     ${visibleText(text)}`),
  ]);
  const left = leftOut.map(({ file, text }) => `  ${visibleText(file)}: ${visibleText(text)}`);
  return [
    `${files} files, ${stacks.length} stacks, ${leftOut.length} files left out.\n`,
    ...(stacks.length > 0 ? [`\n${table}\n${keys.join('\n')}\n`] : []),
    ...(left.length > 0 ? [`\nLeft out:\n${left.join('\n')}\n`] : []),
  ].join('');
}

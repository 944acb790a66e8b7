import { resolve } from 'node:path';
import { visibleText } from '../../../core/format/index.js';
import {
  type MeasuredPlan,
  measurePlan,
  parsePlan,
  readJson,
  selectStack,
  slicesNeeded,
} from '../../../core/note/index.js';
import { headerEvidence, reasonNotToMeasure, speaksAgainst } from '../../../core/pairing/index.js';
import { success } from '../../../core/result.js';
import type { Stack } from '../../../core/stack/index.js';
import { indexFolder } from '../../host/library/indexFolder.js';
import { measuredText } from '../measuredText.js';
import { type ReadSlices, readSlices } from '../readSlices.js';
import { readTextFile } from '../readTextFile.js';
import type { Verb, VerbContext } from '../verb.js';

/** `measure PLAN --in DIR`: measures a plan on both stacks. */
export const measureVerb: Verb = {
  name: 'measure',
  operands: ['PLAN'],
  options: [
    { name: 'in', value: 'DIR', required: true, help: 'folder with the images of the study' },
  ],
  summary: 'Measure the regions and contrasts of a plan on both stacks',
  details: 'PLAN is a JSON file. A value that can’t be had is null, with a flag that says why.',
  async run({ operands: [path = ''], values }, context) {
    const text = await readTextFile(resolve(context.cwd, path));
    if (!text.ok) return text;
    const json = readJson(text.value);
    if (!json.ok) return json;
    const parsed = parsePlan(json.value);
    if (!parsed.ok) return parsed;
    const { plan, unknownFields } = parsed.value;
    for (const field of unknownFields) {
      context.say(`The plan’s field ${visibleText(field)} is not known and was ignored.`);
    }
    const folder = await indexFolder(resolve(context.cwd, values.in ?? ''), context.job);
    if (!folder.ok) return folder;
    const soft = selectStack(plan.pair.soft, folder.value.stacks);
    if (!soft.ok) return soft;
    const sharp = plan.pair.sharp && selectStack(plan.pair.sharp, folder.value.stacks);
    if (sharp && !sharp.ok) return sharp;
    if (sharp) sayDoubts(soft.value, sharp.value, context);

    const stacks = sharp ? [soft.value, sharp.value] : [soft.value];
    const read = new Map<Stack, ReadSlices>();
    for (const stack of stacks) {
      const name = stack === soft.value ? 'Soft' : 'Sharp';
      for (const { text: finding } of stack.findings) {
        context.say(`${name} stack: ${visibleText(finding)}`);
      }
      const slices = await readSlices(folder.value, stack, slicesNeeded(plan, stack), context.job);
      if (!slices.ok) return slices;
      read.set(stack, slices.value);
      for (const { file, text: problem } of slices.value.problems) {
        context.say(`${visibleText(file)}: ${visibleText(problem)}`);
      }
    }
    const notOnSharp =
      sharp === undefined ? undefined : reasonNotToMeasure(headerEvidence(soft.value, sharp.value));
    if (notOnSharp !== undefined) context.say(notOnSharp.text);
    const measured = measurePlan(
      plan,
      soft.value,
      sharp?.value,
      (stack, index) => read.get(stack)?.stored.get(index),
      notOnSharp,
    );
    if (!measured.ok) return measured;
    const document: MeasuredPlan = measured.value;
    const exitCode = notOnSharp === undefined ? 0 : 1;
    return success({ document, text: measuredText(document), exitCode });
  },
};

/** Headers that disagree do not stop a plan that names its stacks, but are said. */
function sayDoubts(soft: Stack, sharp: Stack, { say }: VerbContext): void {
  if (soft === sharp) {
    say('Soft and sharp are the same stack: the plan names one series twice.');
    return;
  }
  for (const one of headerEvidence(soft, sharp).evidence) {
    if (one.state === 'differs' && speaksAgainst(one)) say(`The pair: ${visibleText(one.text)}.`);
  }
}

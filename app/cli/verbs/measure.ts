import { resolve } from 'node:path';
import { visibleText } from '../../../core/format/index.js';
import { type MeasuredPlan, parsePlan, readJson, selectStack } from '../../../core/note/index.js';
import { headerEvidence, speaksAgainst } from '../../../core/pairing/index.js';
import { success } from '../../../core/result.js';
import type { Stack } from '../../../core/stack/index.js';
import { indexFolder } from '../../host/library/indexFolder.js';
import { measuredText } from '../measuredText.js';
import { measureStudy } from '../measureStudy.js';
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
  details: `PLAN is a JSON file. A value that can’t be had is null, with a flag that says why. For the standard errors
a few more slices of both stacks are read, and the noise is measured on them.`,
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
    const stacks = { soft: soft.value, sharp: sharp?.value };
    const study = await measureStudy(plan, folder.value, stacks, context);
    if (!study.ok) return study;
    const document: MeasuredPlan = study.value.measured;
    const exitCode = study.value.notOnSharp === undefined ? 0 : 1;
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

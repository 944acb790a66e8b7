import { visibleText } from '../../core/format/index.js';
import {
  type Kernel,
  type MeasuredPlan,
  measurePlan,
  type Plan,
  slicesNeeded,
} from '../../core/note/index.js';
import { headerEvidence, reasonNotToMeasure } from '../../core/pairing/index.js';
import { FLAGS, type Flag, type NoiseOfStack } from '../../core/region/index.js';
import { type Result, success } from '../../core/result.js';
import type { Stack } from '../../core/stack/index.js';
import { cancelled } from '../host/library/cancelled.js';
import type { IndexedFolder } from '../host/library/indexFolder.js';
import { noiseOfPair } from './noiseOfPair.js';
import { type ReadSlices, readSlices } from './readSlices.js';
import type { VerbContext } from './verb.js';

/** A plan measured on the images of a folder. */
export interface MeasuredStudy {
  readonly measured: MeasuredPlan;
  /** Why nothing was measured on the sharp stack. */
  readonly notOnSharp: Flag | undefined;
  /** Noise of both kernels, or why it is not known. */
  readonly noise: Readonly<Record<Kernel, NoiseOfStack>>;
  /** The slices that the plan's regions lie on, decoded. */
  readonly read: ReadonlyMap<Stack, ReadSlices>;
}

/** Measures a plan on one stack of a folder or on two. What can't be read is said, and the rest goes on. */
export async function measureStudy(
  plan: Plan,
  folder: IndexedFolder,
  { soft, sharp }: { readonly soft: Stack; readonly sharp: Stack | undefined },
  context: VerbContext,
): Promise<Result<MeasuredStudy>> {
  const read = new Map<Stack, ReadSlices>();
  for (const stack of sharp === undefined ? [soft] : [soft, sharp]) {
    const name = stack === soft ? 'Soft' : 'Sharp';
    for (const { text } of stack.findings) context.say(`${name} stack: ${visibleText(text)}`);
    const slices = await readSlices(
      folder,
      stack,
      slicesNeeded(plan, stack, { soft, sharp }),
      context.job,
    );
    if (!slices.ok) return slices;
    read.set(stack, slices.value);
    for (const { file, text } of slices.value.problems) {
      context.say(`${visibleText(file)}: ${visibleText(text)}`);
    }
  }
  const notOnSharp =
    sharp === undefined ? undefined : reasonNotToMeasure(headerEvidence(soft, sharp));
  if (notOnSharp !== undefined) context.say(notOnSharp.text);
  const noise = await noiseOf(folder, soft, sharp, notOnSharp, context);
  if (context.job.signal?.aborted) return cancelled();
  const measured = measurePlan(
    plan,
    soft,
    sharp,
    (stack, index) => read.get(stack)?.stored.get(index),
    notOnSharp,
    noise,
  );
  return measured.ok ? success({ measured: measured.value, notOnSharp, noise, read }) : measured;
}

/** The noise of both kernels, for the standard errors; or why it can't be had. */
async function noiseOf(
  folder: IndexedFolder,
  soft: Stack,
  sharp: Stack | undefined,
  notOnSharp: Flag | undefined,
  { job }: VerbContext,
): Promise<Readonly<Record<Kernel, NoiseOfStack>>> {
  if (sharp === undefined || sharp === soft) {
    return { soft: FLAGS.noStandardErrorAlone, sharp: FLAGS.noStandardErrorAlone };
  }
  return notOnSharp === undefined
    ? noiseOfPair(folder, soft, sharp, job)
    : { soft: FLAGS.noStandardError, sharp: FLAGS.noStandardError };
}

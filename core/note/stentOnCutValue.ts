import type { SliceGrid } from '../geometry/index.js';
import { asSlice, cutStack, fitStentOnCut } from '../oblique/index.js';
import type { PairTexture } from '../quality/index.js';
import type { Stack } from '../stack/index.js';
import type { FittedStent, StentPlace } from '../stent/index.js';
import type { StentValue } from './stentSchema.js';
import { noStentValue, type StentStacks, stentValue } from './stentValue.js';

/** A stent fitted on an oblique plane of both stacks, and what the note keeps of it. */
export function stentOnCutValue(
  place: StentPlace,
  plane: SliceGrid,
  { soft, sharp, storedOf }: StentStacks,
  texture: PairTexture,
): { readonly fit: FittedStent; readonly value: StentValue } {
  const fit = fitStentOnCut(place, plane, soft, sharp, storedOf, texture);
  if (fit.reason !== undefined) return { fit, value: noStentValue(fit.reason) };
  // The plain region is read where the reader would draw it: on the cut.
  const cutOf = (stack: Stack) =>
    cutStack(stack, (index) => storedOf(stack, index), plane, { interpolation: 'cubic' });
  const [softCut, sharpCut] = [cutOf(soft), cutOf(sharp)];
  if (!softCut.ok) return { fit, value: noStentValue(softCut.refusal) };
  if (!sharpCut.ok) return { fit, value: noStentValue(sharpCut.refusal) };
  const [onSoft, onSharp] = [asSlice(softCut.value), asSlice(sharpCut.value)];
  const value = stentValue(fit, {
    soft: onSoft.stack,
    sharp: onSharp.stack,
    storedOf: (stack) => (stack === onSoft.stack ? onSoft : onSharp).stored,
  });
  return { fit, value };
}

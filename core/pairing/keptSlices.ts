import type { StoredValues } from '../dicom/index.js';
import type { Stack } from '../stack/index.js';
import type { ReadSlice } from './contract.js';

/** Slices of one stack that are kept at a time: what the measures of one pair read, of 512² 12 MB. */
const MOST_KEPT = 24;

/**
 * A reader that keeps the slices it has read last of each stack, because several measures and several pairs ask for the
 * same ones. One that can't be had is asked for once.
 */
export function keptSlices(read: ReadSlice): ReadSlice {
  const kept = new Map<Stack, Map<number, Promise<StoredValues | undefined>>>();
  return (stack, sliceIndex) => {
    const ofStack = kept.get(stack) ?? new Map<number, Promise<StoredValues | undefined>>();
    kept.set(stack, ofStack);
    const known = ofStack.get(sliceIndex);
    if (known !== undefined) return known;
    const asked = read(stack, sliceIndex);
    ofStack.set(sliceIndex, asked);
    const [oldest] = ofStack.keys();
    if (ofStack.size > MOST_KEPT && oldest !== undefined) ofStack.delete(oldest);
    return asked;
  };
}

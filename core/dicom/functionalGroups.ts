import type { Attributes } from './attributes.js';
import { layeredAttributes } from './layeredAttributes.js';

const SHARED = 'x52009229';
const PER_FRAME = 'x52009230';

/** The macros whose attributes the bench reads (PS3.3 C.7.6.16.2, C.7.6.18.2, C.8.15.3), each a sequence of one item. */
const MACROS = [
  'x00289110', // Pixel Measures
  'x00209113', // Plane Position (Patient)
  'x00209116', // Plane Orientation (Patient)
  'x00209111', // Frame Content
  'x00189118', // Cardiac Synchronization
  'x00289145', // Pixel Value Transformation
  'x00289132', // Frame VOI LUT
  'x00189329', // CT Image Frame Type
  'x00189314', // CT Reconstruction
  'x00189325', // CT X-Ray Details
  'x00189301', // CT Acquisition Type
] as const;

/**
 * Attributes of each frame of an enhanced multi-frame image: its own functional groups, then the shared ones, then
 * the top level. Undefined when the file has no functional groups.
 */
export function frameAttributes(top: Attributes): readonly Attributes[] | undefined {
  const macrosOf = (group: Attributes | undefined): Attributes[] =>
    MACROS.flatMap((macro) => group?.items(macro)?.slice(0, 1) ?? []);
  const shared = macrosOf(top.items(SHARED)?.[0]);
  const frames = top.items(PER_FRAME);
  return frames?.map((frame) => layeredAttributes([...macrosOf(frame), ...shared, top]));
}

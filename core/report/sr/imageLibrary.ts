import type { Kernel, NoteStack } from '../../note/schema.js';
import { dcm } from './code.js';
import {
  type ContentItem,
  codeItem,
  containerItem,
  imageItem,
  textIfAny,
  uidItem,
} from './contentItem.js';
import { framesOfKernel, imageReference, type ReportContext } from './context.js';
import { NO_VALUE_CODES, numberItem } from './numberItem.js';
import { OWN } from './ownCodes.js';
import { unitCode } from './quantityCodes.js';
import { KERNEL_CODES } from './readingCodes.js';
import { uidOf } from './uidOf.js';

/** The image library (TID 1600): the images that values rest on, a group a kernel, with how they were made. None without images. */
export function imageLibrary(context: ReportContext): readonly ContentItem[] {
  const { pair } = context.note;
  const groups = [
    ...group(context, 'soft', pair.soft),
    ...(pair.sharp === null ? [] : group(context, 'sharp', pair.sharp)),
  ];
  return groups.length === 0 ? [] : [containerItem(dcm('111028', 'Image Library'), groups, '1600')];
}

function group(context: ReportContext, kernel: Kernel, stack: NoteStack): readonly ContentItem[] {
  const { conditions, pair } = context.note;
  // The note knows the frame of the soft stack; where the reader answered for another one, that of the sharp is not known.
  const isOtherFrame =
    kernel === 'sharp' && pair.overrides.some(({ check }) => check === 'frame of reference');
  const frames = framesOfKernel(context.note, kernel);
  if (frames.length === 0) return [];
  const [rowMm, columnMm] = stack.pixelSpacingMm ?? [null, null];
  const number = (value: string, meaning: string, unit: string, given: number | null) =>
    given === null
      ? []
      : [
          numberItem({
            relationship: 'HAS ACQ CONTEXT',
            name: dcm(value, meaning),
            unit: unitCode(unit),
            value: given,
            print: String,
            missing: NO_VALUE_CODES.failure,
          }),
        ];
  return [
    containerItem(dcm('126200', 'Image Library Group'), [
      codeItem('HAS ACQ CONTEXT', dcm('121139', 'Modality'), dcm('CT', 'Computed Tomography')),
      codeItem('HAS ACQ CONTEXT', OWN.kernel, KERNEL_CODES[kernel]),
      ...textIfAny('HAS ACQ CONTEXT', OWN.kernelLabel, stack.kernelLabel ?? ''),
      ...(conditions.frameOfReferenceUid === null || isOtherFrame
        ? []
        : [
            uidItem(
              'HAS ACQ CONTEXT',
              dcm('112227', 'Frame of Reference UID'),
              uidOf(conditions.frameOfReferenceUid),
            ),
          ]),
      ...number('111026', 'Horizontal Pixel Spacing', 'mm', columnMm),
      ...number('111066', 'Vertical Pixel Spacing', 'mm', rowMm),
      ...number('112226', 'Spacing between slices', 'mm', stack.sliceSpacingMm),
      ...number('112225', 'Slice Thickness', 'mm', stack.thicknessMm),
      ...number('113733', 'KVP', 'kV', conditions.kvp),
      ...frames.map(({ sopInstanceUid, frameNumber }) =>
        imageItem('CONTAINS', undefined, imageReference(context, sopInstanceUid, frameNumber)),
      ),
    ]),
  ];
}

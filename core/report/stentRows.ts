import type { Note } from '../note/schema.js';
import type { NoteStent, StentValue } from '../note/stentSchema.js';
import { joinedPlace, planeText, pointText } from './placeText.js';
import { quantityValues } from './quantityDefinition.js';
import { NO_QUOTE } from './quoteCells.js';
import { findingCells, type KernelStack, kernelCells, kernelsOf } from './rowParts.js';
import { KERNEL_DEFINITIONS, refitsText, STENT_DEFINITIONS } from './stentQuantities.js';
import { stentSentence } from './stentSentence.js';
import type { KernelValues, TableRow, ValuesImage } from './tableRow.js';

/**
 * The fitted stents of a note as rows of the table. The fit is one result of both kernels, so that it stands once, under
 * 'both'; what a plain region reads there stands beside it under each kernel. One without a value says why.
 */
export function stentRows(note: Note): readonly TableRow[] {
  return note.stents.map((stent) => {
    const finding = note.findings.find(({ id }) => id === stent.findingId);
    const cells = findingCells(finding);
    const { fit } = stent;
    const isFitted = fit !== null && fit.reason === null;
    const stacks = kernelsOf(note);
    return {
      item: 'fitted stent',
      id: stent.id,
      label: stent.label,
      role: '',
      ...cells,
      nominalMm: stent.nominalMm ?? cells.nominalMm,
      place: joinedPlace(placeOf(stent), planeText(note, stent)),
      definition: '',
      quote: NO_QUOTE,
      centreMm: stent.centreMm,
      kernels: [
        bothKernels(stent, stacks, isFitted ? fit : null),
        ...(isFitted ? stacks.map((of) => besideFit(of, fit)) : []),
      ],
      flags: [],
    };
  });
}

function bothKernels(
  stent: NoteStent,
  stacks: readonly KernelStack[],
  fit: StentValue | null,
): KernelValues {
  const labels = stacks.map(
    ({ kernel, stack }) => `${kernel}: ${stack.kernelLabel ?? 'no kernel label'}`,
  );
  const refits = fit === null ? '' : refitsText(fit);
  return {
    kernel: 'both',
    kernelLabel: labels.join('; '),
    seriesInstanceUid: stacks.map(({ stack }) => stack.seriesInstanceUid).join(' / '),
    quoted: false,
    quantities: fit === null ? [] : quantityValues(STENT_DEFINITIONS, fit),
    sliceIndex: null,
    slices: stacks[0]?.stack.slices ?? 0,
    sliceOffsetMm: null,
    sopInstanceUid: null,
    frameNumber: null,
    images: fit === null ? [] : imagesOfFit(stacks, fit),
    flags: fit === null ? [stentSentence(stent)] : refits === '' ? [] : [refits],
  };
}

function besideFit(of: KernelStack, fit: StentValue): KernelValues {
  const image = imagesOfFit([of], fit)[0];
  return {
    ...kernelCells(of, {
      sliceIndex: image?.sliceIndex ?? null,
      sliceOffsetMm: null,
      sopInstanceUid: image?.sopInstanceUid ?? null,
      frameNumber: image?.frameNumber ?? null,
      flags: [],
    }),
    quoted: false,
    quantities: quantityValues(KERNEL_DEFINITIONS, { fit, kernel: of.kernel }),
  };
}

function imagesOfFit(
  stacks: readonly KernelStack[],
  { images }: StentValue,
): readonly ValuesImage[] {
  return stacks.flatMap(({ kernel, stack }) =>
    images
      .filter((image) => image.kernel === kernel)
      .map(({ sliceIndex, sopInstanceUid, frameNumber }) => ({
        kernel,
        sliceIndex,
        slices: stack.slices,
        sopInstanceUid,
        frameNumber,
      })),
  );
}

/** Where the fit began, from which it can be made again, and the axis that it found. */
function placeOf({ centreMm, fit }: NoteStent): string {
  const start = `fitted from ${pointText(centreMm)} mm`;
  const axis =
    fit?.axisMm && fit.axis
      ? `axis through ${pointText(fit.axisMm)} mm along ${pointText(fit.axis)}`
      : '';
  return joinedPlace(start, axis);
}

import { formatQuantity } from '../format/index.js';
import type { NotePlane } from '../note/planeSchema.js';
import type { Note } from '../note/schema.js';
import { pointText, resamplingOf } from './placeText.js';

/** An oblique plane in words, under its name: how it lies, how it was cut, and the images that it rests on. */
export interface PlaneFact {
  /** 'Cut 1 (O1)'. */
  readonly name: string;
  readonly text: string;
}

/** The oblique planes of a note, in its order. */
export function planeFacts({ planes, pair }: Pick<Note, 'planes' | 'pair'>): readonly PlaneFact[] {
  return planes.map((plane) => {
    const { id, label, courseMm, slabMm, angleDeg, source } = plane;
    const [from, to] = courseMm;
    return {
      name: `${label} (${id})`,
      text: [
        `Oblique plane at right angles to the course from ${pointText(from)} to ${pointText(to)} mm, through its middle.`,
        `Resampled by ${resamplingOf(plane)}.`,
        slabMm === undefined ? 'No slab.' : `Slab of ${formatQuantity(slabMm, 'lengthMm')} mm.`,
        angleDeg === null
          ? 'Angle to the slices: not known, it was not cut.'
          : `${formatQuantity(angleDeg, 'angleDeg')}° to the slices of the soft stack.`,
        sourceText('Soft', source.soft, pair.soft.slices),
        ...(pair.sharp === null ? [] : [sourceText('Sharp', source.sharp, pair.sharp.slices)]),
      ].join(' '),
    };
  });
}

type Source = NotePlane['source']['soft'];

/** The images that a cut of one kernel rests on, as a sentence. */
function sourceText(kernel: string, source: Source, slices: number): string {
  if (source === null) return `${kernel} kernel: no image.`;
  const image = ({ sopInstanceUid, frameNumber, sliceIndex }: NonNullable<Source>['first']) =>
    `slice ${sliceIndex + 1} of ${slices} (SOP Instance UID ${sopInstanceUid}${frameNumber === null ? '' : `, frame ${frameNumber}`})`;
  return `${kernel} kernel: from ${image(source.first)} to ${image(source.last)}.`;
}

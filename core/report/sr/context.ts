import { SOP_CLASS } from '../../dicom/index.js';
import type { ReferencedFrame } from '../../note/life/index.js';
import { frameKey } from '../../note/life/index.js';
import type { Kernel, Note } from '../../note/schema.js';
import type { ImageReference } from './contentItem.js';
import type { ImageLookup } from './imageLookup.js';
import { uidOf } from './uidOf.js';

/** What the document is made with, beside the note. */
export interface ReportOptions extends Partial<ImageLookup> {
  /** When the document is made: ISO 8601, with the offset from UTC; its digits are written as they are. */
  readonly now: string;
}

/** A note on its way to a document. */
export interface ReportContext extends ReportOptions {
  readonly note: Note;
}

/** The images that values rest on are CT images, or frames of enhanced CT images: others are not read. */
export function imageReference(
  { sopClassOf }: Pick<ReportContext, 'sopClassOf'>,
  sopInstanceUid: string,
  frameNumber: number | null,
): ImageReference {
  const readKind = frameNumber === null ? SOP_CLASS.ctImage : SOP_CLASS.enhancedCtImage;
  return {
    sopClassUid: sopClassOf?.(sopInstanceUid) ?? readKind,
    sopInstanceUid: uidOf(sopInstanceUid),
    frameNumber,
  };
}

/** The frames of one kernel that what is measured lies on, each once, whether or not it gave a value. */
export function framesOfKernel(note: Note, kernel: Kernel): readonly ReferencedFrame[] {
  const frames = new Map<string, ReferencedFrame>();
  const fitted = note.stents.flatMap(
    ({ fit }) => fit?.images.filter((image) => image.kernel === kernel) ?? [],
  );
  const measured = [...note.regions, ...note.edges, ...note.profiles].map((item) => item[kernel]);
  for (const value of [...measured, ...fitted]) {
    const { sopInstanceUid = null, frameNumber = null } = value ?? {};
    if (sopInstanceUid === null) continue;
    const frame = { sopInstanceUid, frameNumber };
    frames.set(frameKey(frame), frame);
  }
  return [...frames.values()];
}

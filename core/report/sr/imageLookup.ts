import { patientToPixel, type Vec3 } from '../../geometry/index.js';
import { frameKey } from '../../note/life/index.js';
import type { Stack } from '../../stack/index.js';

/** What only the images know: where a point lies in the pixels of one, and of which kind it is. */
export interface ImageLookup {
  /**
   * Column and row of a point in a frame, in pixel indices: 0 is the centre of the first one. The point is projected
   * along the slice's normal. Undefined for an image that is not there.
   *
   * @param frameNumber from 1; null for an image of its own
   */
  readonly pixelOf: (
    sopInstanceUid: string,
    frameNumber: number | null,
    pointMm: Vec3,
  ) => readonly [column: number, row: number] | undefined;
  /** SOP Class UID of an image; undefined for one that is not there. */
  readonly sopClassOf: (sopInstanceUid: string) => string | undefined;
  /** Study Instance UID of an image: a note knows that of its first stack alone. Undefined for one that is not there. */
  readonly studyOf: (sopInstanceUid: string) => string | undefined;
}

/** Looks images up in the stacks of a folder, under the identifiers that their files have. */
export function imageLookup(stacks: readonly Stack[]): ImageLookup {
  const images = stacks.flatMap(({ slices }) => slices.map(({ image }) => image));
  const frames = new Map(
    images.map((image) => {
      const frameNumber = image.frame === undefined ? null : image.frame + 1;
      return [frameKey({ sopInstanceUid: image.sopInstanceUid, frameNumber }), image.grid];
    }),
  );
  const bySop = new Map(images.map((image) => [image.sopInstanceUid, image]));
  return {
    pixelOf(sopInstanceUid, frameNumber, pointMm) {
      const grid = frames.get(frameKey({ sopInstanceUid, frameNumber }));
      if (grid === undefined) return undefined;
      const { column, row } = patientToPixel(grid, pointMm);
      return [column, row];
    },
    sopClassOf: (sopInstanceUid) => bySop.get(sopInstanceUid)?.sopClassUid,
    studyOf: (sopInstanceUid) => bySop.get(sopInstanceUid)?.identity.studyInstanceUid || undefined,
  };
}

/** The same lookup under new UIDs, for a note that was de-identified. The study is that of the note: its own UID would tell. */
export function renamedLookup(
  { pixelOf, sopClassOf }: ImageLookup,
  originalUid: (uid: string) => string | undefined,
): ImageLookup {
  return {
    pixelOf(sopInstanceUid, frameNumber, pointMm) {
      const original = originalUid(sopInstanceUid);
      return original === undefined ? undefined : pixelOf(original, frameNumber, pointMm);
    },
    sopClassOf(sopInstanceUid) {
      const original = originalUid(sopInstanceUid);
      return original === undefined ? undefined : sopClassOf(original);
    },
    studyOf: () => undefined,
  };
}

import type { NotePlane } from '../../note/planeSchema.js';
import { type Cleaner, safeLabel } from './cleaner.js';

/** An oblique plane without identity: its course stays, its name is made anew, the images that it rests on get new UIDs. */
export function cleanPlane(plane: NotePlane, cleaner: Cleaner): NotePlane {
  const { courseMm, interpolation, slabMm, angleDeg, resampling, source } = plane;
  const id = cleaner.ids.idOf(plane.id);
  return {
    id,
    label: safeLabel('Cut', id),
    courseMm,
    ...(interpolation === undefined ? {} : { interpolation }),
    ...(slabMm === undefined ? {} : { slabMm }),
    angleDeg,
    resampling: cleaner.sentence(resampling),
    source: { soft: cleanSource(source.soft, cleaner), sharp: cleanSource(source.sharp, cleaner) },
  };
}

type Source = NotePlane['source']['soft'];

function cleanSource(source: Source, { uid }: Cleaner): Source {
  if (source === null) return null;
  const image = ({ sopInstanceUid, frameNumber, sliceIndex }: NonNullable<Source>['first']) => ({
    sopInstanceUid: uid(sopInstanceUid),
    frameNumber,
    sliceIndex,
  });
  return { first: image(source.first), last: image(source.last) };
}

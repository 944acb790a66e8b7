import type { NoteStent, StentValue } from '../../note/stentSchema.js';
import { type Cleaner, cleanFlag, cleanPlaneReference, safeLabel } from './cleaner.js';

/** A fitted stent without identity: its place and numbers stay, its name is made anew, its images get new UIDs. */
export function cleanStent(stent: NoteStent, cleaner: Cleaner): NoteStent {
  const { centreMm, nominalMm, findingId, fit } = stent;
  const id = cleaner.ids.idOf(stent.id);
  return {
    id,
    label: safeLabel('Stent', id),
    centreMm,
    ...(nominalMm === undefined ? {} : { nominalMm }),
    ...cleanPlaneReference(stent, cleaner),
    findingId: findingId === null ? null : cleaner.ids.idOf(findingId),
    fit: fit === null ? null : cleanFit(fit, cleaner),
  };
}

function cleanFit(fit: StentValue, cleaner: Cleaner): StentValue {
  return {
    strutDiameterMm: fit.strutDiameterMm,
    lumenHu: fit.lumenHu,
    wallWidthMm: fit.wallWidthMm,
    wallHu: fit.wallHu,
    strutMassHuMm: fit.strutMassHuMm,
    blurSigmaMm: fit.blurSigmaMm,
    refitted: fit.refitted,
    axisMm: fit.axisMm,
    axis: fit.axis,
    tiltDeg: fit.tiltDeg,
    goodness: fit.goodness,
    plain: fit.plain,
    slices: fit.slices,
    images: fit.images.map(({ kernel, sliceIndex, sopInstanceUid, frameNumber, noiseSdHu }) => ({
      kernel,
      sliceIndex,
      sopInstanceUid: cleaner.uid(sopInstanceUid),
      frameNumber,
      noiseSdHu,
    })),
    reason: fit.reason === null ? null : cleanFlag(fit.reason, cleaner),
  };
}

import type { Finding } from '../result.js';
import { stableUid } from '../stableUid.js';
import { folderOf, type IndexedImage } from './indexedImage.js';

const NO_UID: Finding = {
  code: 'no-uid',
  text: 'The file lacks a study, series or instance UID. One was made from its folder and header; nothing outside knows it.',
};

/** True when the slice was given a UID of our making: such slices never share a stack across folders. */
export function hasMadeUid({ image }: IndexedImage): boolean {
  return image.findings.some(({ code }) => code === NO_UID.code);
}

/**
 * Gives UIDs to a slice that lacks some (AWKWARD row 88): the same for one patient, study and series header in
 * folders of one name, so that a note is found again when a folder moves.
 *
 * @param folderName name of the opened folder
 */
export function withUids(indexed: IndexedImage, folderName: string): IndexedImage {
  const { image, file } = indexed;
  const { identity, acquisition } = image;
  const stated = [
    identity.studyInstanceUid,
    acquisition.seriesInstanceUid,
    image.sopInstanceUid,
  ] as const;
  if (stated.every((uid) => uid !== '')) return indexed;
  const name = folderOf(indexed).split('/').at(-1) || folderName;
  const study =
    stated[0] ||
    stableUid(
      JSON.stringify([
        'study',
        name,
        identity.patientId,
        identity.patientName,
        identity.patientBirthDate,
        identity.studyDate,
        identity.studyTime,
        identity.studyDescription,
        identity.accessionNumber,
      ]),
    );
  const series =
    stated[1] ||
    stableUid(
      JSON.stringify([
        'series',
        study,
        name,
        acquisition.seriesNumber,
        acquisition.seriesDescription,
        acquisition.seriesDate,
        acquisition.seriesTime,
        acquisition.kernelLabel,
      ]),
    );
  return {
    ...indexed,
    image: {
      ...image,
      sopInstanceUid: stated[2] || stableUid(JSON.stringify(['instance', series, file])),
      identity: { ...identity, studyInstanceUid: study },
      acquisition: { ...acquisition, seriesInstanceUid: series },
      findings: [...image.findings, NO_UID],
    },
  };
}

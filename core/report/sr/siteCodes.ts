import { type Code, sct } from './code.js';

/**
 * SNOMED CT codes of the 18 coronary segments, by their number: CID 3015, Coronary Arteries, as the dictionary of
 * pydicom 2.3.1 lists it. Which code is which segment is our own pairing by name; segment 13 is two of them.
 */
const SITES: Readonly<Record<number, readonly Code[]>> = {
  1: [sct('91083009', 'Proximal Right Coronary Artery')],
  2: [sct('450960006', 'Mid Right Coronary Artery')],
  3: [sct('41879009', 'Distal Right Coronary Artery')],
  4: [sct('53655008', 'Posterior Descending Right Coronary Artery')],
  5: [sct('3227004', 'Left Main Coronary Artery')],
  6: [sct('68787002', 'Proximal Left Anterior Descending Coronary Artery')],
  7: [sct('91748002', 'Mid Left Anterior Descending Coronary Artery')],
  8: [sct('36672000', 'Distal Left Anterior Descending Coronary Artery')],
  9: [sct('91750005', '1st Diagonal Coronary Artery')],
  10: [sct('91751009', '2nd Diagonal Coronary Artery')],
  11: [sct('52433000', 'Proximal Circumflex Coronary Artery')],
  12: [sct('91754001', '1st Marginal Coronary Artery')],
  13: [
    sct('91753007', 'Mid Circumflex Coronary Artery'),
    sct('6511003', 'Distal Circumflex Coronary Artery'),
  ],
  14: [sct('91755000', '2nd Marginal Coronary Artery')],
  15: [sct('91760001', 'Left Posterior Descending Circumflex Coronary Artery')],
  16: [sct('91761002', '1st Right posterolateral Coronary Artery')],
  17: [sct('244252004', 'Intermediate Artery (Ramus)')],
  18: [sct('91757008', '1st Left Posterolateral Coronary Artery')],
};

/** The codes of a coronary segment; none for no segment. */
export function siteCodes(segment: number | null): readonly Code[] {
  return segment === null ? [] : (SITES[segment] ?? []);
}

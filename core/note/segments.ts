/** A coronary segment of the 18-segment model. */
export interface Segment {
  readonly number: number;
  readonly abbreviation: string;
  /** In full, sentence case. */
  readonly name: string;
}

/**
 * The 18-segment model of the Society of Cardiovascular Computed Tomography: Raff 2009, J Cardiovasc Comput Tomogr
 * 3:122; Leipsic 2014, ibid. 8:342. Numbers and names from memory, 15, 17 and 18 checked against an excerpt. Which of
 * them a heart has depends on its dominance.
 */
export const SEGMENTS: readonly Segment[] = [
  { number: 1, abbreviation: 'pRCA', name: 'Proximal right coronary artery' },
  { number: 2, abbreviation: 'mRCA', name: 'Mid right coronary artery' },
  { number: 3, abbreviation: 'dRCA', name: 'Distal right coronary artery' },
  { number: 4, abbreviation: 'R-PDA', name: 'Posterior descending artery from the right' },
  { number: 5, abbreviation: 'LM', name: 'Left main' },
  { number: 6, abbreviation: 'pLAD', name: 'Proximal left anterior descending artery' },
  { number: 7, abbreviation: 'mLAD', name: 'Mid left anterior descending artery' },
  { number: 8, abbreviation: 'dLAD', name: 'Distal left anterior descending artery' },
  { number: 9, abbreviation: 'D1', name: 'First diagonal branch' },
  { number: 10, abbreviation: 'D2', name: 'Second diagonal branch' },
  { number: 11, abbreviation: 'pLCx', name: 'Proximal left circumflex artery' },
  { number: 12, abbreviation: 'OM1', name: 'First obtuse marginal branch' },
  { number: 13, abbreviation: 'LCx', name: 'Mid and distal left circumflex artery' },
  { number: 14, abbreviation: 'OM2', name: 'Second obtuse marginal branch' },
  { number: 15, abbreviation: 'L-PDA', name: 'Posterior descending artery from the left' },
  { number: 16, abbreviation: 'R-PLB', name: 'Posterolateral branch from the right' },
  { number: 17, abbreviation: 'RI', name: 'Ramus intermedius' },
  { number: 18, abbreviation: 'L-PLB', name: 'Posterolateral branch from the left' },
];

/** The segment with this number; undefined for null and for numbers outside 1 to 18. */
export function segmentOf(number: number | null): Segment | undefined {
  return SEGMENTS.find((segment) => segment.number === number);
}

/** Value representations with a 2-byte length in explicit VR encodings (PS3.5 table 7.1-2). */
const SHORT: ReadonlySet<string> = new Set(
  'AE AS AT CS DA DS DT FL FD IS LO LT PN SH SL SS ST TM UI UL US'.split(' '),
);

/** Value representations with two reserved bytes and a 4-byte length (PS3.5 table 7.1-1). */
const LONG: ReadonlySet<string> = new Set('OB OD OF OL OV OW SQ SV UC UN UR UT UV'.split(' '));

export function isShortVr(vr: string): boolean {
  return SHORT.has(vr);
}

export function isKnownVr(vr: string): boolean {
  return SHORT.has(vr) || LONG.has(vr);
}

/**
 * Value representations of the attributes that the bench reads (PS3.6 chapter 6), for data sets that do not state
 * them or state them wrongly. US stands for those whose sign follows Pixel Representation.
 */
const DICTIONARY: Readonly<Record<number, string>> = {
  524293: 'CS',
  524296: 'CS',
  524310: 'UI',
  524312: 'UI',
  524320: 'DA',
  524321: 'DA',
  524322: 'DA',
  524336: 'TM',
  524337: 'TM',
  524338: 'TM',
  524368: 'SH',
  524384: 'CS',
  524400: 'LO',
  528432: 'LO',
  528446: 'LO',
  528528: 'LO',
  532753: 'ST',
  1048592: 'PN',
  1048608: 'LO',
  1048624: 'DA',
  1048640: 'CS',
  1572880: 'LO',
  1572944: 'DS',
  1572960: 'DS',
  1576992: 'LO',
  1577056: 'DS',
  1577216: 'DS',
  1577488: 'SH',
  2097165: 'UI',
  2097166: 'UI',
  2097169: 'IS',
  2097170: 'IS',
  2097171: 'IS',
  2097202: 'DS',
  2097207: 'DS',
  2097234: 'UI',
  2113536: 'LT',
  2134593: 'FL',
  2621442: 'US',
  2621444: 'CS',
  2621448: 'IS',
  2621456: 'US',
  2621457: 'US',
  2621488: 'DS',
  2621696: 'US',
  2621697: 'US',
  2621698: 'US',
  2621699: 'US',
  2621728: 'US',
  2621729: 'US',
  2625616: 'DS',
  2625617: 'DS',
  2625618: 'DS',
  2625619: 'DS',
  2625620: 'LO',
  2625621: 'LO',
  2625622: 'CS',
  2629904: 'CS',
  2633728: 'SQ',
  2145386512: 'OW',
};

/** VR of an attribute that the bench reads; undefined for all others. */
export function dictionaryVr(tag: number): string | undefined {
  return DICTIONARY[tag];
}

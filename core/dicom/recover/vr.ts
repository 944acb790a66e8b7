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
 * The attributes that the bench reads, by value representation (PS3.6 chapters 6 and 7), for data sets that do not
 * state it or state it wrongly. US stands also for those whose sign follows Pixel Representation, OW also for OB.
 */
const TAGS_BY_VR: Readonly<Record<string, string>> = {
  CS: '00080005 00080008 00080060 00089007 00100040 00280004 00281056 00282110',
  UI: '00020002 00020010 00080016 00080018 0020000d 0020000e 00200052',
  DA: '00080020 00080021 00080022 00100030',
  TM: '00080030 00080031 00080032',
  DT: '0008002a 00189074',
  SH: '00080050 00181210',
  LO: '00080070 00081030 0008103e 00081090 00100020 00180010 00181020 00281054 00281055',
  ST: '00082111',
  LT: '00204000',
  PN: '00100010',
  IS: '00200011 00200012 00200013 00200100 00280008',
  DS: '00180050 00180060 00181060 00181100 00200032 00200037 00280030 00281050 00281051 00281052 00281053',
  US: '00209156 00280002 00280010 00280011 00280100 00280101 00280102 00280103 00280120 00280121',
  UL: '00209128',
  FL: '00209241',
  FD: '00209153',
  SQ:
    '00041220 00189118 00189301 00189314 00189325 00189329 00209111 00209113 00209116 00283000 ' +
    '00289110 00289132 00289145 00880200 52009229 52009230',
  OW: '7fe00010',
};

const VR_BY_KEY: Readonly<Record<string, string>> = Object.fromEntries(
  Object.entries(TAGS_BY_VR).flatMap(([vr, tags]) => tags.split(' ').map((tag) => [`x${tag}`, vr])),
);

const VR_BY_TAG: ReadonlyMap<number, string> = new Map(
  Object.entries(VR_BY_KEY).map(([key, vr]) => [Number.parseInt(key.slice(1), 16), vr]),
);

/** VR of an attribute that the bench reads, and of group lengths; undefined for all others. */
export function dictionaryVr(tag: number): string | undefined {
  return VR_BY_TAG.get(tag) ?? ((tag & 0xffff) === 0 ? 'UL' : undefined);
}

/** @param key a tag in the form 'x00280010' */
export function dictionaryVrOfKey(key: string): string | undefined {
  return VR_BY_KEY[key] ?? (key.endsWith('0000') ? 'UL' : undefined);
}

/** True unless the file's VR is another than the dictionary's, words and signs apart that the standard lets vary. */
export function agreesWithDictionary(fileVr: string, dictionary: string | undefined): boolean {
  if (dictionary === undefined || fileVr === dictionary) return true;
  return (dictionary === 'US' && fileVr === 'SS') || (dictionary === 'OW' && fileVr === 'OB');
}

/** Both letters of a VR as one number, as they stand in the file. */
export function vrNumber(vr: string): number {
  return vr.charCodeAt(0) * 0x100 + vr.charCodeAt(1);
}

const NUMBERS_BY_TAG: ReadonlyMap<number, readonly number[]> = new Map(
  [...VR_BY_TAG].map(([tag, vr]) => {
    const also = vr === 'US' ? ['SS'] : vr === 'OW' ? ['OB'] : [];
    return [tag, [vr, ...also].map(vrNumber)];
  }),
);

const UNSIGNED_LONG = vrNumber('UL');

/** {@link agreesWithDictionary} for the two letters as one number: for readers that make no strings. */
export function agreesByNumber(fileVr: number, tag: number): boolean {
  if ((tag & 0xffff) === 0) return fileVr === UNSIGNED_LONG;
  const numbers = NUMBERS_BY_TAG.get(tag);
  return numbers === undefined || numbers.includes(fileVr);
}

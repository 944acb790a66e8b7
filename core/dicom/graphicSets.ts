/** A set of graphic characters that an escape sequence calls into the left (G0) or the right (G1) half of the code. */
export interface GraphicSet {
  /** ISO-IR number of the set, as the terms of Specific Character Set have it. */
  readonly ir: number;
  readonly half: 'G0' | 'G1';
  readonly bytesEach: 1 | 2;
  /** The character of one or two bytes, in the half they stand in; U+FFFD where the set has none. */
  decode(first: number, second: number): string;
}

const decoders = new Map<string, TextDecoder>();

/** A decoder of the Encoding standard, made once. */
export function decoderOf(label: string): TextDecoder {
  const known = decoders.get(label);
  if (known !== undefined) return known;
  const decoder = new TextDecoder(label);
  decoders.set(label, decoder);
  return decoder;
}

/** Right half of an ISO 8859 part: A0 to FF. The windows labels agree with ISO there, which has controls below. */
function rightHalf(ir: number, label: string): GraphicSet {
  let table: readonly string[] | undefined;
  const makeTable = (): readonly string[] =>
    Array.from({ length: 0x60 }, (_, index) =>
      decoderOf(label).decode(Uint8Array.of(0xa0 + index)),
    );
  return {
    ir,
    half: 'G1',
    bytesEach: 1,
    decode: (byte) => {
      table ??= makeTable();
      return table[byte - 0xa0] ?? '\ufffd';
    },
  };
}

/** Two bytes of 94 × 94 characters, handed to a decoder that has the set in its right half. */
function twoBytes(ir: number, half: 'G0' | 'G1', label: string, before: readonly number[] = []) {
  return {
    ir,
    half,
    bytesEach: 2,
    decode: (first: number, second: number) =>
      decoderOf(label).decode(Uint8Array.of(...before, first | 0x80, second | 0x80)),
  } as const;
}

export const ASCII: GraphicSet = {
  ir: 6,
  half: 'G0',
  bytesEach: 1,
  decode: (byte) => String.fromCharCode(byte),
};

/** JIS X 0201, left half: ASCII with a yen sign and an overline. The byte of the yen sign stays the value delimiter. */
export const ROMAJI: GraphicSet = {
  ir: 13,
  half: 'G0',
  bytesEach: 1,
  decode: (byte) => (byte === 0x7e ? '\u203e' : String.fromCharCode(byte)),
};

/** JIS X 0201, right half: half-width katakana, A1 to DF. */
export const KATAKANA: GraphicSet = {
  ir: 13,
  half: 'G1',
  bytesEach: 1,
  decode: (byte) =>
    byte >= 0xa1 && byte <= 0xdf ? String.fromCharCode(0xff61 + byte - 0xa1) : '\ufffd',
};

/** By the bytes that follow ESC (PS3.3 tables C.12-3 and C.12-4). */
export const SETS_BY_ESCAPE: Readonly<Record<string, GraphicSet>> = {
  '(B': ASCII,
  '(J': ROMAJI,
  ')I': KATAKANA,
  '-A': rightHalf(100, 'windows-1252'),
  '-B': rightHalf(101, 'iso-8859-2'),
  '-C': rightHalf(109, 'iso-8859-3'),
  '-D': rightHalf(110, 'iso-8859-4'),
  '-L': rightHalf(144, 'iso-8859-5'),
  '-G': rightHalf(127, 'iso-8859-6'),
  '-F': rightHalf(126, 'iso-8859-7'),
  '-H': rightHalf(138, 'iso-8859-8'),
  '-M': rightHalf(148, 'windows-1254'),
  '-T': rightHalf(166, 'windows-874'),
  '-b': rightHalf(203, 'iso-8859-15'),
  $B: twoBytes(87, 'G0', 'euc-jp'),
  '$(D': twoBytes(159, 'G0', 'euc-jp', [0x8f]),
  '$)C': twoBytes(149, 'G1', 'euc-kr'),
  '$)A': twoBytes(58, 'G1', 'gbk'),
};

const RIGHT_SETS: ReadonlyMap<number, GraphicSet> = new Map(
  Object.values(SETS_BY_ESCAPE)
    .filter(({ half }) => half === 'G1')
    .map((set) => [set.ir, set]),
);

const IR_NUMBERS: ReadonlySet<number> = new Set(Object.values(SETS_BY_ESCAPE).map(({ ir }) => ir));

/** True for the ISO-IR numbers that terms of Specific Character Set may have. */
export function isKnownIr(ir: number): boolean {
  return IR_NUMBERS.has(ir);
}

/** What both halves hold at the beginning of each value when a set stands first in Specific Character Set. */
export function initialSets(ir: number): { g0: GraphicSet; g1: GraphicSet | undefined } {
  return { g0: ir === 13 ? ROMAJI : ASCII, g1: RIGHT_SETS.get(ir) };
}

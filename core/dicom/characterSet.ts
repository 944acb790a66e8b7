import type { Finding } from '../result.js';
import { decodeExtended } from './codeExtensions.js';
import { decoderOf, initialSets, isKnownIr } from './graphicSets.js';

/** How the texts of a data set are to be read. */
export interface CharacterSet {
  /** What was put right in the statement itself. */
  readonly findings: readonly Finding[];
  decode(bytes: Uint8Array, isPersonName: boolean): DecodedText;
}

export interface DecodedText {
  readonly text: string;
  readonly callsUnlisted: boolean;
}

const FINDINGS = {
  misspelt: {
    code: 'character-set-misspelt',
    text: 'Specific Character Set is misspelt; it was read as the term that it must mean.',
  },
  notAlone: {
    code: 'character-set-not-alone',
    text: 'Specific Character Set lists UTF-8, GB18030 or GBK with others, which is not allowed; only the first was used.',
  },
  unknown: {
    code: 'character-set-unknown',
    text: 'Specific Character Set is not known; text was read as ASCII, and � stands for all else.',
  },
} as const;

/** Sets that stand alone, without code extensions (PS3.3 table C.12-5). */
const ALONE: Readonly<Record<string, string>> = {
  'ISO_IR 192': 'utf-8',
  GB18030: 'gb18030',
  GBK: 'gbk',
};

interface Term {
  readonly alone?: string;
  readonly ir?: number;
  readonly misspelt: boolean;
}

/** One value of Specific Character Set; neither `alone` nor `ir` when it is not known. Empty is ASCII. */
function readTerm(value: string, several: boolean): Term {
  if (value === '') return { ir: 6, misspelt: false };
  const exact = ALONE[value];
  if (exact !== undefined) return { alone: exact, misspelt: false };
  const iso = /^ISO[ _-]?(2022)?[ _-]?IR[ _-]?(\d+)$/i.exec(value);
  if (iso !== null) {
    const ir = Number(iso[2]);
    const extended = iso[1] !== undefined;
    if (ir === 192) return { alone: 'utf-8', misspelt: true };
    if (!isKnownIr(ir)) return { misspelt: false };
    const proper = extended || several ? `ISO 2022 IR ${ir}` : `ISO_IR ${ir}`;
    return { ir, misspelt: value !== proper };
  }
  if (/^GB[ _-]?18030$/i.test(value)) return { alone: 'gb18030', misspelt: true };
  if (/^GBK$/i.test(value)) return { alone: 'gbk', misspelt: true };
  if (/^UTF[ _-]?8$/i.test(value)) return { alone: 'utf-8', misspelt: true };
  return { misspelt: false };
}

const read = new Map<string, CharacterSet>();

/** Files may state anything; so many different statements are remembered. */
const REMEMBERED = 64;

/**
 * The character set that Specific Character Set (0008,0005) states (PS3.3 C.12.1.1.2, PS3.5 6.1), its values joined by
 * backslashes as in the file. Nothing is guessed from the texts themselves. Terms that are misspelt beyond doubt are
 * read as what they must mean; terms that are not known are read as ASCII.
 */
export function characterSetOf(stated: string): CharacterSet {
  const known = read.get(stated);
  if (known !== undefined) return known;
  if (read.size >= REMEMBERED) read.clear();
  const characterSet = readCharacterSet(stated);
  read.set(stated, characterSet);
  return characterSet;
}

function readCharacterSet(stated: string): CharacterSet {
  const values = stated.split('\\').map((value) => value.trim());
  const terms = values.map((value) => readTerm(value, values.length > 1));
  const [first = { ir: 6, misspelt: false }] = terms;
  const findings: Finding[] = [];
  if (terms.some((term) => term.misspelt)) findings.push(FINDINGS.misspelt);
  if (terms.length > 1 && terms.some((term) => term.alone !== undefined)) {
    findings.push(FINDINGS.notAlone);
  }
  if (terms.some((term) => term.alone === undefined && term.ir === undefined)) {
    findings.push(FINDINGS.unknown);
  }
  const { alone } = first;
  if (alone !== undefined) {
    return {
      findings,
      decode: (bytes) => ({
        text: asciiText(bytes) ?? decoderOf(alone).decode(bytes),
        callsUnlisted: false,
      }),
    };
  }
  const irs = terms.flatMap((term) => term.ir ?? []);
  const initial = { ...initialSets(first.ir ?? 6), listed: new Set([6, ...irs]) };
  const leftIsAscii = initial.g0.ir === 6;
  return {
    findings,
    decode: (bytes, isPersonName) => {
      const ascii = leftIsAscii ? asciiText(bytes) : undefined;
      return ascii === undefined
        ? decodeExtended(bytes, initial, isPersonName)
        : { text: ascii, callsUnlisted: false };
    },
  };
}

/** Most values are plain ASCII, in every set: they need no decoder. Undefined for all others. */
export function asciiText(bytes: Uint8Array): string | undefined {
  let text = '';
  for (let i = 0; i < bytes.length; i++) {
    const byte = bytes[i] ?? 0;
    if (byte >= 0x80 || byte === 0x1b) return undefined;
    text += String.fromCharCode(byte);
  }
  return text;
}

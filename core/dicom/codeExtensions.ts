import { type GraphicSet, SETS_BY_ESCAPE } from './graphicSets.js';

const ESCAPE = 0x1b;

/** The state at the beginning of each value, and the sets that a text may call. */
export interface CodeExtensions {
  readonly g0: GraphicSet;
  readonly g1: GraphicSet | undefined;
  /** ISO-IR numbers that Specific Character Set lists. */
  readonly listed: ReadonlySet<number>;
}

export interface ExtendedText {
  readonly text: string;
  /** A set was called that Specific Character Set does not list; it was used all the same. */
  readonly callsUnlisted: boolean;
}

/**
 * Text with code extensions (PS3.5 6.1.2.5). Both halves go back to their first sets before each control character and
 * backslash, in a person name before ^ and = too (6.1.2.5.3). In a set of two bytes none of these is looked for: any
 * byte may be half of a character. What a set does not have becomes U+FFFD.
 */
export function decodeExtended(
  bytes: Uint8Array,
  initial: CodeExtensions,
  isPersonName: boolean,
): ExtendedText {
  let { g0, g1 } = initial;
  let text = '';
  let callsUnlisted = false;
  let at = 0;
  const reset = (): void => {
    g0 = initial.g0;
    g1 = initial.g1;
  };
  while (at < bytes.length) {
    const byte = bytes[at] ?? 0;
    if (byte === ESCAPE) {
      const called = escapeAt(bytes, at);
      if (called === undefined) {
        text += '\ufffd';
        at += 1;
        continue;
      }
      if (called.set.half === 'G0') g0 = called.set;
      else g1 = called.set;
      callsUnlisted ||= !initial.listed.has(called.set.ir);
      at += called.length;
    } else if (byte < 0x21 || byte === 0x7f) {
      if (byte !== 0x20) reset();
      text += String.fromCharCode(byte);
      at += 1;
    } else if (byte >= 0x80 && byte < 0xa0) {
      // Controls of the right half: none is allowed, and none is text.
      text += String.fromCharCode(byte);
      at += 1;
    } else {
      const isLeft = byte < 0x80;
      const set = isLeft ? g0 : g1;
      const next = bytes[at + 1] ?? 0;
      const isPair = isLeft ? next > 0x20 && next < 0x7f : next > 0xa0 && next < 0xff;
      if (set === undefined || (set.bytesEach === 2 && !isPair)) {
        text += '\ufffd';
        at += 1;
        continue;
      }
      if (set.bytesEach === 1 && (byte === 0x5c || (isPersonName && isNameDelimiter(byte)))) {
        reset();
      }
      text += set.decode(byte, next);
      at += set.bytesEach;
    }
  }
  return { text, callsUnlisted };
}

/** ^ between components, = between component groups. */
function isNameDelimiter(byte: number): boolean {
  return byte === 0x5e || byte === 0x3d;
}

function escapeAt(bytes: Uint8Array, at: number): { set: GraphicSet; length: number } | undefined {
  for (const count of [2, 3]) {
    const letters = String.fromCharCode(...bytes.subarray(at + 1, at + 1 + count));
    const set = SETS_BY_ESCAPE[letters];
    if (set !== undefined) return { set, length: 1 + count };
  }
  return undefined;
}

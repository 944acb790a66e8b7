import type { Attributes } from './attributes.js';

/** A lookup table as a file has it (PS3.3 C.11.1.1, C.11.2.1.1). */
export interface LookupTable {
  /** Input of the first value. */
  readonly firstInput: number;
  /** Bits of a value, as stated. */
  readonly bits: number;
  readonly values: readonly number[];
}

/**
 * The table of an item of a Modality or VOI LUT Sequence. Undefined when its descriptor or data are missing or do not
 * fit each other.
 *
 * @param signed the first input is a signed number
 */
export function readLookupTable(item: Attributes, signed: boolean): LookupTable | undefined {
  const descriptor = item.shorts('x00283002');
  const data = item.shorts('x00283006');
  const [stated, first, bits] = descriptor ?? [];
  if (data === undefined || stated === undefined || first === undefined || bits === undefined) {
    return undefined;
  }
  // Zero stands for 65,536 entries, which do not fit into the descriptor.
  const entries = stated === 0 ? 65536 : stated;
  // Tables of 8 bits may be packed two to a word.
  const values =
    bits <= 8 && data.length < entries ? data.flatMap((word) => [word & 0xff, word >> 8]) : data;
  if (values.length < entries) return undefined;
  const firstInput = signed && first > 0x7fff ? first - 0x10000 : first;
  return { firstInput, bits, values: values.slice(0, entries) };
}

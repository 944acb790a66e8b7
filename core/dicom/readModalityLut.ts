import type { Attributes } from './attributes.js';
import type { ModalityLut } from './ctImage.js';

/**
 * The table of a Modality LUT Sequence (PS3.3 C.11.1.1): for looking at the image only. Undefined when its descriptor
 * or data are missing or do not fit each other.
 */
export function readModalityLut(attributes: Attributes, signed: boolean): ModalityLut | undefined {
  const item = attributes.items('x00283000')?.[0];
  const descriptor = item?.shorts('x00283002');
  const data = item?.shorts('x00283006');
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
  const firstStored = signed && first > 0x7fff ? first - 0x10000 : first;
  return { firstStored, values: values.slice(0, entries) };
}

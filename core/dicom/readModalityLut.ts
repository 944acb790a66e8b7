import type { Attributes } from './attributes.js';
import type { ModalityLut } from './ctImage.js';
import { readLookupTable } from './readLookupTable.js';

/**
 * The table of a Modality LUT Sequence (PS3.3 C.11.1.1): for looking at the image only. Undefined when its descriptor
 * or data are missing or do not fit each other.
 */
export function readModalityLut(attributes: Attributes, signed: boolean): ModalityLut | undefined {
  const item = attributes.items('x00283000')?.[0];
  const table = item && readLookupTable(item, signed);
  return table && { firstStored: table.firstInput, values: table.values };
}

import { type Result, success } from '../../result.js';
import type { DataSet, ElementPlace } from '../dataSet.js';
import { type ElementHead, type Layout, tagKey, UNDEFINED_LENGTH } from './elementHead.js';
import { findLayout } from './findLayout.js';
import { type Irregularities, noteIrregularities } from './irregularities.js';
import { readItems } from './readItems.js';
import { agreesWithDictionary, dictionaryVr } from './vr.js';
import { walkElements } from './walkElements.js';

const PIXEL_DATA = 0x7fe00010;

/** A data set that the ordinary parser does not read. Its transfer syntax is as the file says, right or wrong. */
export interface RecoveredDataSet extends DataSet {
  readonly layout: Layout;
}

/**
 * Reads what others wrote wrongly but readably: no preamble, no or wrong transfer syntax, unknown or wrong VR, odd
 * lengths, broken private sequences. Lengths are checked before anything is made, and nothing recurs.
 */
export function recoverDataSet(file: Uint8Array, hasPreamble: boolean): Result<RecoveredDataSet> {
  const irregular = noteIrregularities();
  const found = findLayout(file, hasPreamble, irregular);
  if (!found.ok) return found;
  const { bytes, layout, start, meta } = found.value;
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  const walked = walkElements(view, start, layout, irregular, PIXEL_DATA);
  if (!walked.ok) return walked;
  const { elements } = walked.value;
  const top = dataSetOf(bytes, elements, layout, irregular, meta.transferSyntaxUid);
  const metaPlaces = new Map(meta.elements.map((head) => [tagKey(head.tag), placeOf(head)]));
  return success({ ...top, find: (tag) => top.find(tag) ?? metaPlaces.get(tag), layout });
}

function dataSetOf(
  bytes: Uint8Array,
  elements: readonly ElementHead[],
  layout: Layout,
  irregular: Irregularities,
  transferSyntaxUid: string | undefined,
): DataSet {
  const heads = new Map(elements.map((head) => [tagKey(head.tag), head]));
  const pixelData = heads.get(tagKey(PIXEL_DATA));
  return {
    bytes,
    littleEndian: layout.littleEndian,
    ...(transferSyntaxUid !== undefined && { transferSyntaxUid }),
    find: (tag) => {
      const head = heads.get(tag);
      return head && placeOf(head);
    },
    items: (tag) => {
      const head = heads.get(tag);
      return (
        head &&
        readItems(bytes, head, layout)?.map((item) =>
          dataSetOf(bytes, item.elements, item.layout, irregular, transferSyntaxUid),
        )
      );
    },
    ...(pixelData && {
      pixelData: {
        offset: pixelData.valueAt,
        length: pixelData.length,
        inFragments: pixelData.length === UNDEFINED_LENGTH,
      },
    }),
    findings: irregular.findings(),
  };
}

/** With the file's VR where it is another than the dictionary's. UN says nothing: the dictionary's holds. */
function placeOf({ tag, vr, valueAt, length, guessed }: ElementHead): ElementPlace {
  const place = { offset: valueAt, length };
  const says = !guessed && vr !== 'UN' && !agreesWithDictionary(vr, dictionaryVr(tag));
  return says ? { ...place, fileVr: vr } : place;
}

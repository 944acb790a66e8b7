import { type ElementHead, readHead, UNDEFINED_LENGTH, vrLetters } from './elementHead.js';
import type { Irregularities } from './irregularities.js';
import { isKnownVr } from './vr.js';

/** File Meta Information (PS3.10 7.1): group 0002 before the data set. */
export interface FileMeta {
  /** Where the data set begins. */
  readonly end: number;
  readonly elements: readonly ElementHead[];
  readonly transferSyntaxUid?: string;
  readonly sopClassUid?: string;
}

/** Reads on while the group is 0002, whatever its group length says, in explicit or implicit VR. */
export function readMeta(view: DataView, start: number, irregular: Irregularities): FileMeta {
  const elements: ElementHead[] = [];
  let at = start;
  while (at + 8 <= view.byteLength && view.getUint16(at, true) === 0x0002) {
    const explicitVr = isKnownVr(vrLetters(view, at));
    const head = readHead(view, at, { explicitVr, littleEndian: true });
    if (head === undefined || head.length === UNDEFINED_LENGTH) break;
    const end = head.valueAt + head.length;
    if (end > view.byteLength) break;
    if (!explicitVr) irregular.note('meta-implicit');
    elements.push(head);
    at = end;
  }
  const length = elements.find(({ tag }) => tag === 0x00020000);
  if (length?.length === 4 && view.getUint32(length.valueAt, true) !== at - length.valueAt - 4) {
    irregular.note('meta-length');
  }
  const uid = (tag: number): string | undefined => {
    const element = elements.find((one) => one.tag === tag);
    const text = element && asciiOf(view, element);
    return text === '' ? undefined : text;
  };
  const transferSyntaxUid = uid(0x00020010);
  const sopClassUid = uid(0x00020002);
  return {
    end: at,
    elements,
    ...(transferSyntaxUid !== undefined && { transferSyntaxUid }),
    ...(sopClassUid !== undefined && { sopClassUid }),
  };
}

function asciiOf(view: DataView, { valueAt, length }: ElementHead): string {
  let text = '';
  for (let i = 0; i < length; i++) text += String.fromCharCode(view.getUint8(valueAt + i));
  return text.replace(/^[\0 ]+|[\0 ]+$/g, '');
}

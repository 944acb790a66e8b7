import type { ElementHead, Layout } from './elementHead.js';
import { readHead, UNDEFINED_LENGTH } from './elementHead.js';
import { noteIrregularities } from './irregularities.js';
import { walkElements } from './walkElements.js';

const ITEM = 0xfffee000;

/** One item of a sequence. */
export interface ReadItem {
  readonly elements: readonly ElementHead[];
  readonly layout: Layout;
}

/**
 * The items of a sequence that has been stepped over. An item that breaks the rules is there, without elements;
 * what was forgiven has been noted when it was stepped over.
 */
export function readItems(
  bytes: Uint8Array,
  sequence: ElementHead,
  outer: Layout,
): readonly ReadItem[] | undefined {
  const open = sequence.length === UNDEFINED_LENGTH;
  const mayHaveItems =
    sequence.vr === 'SQ' || (sequence.vr === 'UN' && (open || !outer.explicitVr));
  if (!mayHaveItems) return undefined;
  const layout = open && sequence.vr === 'UN' ? { explicitVr: false, littleEndian: true } : outer;
  const end = open ? bytes.length : sequence.valueAt + sequence.length;
  const items: ReadItem[] = [];
  let at = sequence.valueAt;
  while (at < end) {
    const head = readHead(viewUpTo(bytes, end), at, layout);
    if (head?.tag !== ITEM) break;
    const closed = head.length !== UNDEFINED_LENGTH;
    const itemEnd = closed ? head.valueAt + head.length : end;
    if (itemEnd > end) break;
    const view = viewUpTo(bytes, itemEnd);
    const walked = walkElements(view, head.valueAt, layout, noteIrregularities());
    items.push({ elements: walked.ok ? walked.value.elements : [], layout });
    if (!walked.ok && !closed) break;
    at = closed ? itemEnd : (walked.ok ? walked.value.end : end) + 8;
  }
  return items;
}

function viewUpTo(bytes: Uint8Array, end: number): DataView {
  return new DataView(bytes.buffer, bytes.byteOffset, end);
}

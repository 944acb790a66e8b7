import { type Layout, readHead, UNDEFINED_LENGTH } from './elementHead.js';
import { dictionaryVr, isKnownVr } from './vr.js';

const CANDIDATES: readonly Layout[] = [
  { explicitVr: true, littleEndian: true },
  { explicitVr: false, littleEndian: true },
  { explicitVr: true, littleEndian: false },
];

/** So many elements in a row have to make sense. */
const ELEMENTS = 3;

/**
 * How a data set is really laid out, as its first elements show. It is decided here, once for the file: inside
 * sequences the same look would misfire.
 *
 * @param stated what the file says; it is right where the bytes fit more than one layout
 * @returns undefined when the bytes fit none, or several and the file says nothing
 */
export function probeLayout(
  view: DataView,
  start: number,
  stated: Layout | undefined,
): Layout | undefined {
  const fitting = CANDIDATES.filter((layout) => makesSense(view, start, layout));
  const said = fitting.find(
    (layout) =>
      layout.explicitVr === stated?.explicitVr && layout.littleEndian === stated.littleEndian,
  );
  if (said !== undefined) return said;
  if (fitting.length === 1) return fitting[0];
  return fitting.find((layout) => layout.explicitVr && knowsVr(view, start, layout));
}

/** A data set begins in group 0008, or 0004 to 0010 in odd files, and its tags ascend. */
function makesSense(view: DataView, start: number, layout: Layout): boolean {
  let at = start;
  let before = 0x00040000 - 1;
  for (let count = 0; count < ELEMENTS; count++) {
    if (at === view.byteLength) return count > 0;
    const head = readHead(view, at, layout);
    if (head === undefined) return count > 0 && at + 12 > view.byteLength;
    if (head.guessed || head.tag <= before) return false;
    if (layout.explicitVr && !isKnownVr(head.vr)) return false;
    if (count === 0 && head.tag >>> 16 > 0x0010) return false;
    if (head.length === UNDEFINED_LENGTH) return count > 0;
    // What does not fit may go on in a part of the file that was not read: but not at the first element.
    if (head.length > view.byteLength - head.valueAt) return count > 0 && layout.explicitVr;
    before = head.tag;
    at = head.valueAt + head.length;
  }
  return true;
}

function knowsVr(view: DataView, start: number, layout: Layout): boolean {
  const head = readHead(view, start, layout);
  return head !== undefined && head.vr === dictionaryVr(head.tag);
}

import { type Result, refuse, success } from '../../result.js';
import { type ElementHead, type Layout, readHead, UNDEFINED_LENGTH } from './elementHead.js';

/** Deeper than this no real object nests. */
export const DEPTH_AT_MOST = 64;

const ITEM = 0xfffee000;
const ITEM_END = 0xfffee00d;
const SEQUENCE_END = 0xfffee0dd;

/**
 * Steps over a sequence of undefined length, without recursion: to the byte behind its delimiter.
 * Inside UN it is implicit VR little endian (PS3.5 6.2.2, note 2).
 */
export function skipSequence(view: DataView, head: ElementHead, layout: Layout): Result<number> {
  const inner: Layout = head.vr === 'UN' ? { explicitVr: false, littleEndian: true } : layout;
  const open: ('sequence' | 'item')[] = ['sequence'];
  let at = head.valueAt;
  while (open.length > 0) {
    if (open.length > 2 * DEPTH_AT_MOST) {
      return refuse('nested-too-deep', `Sequences are nested more than ${DEPTH_AT_MOST} deep.`, {
        offset: at,
      });
    }
    const next = readHead(view, at, inner);
    if (next === undefined) {
      return refuse(
        'unclosed-sequence',
        `The sequence that begins at byte ${head.at} is not closed.`,
        {
          offset: head.at,
        },
      );
    }
    const inSequence = open[open.length - 1] === 'sequence';
    // A delimiter's own length is ignored: some writers fill it.
    if (next.tag === SEQUENCE_END || next.tag === ITEM_END) {
      open.pop();
      at = next.valueAt;
    } else if (inSequence && next.tag !== ITEM) {
      return refuse(
        'broken-sequence',
        `The sequence that begins at byte ${head.at} holds no item at byte ${at}.`,
        {
          offset: at,
        },
      );
    } else if (next.length === UNDEFINED_LENGTH) {
      open.push(inSequence ? 'item' : 'sequence');
      at = next.valueAt;
    } else if (next.length > view.byteLength - next.valueAt) {
      return refuse('cut-header', `The file ends at byte ${view.byteLength}, inside a sequence.`, {
        offset: at,
      });
    } else {
      at = next.valueAt + next.length;
    }
  }
  return success(at);
}

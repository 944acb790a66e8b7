import { type Result, refuse, success } from '../../result.js';
import { tagInWords } from '../dataSet.js';
import {
  type ElementHead,
  isPrivate,
  type Layout,
  readHead,
  readTag,
  tagKey,
  UNDEFINED_LENGTH,
} from './elementHead.js';
import type { Irregularities } from './irregularities.js';
import { stepOver } from './stepOver.js';

const ITEM_END = 0xfffee00d;
const SEQUENCE_END = 0xfffee0dd;

/** The elements of one level, and where the next byte stands. */
export interface WalkedElements {
  readonly elements: readonly ElementHead[];
  readonly end: number;
}

/**
 * The elements of a data set or an item, one level of them. Sequences are stepped over; a maker's own that breaks
 * the rules is skipped to its delimiter.
 *
 * @param view ends where the data set ends
 * @param until a tag at which to stop: its head is the last element, its value is not looked at
 */
export function walkElements(
  view: DataView,
  start: number,
  layout: Layout,
  irregular: Irregularities,
  until?: number,
): Result<WalkedElements> {
  const elements: ElementHead[] = [];
  let at = start;
  while (at < view.byteLength) {
    const head = readHead(view, at, layout);
    if (head === undefined) return refuseHead(view, at, layout);
    if (head.tag === until) {
      elements.push(head);
      return success({ elements, end: head.valueAt });
    }
    if (head.tag === ITEM_END) return success({ elements, end: at });
    const stepped = stepOver(view, head, layout, irregular);
    const end = stepped.ok ? stepped : behindBroken(view, head, layout, stepped);
    if (!end.ok) return end;
    elements.push(head);
    at = end.value;
  }
  return success({ elements, end: at });
}

/** Past a private sequence that breaks the rules: to a delimiter behind which the data set goes on. */
function behindBroken(
  view: DataView,
  head: ElementHead,
  layout: Layout,
  broken: Result<number>,
): Result<number> {
  const isSequence = head.vr === 'SQ' || head.vr === 'UN';
  const mayBeSkipped = isSequence && isPrivate(head.tag) && head.length === UNDEFINED_LENGTH;
  if (!mayBeSkipped || (!broken.ok && broken.refusal.code === 'nested-too-deep')) return broken;
  for (let at = head.valueAt; at + 8 <= view.byteLength; at++) {
    if (view.getUint8(at) !== 0xfe && view.getUint8(at) !== 0xff) continue;
    if (readTag(view, at, layout) !== SEQUENCE_END) continue;
    const next = readHead(view, at + 8, layout);
    const fits =
      next !== undefined &&
      !next.guessed &&
      next.tag > head.tag &&
      (next.length === UNDEFINED_LENGTH || next.length <= view.byteLength - next.valueAt);
    if (fits || at + 8 === view.byteLength) return success(at + 8);
  }
  return broken;
}

function refuseHead(view: DataView, at: number, layout: Layout): Result<never> {
  if (view.byteLength - at < 12) {
    return refuse(
      'cut-header',
      `The file ends at byte ${view.byteLength}, in the head of an element.`,
      { offset: at },
    );
  }
  const tag = tagInWords(tagKey(readTag(view, at, layout)));
  return refuse(
    'bad-vr',
    `${tag} at byte ${at} can't be read: its value representation and length make no sense.`,
    { tag, offset: at },
  );
}

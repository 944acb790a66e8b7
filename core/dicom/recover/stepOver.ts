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
import { agreesWithDictionary, dictionaryVr } from './vr.js';

/** Deeper than this no real object nests. */
export const DEPTH_AT_MOST = 64;

const ITEM = 0xfffee000;
const ITEM_END = 0xfffee00d;
const SEQUENCE_END = 0xfffee0dd;
const PIXEL_DATA = 0x7fe00010;

const IMPLICIT: Layout = { explicitVr: false, littleEndian: true };

/** A sequence, item or run of fragments that has been entered. */
interface Frame {
  readonly kind: 'sequence' | 'item' | 'fragments';
  /** Where it ends; undefined when a delimiter tells. */
  readonly end: number | undefined;
  readonly layout: Layout;
  /** It is skipped without a finding when it breaks the rules: a maker's own, or perhaps no sequence at all. */
  readonly quiet: boolean;
}

/**
 * Steps over an element, without recursion, to the byte behind it; what stands in sequences is looked at on the way.
 * A sequence of known length that breaks the rules is skipped as a whole, one of unknown length refuses.
 */
export function stepOver(
  view: DataView,
  head: ElementHead,
  layout: Layout,
  irregular: Irregularities,
): Result<number> {
  const open: Frame[] = [];
  const first = enter(view, head, layout, open, irregular);
  if (!first.ok) return first;
  let at = first.value;
  while (open.length > 0) {
    if (open.length > 2 * DEPTH_AT_MOST) {
      return refuse('nested-too-deep', `Sequences are nested more than ${DEPTH_AT_MOST} deep.`, {
        offset: at,
      });
    }
    const step = stepInside(view, at, open, head, irregular);
    if (step.ok) {
      at = step.value;
      continue;
    }
    const end = leaveBroken(open, irregular);
    if (end === undefined) return step;
    at = end;
  }
  return success(at);
}

/** One step in the innermost frame: out of it at its end, into an item or a sequence, or over a value. */
function stepInside(
  view: DataView,
  at: number,
  open: Frame[],
  outermost: ElementHead,
  irregular: Irregularities,
): Result<number> {
  const frame = open[open.length - 1];
  if (frame === undefined) throw new RangeError('no frame is open');
  if (frame.end !== undefined && at >= frame.end) {
    if (at > frame.end) return refuseBroken(outermost, at);
    open.pop();
    return success(at);
  }
  const next = readHead(view, at, frame.layout);
  if (next === undefined) {
    return refuse(
      'unclosed-sequence',
      `The sequence ${tagInWords(tagKey(outermost.tag))} that begins at byte ${outermost.at} is not closed.`,
      { tag: tagInWords(tagKey(outermost.tag)), offset: outermost.at },
    );
  }
  if (next.tag === ITEM_END || next.tag === SEQUENCE_END) {
    const closes = next.tag === ITEM_END ? frame.kind === 'item' : frame.kind !== 'item';
    if (!closes) return refuseUnclosed(outermost, at);
    if (next.length !== 0) irregular.note('delimiter-length');
    // Some writers close a sequence of known length all the same.
    if (frame.end === undefined) open.pop();
    return success(next.valueAt);
  }
  if (frame.kind === 'item') {
    if (next.tag === ITEM) return refuseUnclosed(outermost, at);
    return enter(view, next, frame.layout, open, irregular);
  }
  if (next.tag !== ITEM) {
    const goesOn = frame.end === undefined && !next.guessed && next.tag > outermost.tag;
    return goesOn ? refuseUnclosed(outermost, at) : refuseBroken(outermost, at);
  }
  const end = next.length === UNDEFINED_LENGTH ? undefined : next.valueAt + next.length;
  if (end !== undefined && end > (frame.end ?? view.byteLength)) return refuseCut(view, next);
  if (frame.kind === 'fragments') {
    return end === undefined ? refuseBroken(outermost, at) : success(end);
  }
  open.push({ kind: 'item', end, layout: frame.layout, quiet: frame.quiet });
  return success(next.valueAt);
}

/** Enters an element when it is a sequence or in fragments, else steps over its value. */
function enter(
  view: DataView,
  head: ElementHead,
  layout: Layout,
  open: Frame[],
  irregular: Irregularities,
): Result<number> {
  const outer = open[open.length - 1];
  noteHead(head, outer?.quiet ?? false, irregular);
  const quiet = (outer?.quiet ?? false) || isPrivate(head.tag);
  const { valueAt, length } = head;
  if (length === UNDEFINED_LENGTH) {
    if (head.tag === PIXEL_DATA) {
      open.push({ kind: 'fragments', end: undefined, layout, quiet });
      return success(valueAt);
    }
    if (layout.explicitVr && head.vr !== 'SQ' && head.vr !== 'UN') {
      const tag = tagInWords(tagKey(head.tag));
      return refuse(
        'undefined-length',
        `${tag} at byte ${head.at} has no length, which only sequences may lack.`,
        { tag, offset: head.at },
      );
    }
    // In UN stands a sequence in implicit VR little endian, whatever the file is in (PS3.5 6.2.2, note 2).
    const inner = head.vr === 'UN' ? IMPLICIT : layout;
    open.push({ kind: 'sequence', end: undefined, layout: inner, quiet });
    return success(valueAt);
  }
  if (length > view.byteLength - valueAt) return refuseCut(view, head);
  const looksLikeItems =
    !layout.explicitVr &&
    head.vr === 'UN' &&
    !isPrivate(head.tag) &&
    length >= 8 &&
    readTag(view, valueAt, layout) === ITEM;
  if (head.vr === 'SQ' || looksLikeItems) {
    const end = valueAt + length;
    open.push({ kind: 'sequence', end, layout, quiet: quiet || looksLikeItems });
    return success(valueAt);
  }
  return success(valueAt + length);
}

/** @param quiet inside a maker's own sequence: representations there are nobody's business */
function noteHead(head: ElementHead, quiet: boolean, irregular: Irregularities): void {
  if (!quiet) {
    if (head.guessed) irregular.note('vr-guessed');
    else if (!agreesWithDictionary(head.vr, dictionaryVr(head.tag))) irregular.note('vr-differs');
  }
  if (head.length !== UNDEFINED_LENGTH && head.length % 2 === 1) irregular.note('odd-length');
}

/** Gives up the innermost frames up to one whose end is known; undefined when there is none. */
function leaveBroken(open: Frame[], irregular: Irregularities): number | undefined {
  for (let frame = open.pop(); frame !== undefined; frame = open.pop()) {
    if (frame.end === undefined) continue;
    if (!frame.quiet) irregular.note('sequence-skipped');
    return frame.end;
  }
  return undefined;
}

function refuseCut(view: DataView, head: ElementHead): Result<never> {
  const tag = tagInWords(tagKey(head.tag));
  return refuse('cut-header', `The file ends at byte ${view.byteLength}, inside ${tag}.`, {
    tag,
    offset: head.valueAt,
  });
}

function refuseUnclosed(outermost: ElementHead, at: number): Result<never> {
  const tag = tagInWords(tagKey(outermost.tag));
  return refuse(
    'unclosed-sequence',
    `The sequence ${tag} that begins at byte ${outermost.at} is not closed at byte ${at}.`,
    { tag, offset: at },
  );
}

function refuseBroken(outermost: ElementHead, at: number): Result<never> {
  const tag = tagInWords(tagKey(outermost.tag));
  return refuse(
    'broken-sequence',
    `The sequence ${tag} that begins at byte ${outermost.at} breaks the rules at byte ${at}.`,
    { tag, offset: at },
  );
}

import { type Result, refuse, success } from '../../result.js';
import type { ElementPlace } from '../dataSet.js';
import { type ByteWalk, type Fragments, walkEnds } from './fragments.js';

/** Where the bytes of one frame stand, in one piece or several. */
export type FramePlaces = readonly ElementPlace[];

/** What the header tells of the frames. */
export interface FrameHints {
  readonly frameCount: number;
  /** Extended Offset Table (7FE0,0001), which stands for the basic one where that is empty. */
  readonly extendedOffsets?: readonly number[];
  /** RLE has one fragment a frame (PS3.5 A.4.2), and no end-of-image mark. */
  readonly isRle: boolean;
}

/**
 * Which fragments make which frame. A single frame is all of them; several are told apart by an offset table, else
 * by one fragment a frame, else by the end-of-image marks that close their last fragments. Of pixels that are cut
 * the frames before the cut are given.
 */
export function* walkFrames(
  found: Fragments,
  { frameCount, extendedOffsets, isRle }: FrameHints,
): ByteWalk<readonly Result<FramePlaces>[]> {
  const { fragments, stopped } = found;
  if (frameCount === 1) {
    return [stopped === undefined ? success(fragments) : { ok: false, refusal: stopped }];
  }
  const offsets = found.offsets.length > 0 ? found.offsets : (extendedOffsets ?? []);
  const groups =
    offsets.length === frameCount
      ? groupsByOffset(found, offsets)
      : isRle || (stopped === undefined && full(fragments).length === frameCount)
        ? full(fragments).map((fragment) => [fragment])
        : groupsByEnd(found, yield* walkEnds(found));
  if (groups.length < frameCount && stopped === undefined && !isRle) {
    const text = `The frames can't be told apart: ${fragments.length} fragments for ${frameCount} frames.`;
    return Array.from({ length: frameCount }, () => missing(text));
  }
  return Array.from({ length: frameCount }, (_, frame): Result<FramePlaces> => {
    const group = groups[frame];
    if (group !== undefined && group.length > 0) return success(group);
    return stopped === undefined
      ? missing(`Frame ${frame + 1} has no pixels in the file.`)
      : { ok: false, refusal: stopped };
  });
}

type Fragment = Fragments['fragments'][number];

const full = (fragments: readonly Fragment[]): readonly Fragment[] =>
  fragments.filter(({ length }) => length > 0);

function missing(text: string): Result<never> {
  return refuse('frame-missing', text, { tag: '(7FE0,0010)' });
}

/** Fragments from each offset to the next; none for a frame that the pixels end in. */
function groupsByOffset(
  { origin, fragments, stopped }: Fragments,
  offsets: readonly number[],
): readonly (readonly Fragment[])[] {
  const starts = offsets.map((offset) => origin + offset);
  const ascending = [...starts].sort((a, b) => a - b);
  return starts.map((from) => {
    const to = ascending.find((start) => start > from) ?? Infinity;
    if (stopped !== undefined && stopped.offset < to) return [];
    return full(fragments).filter(({ at }) => at >= from && at < to);
  });
}

/** Groups of fragments, each closed by one that ends in an end-of-image mark: FFD9 of JPEG and JPEG 2000. */
function groupsByEnd(
  { fragments }: Fragments,
  ends: readonly boolean[],
): readonly (readonly Fragment[])[] {
  const groups: Fragment[][] = [];
  let group: Fragment[] = [];
  for (const [index, fragment] of fragments.entries()) {
    if (fragment.length > 0) group.push(fragment);
    if (ends[index] === true) {
      groups.push(group);
      group = [];
    }
  }
  return groups;
}

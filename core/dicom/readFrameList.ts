import { type Finding, type Result, refuse, success } from '../result.js';
import type { Attributes } from './attributes.js';
import type { DataSet } from './dataSet.js';
import { frameAttributes } from './functionalGroups.js';
import type { ImageKind } from './readKind.js';

const NUMBER_OF_FRAMES = 'x00280008';

/** The frames that a file states, and the attributes of those that have any. */
export interface FrameList {
  /** At least 1. */
  readonly number: number;
  readonly attributes: readonly Attributes[];
  readonly findings: readonly Finding[];
}

/** One set of attributes a frame. Number of Frames is 1 when it is empty or zero (AWKWARD row 65). */
export function readFrameList(
  dataSet: DataSet,
  attributes: Attributes,
  { enhanced }: ImageKind,
): Result<FrameList> {
  const stated = attributes.integer(NUMBER_OF_FRAMES);
  const number = stated === undefined || stated < 1 ? 1 : stated;
  const isThere = enhanced || dataSet.find(NUMBER_OF_FRAMES) !== undefined;
  const findings: Finding[] =
    isThere && stated !== number
      ? [{ code: 'frames-not-stated', text: 'Number of Frames is empty or zero; 1 was read.' }]
      : [];
  if (!enhanced) {
    if (number > 1) {
      return refuse(
        'frames-without-geometry',
        `${number} frames in a single-frame CT image: there is no position for each of them.`,
        { tag: '(0028,0008)' },
      );
    }
    return success({ number, attributes: [attributes], findings });
  }
  const frames = frameAttributes(attributes);
  if (frames === undefined || frames.length === 0) {
    return refuse('no-geometry', 'No geometry: the functional groups of the frames are missing.', {
      tag: '(5200,9230)',
    });
  }
  if (number - frames.length > FRAMES_BEYOND_BELIEF) {
    return refuse(
      'frame-missing',
      `${number} frames are stated, but only ${frames.length} have functional groups.`,
      { tag: '(5200,9230)' },
    );
  }
  return success({ number, attributes: frames.slice(0, number), findings });
}

/** A Number of Frames this much above what the file describes is damage; nobody needs each of them named. */
const FRAMES_BEYOND_BELIEF = 100_000;

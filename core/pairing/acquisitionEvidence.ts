import type { Evidence } from '../note/index.js';
import type { Stack } from '../stack/index.js';
import { compareTexts } from './compareStated.js';

/** Two reconstructions of one rotation may be stamped a little apart, s. Common practice, no source. */
const SAME_TIME_S = 1;

/**
 * Whether both stacks come of one acquisition: the Acquisition UID decides where both state it; else Acquisition Number
 * and acquisition date and time, each where both state it. A stack's slices are acquired one after the other, so times
 * are compared as spans.
 */
export function acquisitionEvidence(first: Stack, second: Stack): Evidence {
  const check = 'acquisition';
  const a = first.slices[0].image.acquisition;
  const b = second.slices[0].image.acquisition;
  if (a.acquisitionUid !== undefined && b.acquisitionUid !== undefined) {
    return compareTexts(check, `UID ${a.acquisitionUid}`, `UID ${b.acquisitionUid}`);
  }
  const states: Evidence['state'][] = [];
  const number = compareTexts(
    check,
    a.acquisitionNumber?.toString(),
    b.acquisitionNumber?.toString(),
  );
  states.push(number.state);
  const [spanA, spanB] = [timeSpan(first), timeSpan(second)];
  states.push(compareSpans(spanA, spanB));
  const sayStamp = (value: number | undefined, span: TimeSpan | undefined): string =>
    [value !== undefined && `number ${value}`, span?.text].filter(Boolean).join(', ') ||
    'not stated';
  const [x, y] = [sayStamp(a.acquisitionNumber, spanA), sayStamp(b.acquisitionNumber, spanB)];
  if (states.includes('differs')) {
    return { check, state: 'differs', text: `another acquisition: ${x} and ${y}` };
  }
  if (!states.includes('agrees')) {
    return { check, state: 'unknown', text: `acquisition: ${x} and ${y}` };
  }
  const text = x === y ? `same acquisition: ${x}` : `same acquisition: ${x} and ${y}`;
  return { check, state: 'agrees', text };
}

interface TimeSpan {
  readonly date: string;
  readonly fromS: number;
  readonly toS: number;
  readonly text: string;
}

/** First and last moment at which a stack's slices say that they were acquired; undefined where one is silent. */
function timeSpan({ slices }: Stack): TimeSpan | undefined {
  let from: { at: number; time: string } | undefined;
  let to: { at: number; time: string } | undefined;
  const date = slices[0].image.acquisition.acquisitionDate;
  for (const { image } of slices) {
    const { acquisitionTime: time, acquisitionDate } = image.acquisition;
    const at = secondsOf(time);
    if (time === undefined || at === undefined || acquisitionDate !== date) return undefined;
    if (from === undefined || at < from.at) from = { at, time };
    if (to === undefined || at > to.at) to = { at, time };
  }
  if (date === undefined || from === undefined || to === undefined) return undefined;
  const text = from.at === to.at ? `${date} ${from.time}` : `${date} ${from.time} to ${to.time}`;
  return { date, fromS: from.at, toS: to.at, text };
}

function compareSpans(a: TimeSpan | undefined, b: TimeSpan | undefined): Evidence['state'] {
  if (a === undefined || b === undefined) return 'unknown';
  const apart = Math.max(a.fromS, b.fromS) - Math.min(a.toS, b.toS);
  return a.date === b.date && apart <= SAME_TIME_S ? 'agrees' : 'differs';
}

/** A time (PS3.5 6.2, VR TM) as seconds of the day; undefined for what is none. */
function secondsOf(time: string | undefined): number | undefined {
  const match = /^(\d{2})(?::?(\d{2})(?::?(\d{2}(?:\.\d+)?))?)?$/.exec(time ?? '');
  if (match === null) return undefined;
  return Number(match[1]) * 3600 + Number(match[2] ?? 0) * 60 + Number(match[3] ?? 0);
}

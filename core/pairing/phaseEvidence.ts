import type { Evidence } from '../note/index.js';
import type { Stack } from '../stack/index.js';
import { compareNumbers, say } from './compareStated.js';

/** Phases are stated in whole or tenths of a percent. Common practice, no source. */
const SAME_PERCENT = 0.5;
/** A delay divided by an R-R interval is a percentage only roughly: it agrees within this. Common practice, no source. */
const SAME_COMPUTED_PERCENT = 1;
/** And is another phase for certain from here. Common practice, no source. */
const OTHER_COMPUTED_PERCENT = 5;
/** Trigger delays closer than this are one delay, ms: 1 % of a heart beat at 75 per minute is 8 ms. */
const SAME_DELAY_MS = 4;

interface PhaseReading {
  readonly percent: number | undefined;
  readonly delayMs: number | undefined;
  readonly intervalMs: number | undefined;
}

/**
 * Whether both stacks show one cardiac phase. Where both state a percentage it decides. Else the trigger delay is held
 * against the R-R interval; the sentence then names both readings, because such a percentage is nowhere in the files.
 * Delays without an R-R interval prove another phase when they differ, and none when they agree.
 */
export function phaseEvidence(first: Stack, second: Stack): Evidence {
  const check = 'phase';
  const [a, b] = [readingOf(first), readingOf(second)];
  if (a.percent !== undefined && b.percent !== undefined) {
    return compareNumbers(check, a.percent, b.percent, SAME_PERCENT, '%');
  }
  const both = `${sayReading(a)} and ${sayReading(b)}`;
  const [x, y] = [a.percent ?? computedPercent(a), b.percent ?? computedPercent(b)];
  if (x !== undefined && y !== undefined) {
    const apart = Math.abs(x - y);
    if (apart <= SAME_COMPUTED_PERCENT) {
      return { check, state: 'agrees', text: `same phase by trigger delay: ${both}` };
    }
    return apart >= OTHER_COMPUTED_PERCENT
      ? { check, state: 'differs', text: `another phase by trigger delay: ${both}` }
      : { check, state: 'unknown', text: `phase, not told apart by trigger delay: ${both}` };
  }
  const delaysDiffer =
    a.delayMs !== undefined &&
    b.delayMs !== undefined &&
    Math.abs(a.delayMs - b.delayMs) > SAME_DELAY_MS;
  return delaysDiffer
    ? { check, state: 'differs', text: `another phase: ${both}` }
    : { check, state: 'unknown', text: `phase: ${both}` };
}

/** Delay and interval of the whole stack: those of its slices where all have one, else none. */
function readingOf({ slices }: Stack): PhaseReading {
  const { phasePercent, triggerTimeMs, nominalIntervalMs } = slices[0].image.acquisition;
  const isOneDelay = slices.every(
    ({ image: { acquisition } }) =>
      triggerTimeMs !== undefined &&
      acquisition.triggerTimeMs !== undefined &&
      Math.abs(acquisition.triggerTimeMs - triggerTimeMs) <= SAME_DELAY_MS,
  );
  return {
    percent: phasePercent,
    delayMs: isOneDelay ? triggerTimeMs : undefined,
    intervalMs:
      nominalIntervalMs !== undefined && nominalIntervalMs > 0 ? nominalIntervalMs : undefined,
  };
}

function computedPercent({ delayMs, intervalMs }: PhaseReading): number | undefined {
  return delayMs === undefined || intervalMs === undefined
    ? undefined
    : (100 * delayMs) / intervalMs;
}

function sayReading(reading: PhaseReading): string {
  const { percent, delayMs, intervalMs } = reading;
  if (percent !== undefined) return `${say(percent, '%')} as stated`;
  if (delayMs === undefined) return 'not stated';
  const computed = computedPercent(reading);
  return computed === undefined
    ? `trigger delay ${say(delayMs, 'ms')} with no R-R interval`
    : `trigger delay ${say(delayMs, 'ms')} of an R-R interval of ${say(intervalMs, 'ms')} (${computed.toFixed(1)} %)`;
}

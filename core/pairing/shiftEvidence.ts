import { formatPosition } from '../format/index.js';
import {
  distance,
  dot,
  gridNormal,
  length,
  scale,
  subtract,
  type Vec3,
} from '../geometry/index.js';
import type { Evidence } from '../note/index.js';
import type { Stack } from '../stack/index.js';
import type { Registration } from './registration.js';

/** A place counts as shifted otherwise than the rest beyond the limit and this many of its standard errors. */
const SURE = 3;

/**
 * What the measured shift says of the pair: it differs above half a pixel, above half a slice along the normal, and where
 * one place is shifted otherwise than the rest, as when the heart moved or another beat is shown.
 */
export function shiftEvidence(shift: Registration, first: Stack): Evidence {
  const check = 'shift';
  const { shiftMm, limitMm, normal, places, reason } = shift;
  if (shiftMm === null) {
    return { check, state: 'unknown', text: `shift not measured: ${reason ?? 'no reason known'}` };
  }
  const axis = gridNormal(first.slices[0].image.grid);
  const alongMm = dot(shiftMm, axis);
  const inPlaneMm = subtract(shiftMm, scale(axis, alongMm));
  const size = `${length(inPlaneMm).toFixed(2)} mm in the slice`;
  const limit = `half a pixel is ${limitMm.toFixed(2)} mm`;
  const along = alongText(normal);
  const where = places.length > 0 ? `in ${places.length} places` : 'in all places together';
  if (length(inPlaneMm) > limitMm || Math.abs(alongMm) > normal.limitMm) {
    return { check, state: 'differs', text: `shifted by ${size}, ${where} (${limit}); ${along}` };
  }
  const odd = oddPlace(shift, inPlaneMm);
  if (odd !== undefined) {
    return {
      check,
      state: 'differs',
      text: `shifted otherwise from place to place: ${odd.awayMm.toFixed(2)} mm at ${formatPosition(odd.atMm)}, ${size} in the middle of ${places.length} places (${limit}): motion or another beat`,
    };
  }
  return { check, state: 'agrees', text: `shift ${size}, ${where} (${limit}); ${along}` };
}

function alongText({ shiftMm, limitMm, reason }: Registration['normal']): string {
  if (shiftMm === null) return `along the normal not measured${reason ? `: ${reason}` : ''}`;
  return Math.abs(shiftMm) > limitMm
    ? `along the normal ${shiftMm.toFixed(2)} mm (half a slice is ${limitMm.toFixed(2)} mm)`
    : `along the normal under half a slice, ${limitMm.toFixed(2)} mm`;
}

/** The place that is furthest from the common shift, if it is so for certain. */
function oddPlace(
  { places, limitMm }: Registration,
  inPlaneMm: Vec3,
): { atMm: Vec3; awayMm: number } | undefined {
  const odd = places
    .map(({ atMm, shiftMm, standardErrorMm }) => ({
      atMm,
      awayMm: distance(shiftMm, inPlaneMm),
      sureMm: limitMm + SURE * standardErrorMm,
    }))
    .filter(({ awayMm, sureMm }) => awayMm > sureMm)
    .sort((a, b) => b.awayMm - a.awayMm);
  return odd[0];
}

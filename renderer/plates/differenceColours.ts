import { interpolateLab, rgb } from 'd3';

/** Colours to either side of the middle one. */
const STEPS = 255;

/**
 * The scale of differences: neutral grey where both agree, brighter and bluer where the sharp kernel is lower, as much
 * brighter and more orange where it is higher. Blue and orange stay apart for those who see no red or green.
 */
export const DIFFERENCE_STOPS = ['#6cc5ff', '#5f5f5f', '#ffb054'] as const;

/** No data: nothing is drawn, and the hatched ground shows. */
const NOTHING = 0;

/** Colour of a difference as a part of the range, −1 to 1. */
export function differenceColour(part: number): string {
  const [low, middle, high] = DIFFERENCE_STOPS;
  const bounded = Math.min(Math.max(part, -1), 1);
  return bounded < 0
    ? interpolateLab(middle, low)(-bounded)
    : interpolateLab(middle, high)(bounded);
}

let colours: Uint32Array | undefined;

/** The scale as canvas pixels, 2 · STEPS + 1 of them; red is the lowest byte, as on every machine that runs a browser. */
function colourTable(): Uint32Array {
  colours ??= Uint32Array.from({ length: 2 * STEPS + 1 }, (_, index) => {
    const { r, g, b } = rgb(differenceColour(index / STEPS - 1));
    const byte = (value: number): number => Math.round(value) & 0xff;
    return (0xff000000 | (byte(b) << 16) | (byte(g) << 8) | byte(r)) >>> 0;
  });
  return colours;
}

/** Writes the colour of every difference, HU, on a scale from −rangeHu to +rangeHu; what is beyond takes the end's colour. */
export function mapDifferences(hu: Float32Array, rangeHu: number, target: Uint32Array): void {
  const table = colourTable();
  const steps = STEPS / rangeHu;
  const { length } = target;
  for (let index = 0; index < length; index++) {
    const value = hu[index] as number;
    if (Number.isNaN(value)) {
      target[index] = NOTHING;
      continue;
    }
    const step = Math.round(value * steps);
    const bounded = Math.max(-STEPS, Math.min(step, STEPS));
    target[index] = table[bounded + STEPS] as number;
  }
}

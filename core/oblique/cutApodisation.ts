import { add, dot, gridNormal, type SliceGrid, scale, type Vec3 } from '../geometry/index.js';
import { type Apodised, FREQUENCIES, type SeenBy, STEP_PER_MM } from '../stent/index.js';
import { keysResponse, sinc } from './keysResponse.js';

/** How one stack was sampled. */
export interface SampledStack {
  readonly grid: SliceGrid;
  readonly thicknessMm: number;
  readonly sliceSpacingMm: number;
}

/** Directions over half the circle: the other half is the same. */
const DIRECTIONS = 24;
/** Steps of the integral of the noise along the normal of the cut, per mm, and how far it goes. */
const NORMAL_STEP_PER_MM = 0.1;
const NORMAL_REACH_PER_MM = 2.5;

/**
 * What kernels do to a tube at right angles to an oblique plane, seen on the cut by cubic convolution.
 *
 * The tube does not change along the plane's normal, so that its spectrum lies in the plane (projection-slice theorem). There a
 * frequency has a part in the slice, which the kernel and the shared Gaussian blur pass, and one across the slices, which their
 * thickness passes as sinc(T·f); the interpolation passes both by {@link keysResponse}. Of a round tube only the mean over all
 * directions is seen in annular means, so that the responses are these means; what goes twice round is kept for the picture
 * and for what is left over. The model blurs by its Gaussian in all
 * directions: across the slices, where it isn't, that is taken back for the size it is expected to have.
 *
 * Noise is not the same along the normal: its spectrum on the cut is the integral over that direction (a section of a random
 * field). Neighbouring slices share what their thicknesses share.
 *
 * @param stacks of the kernels, in their order
 */
export function cutApodisation(plane: SliceGrid, stacks: readonly SampledStack[]): SeenBy {
  const noises = new Map<Float64Array, Float64Array>();
  const noiseOf = ({ amplitude }: Apodised, stack: SampledStack): Float64Array => {
    const power = noises.get(amplitude) ?? noiseOnCut(amplitude, plane, stack);
    noises.set(amplitude, power);
    return power;
  };
  return (apodisation, blurSigmaMm) => {
    const seen = apodisation.kernels.map((kernel, index) => {
      const stack = stacks[index];
      if (stack === undefined) throw new RangeError('a kernel without its stack');
      const power = noiseOf(kernel, stack);
      const onSlices = total(kernel.amplitude.map((value) => value * value));
      return {
        kernel: {
          ...signalOnCut(kernel, plane, stack, blurSigmaMm),
          amplitude: power.map(Math.sqrt),
        },
        noisePart: Math.sqrt(total(power) / onSlices),
      };
    });
    return {
      apodisation: { ...apodisation, kernels: seen.map(({ kernel }) => kernel) },
      noiseParts: seen.map(({ noisePart }) => noisePart),
    };
  };
}

/** Mean over the directions of the plane of what passes kernel, thickness and interpolation. */
function signalOnCut(
  kernel: Apodised,
  plane: SliceGrid,
  stack: SampledStack,
  blurSigmaMm: number,
): Pick<Apodised, 'response' | 'endError' | 'twofold'> {
  const { thicknessMm, sliceSpacingMm } = stack;
  const [downMm, acrossMm] = stack.grid.pixelSpacingMm;
  const response = new Float64Array(FREQUENCIES.length);
  const endError = new Float64Array(FREQUENCIES.length);
  const [cos, sin] = [new Float64Array(FREQUENCIES.length), new Float64Array(FREQUENCIES.length)];
  directions(plane, stack.grid).forEach(([x, y, z], direction) => {
    const [c, s] = [Math.cos(2 * angleOf(direction)), Math.sin(2 * angleOf(direction))];
    FREQUENCIES.forEach((f, index) => {
      const inSlice = f * Math.hypot(x, y);
      const fz = f * z;
      const passed =
        (sinc(thicknessMm * fz) *
          Math.exp(2 * (Math.PI * blurSigmaMm * fz) ** 2) *
          keysResponse(f * x * acrossMm) *
          keysResponse(f * y * downMm) *
          keysResponse(fz * sliceSpacingMm)) /
        DIRECTIONS;
      const here = passed * at(kernel.response, inSlice);
      response[index] = (response[index] as number) + here;
      cos[index] = (cos[index] as number) + 2 * here * c;
      sin[index] = (sin[index] as number) + 2 * here * s;
      endError[index] = (endError[index] as number) + passed * at(kernel.endError, inSlice);
    });
  });
  return { response, endError, twofold: { cos, sin } };
}

/** Noise power of the cut, mean over its directions: all that lies above and below each frequency along the normal. */
function noiseOnCut(amplitude: Float64Array, plane: SliceGrid, stack: SampledStack): Float64Array {
  const [downMm, acrossMm] = stack.grid.pixelSpacingMm;
  const [nx, ny, nz] = inAxes(gridNormal(plane), stack.grid);
  const power = new Float64Array(FREQUENCIES.length);
  for (const [x, y, z] of directions(plane, stack.grid))
    FREQUENCIES.forEach((f, index) => {
      let sum = 0;
      for (let t = -NORMAL_REACH_PER_MM; t <= NORMAL_REACH_PER_MM; t += NORMAL_STEP_PER_MM) {
        const [fx, fy, fz] = [f * x + t * nx, f * y + t * ny, f * z + t * nz];
        const own = at(amplitude, Math.hypot(fx, fy));
        if (own === 0) continue;
        const passed =
          keysResponse(fx * acrossMm) *
          keysResponse(fy * downMm) *
          keysResponse(fz * stack.sliceSpacingMm);
        sum += (own * passed) ** 2 * acrossSlices(fz, stack);
      }
      power[index] = (power[index] as number) + (sum * NORMAL_STEP_PER_MM) / DIRECTIONS;
    });
  return power;
}

/** Directions of a plane, unit length, in the axes of the slices. */
function directions(plane: SliceGrid, slices: SliceGrid): readonly Vec3[] {
  return Array.from({ length: DIRECTIONS }, (_, direction) => {
    const angle = angleOf(direction);
    const along = add(
      scale(plane.rowDirection, Math.cos(angle)),
      scale(plane.columnDirection, Math.sin(angle)),
    );
    return inAxes(along, slices);
  });
}

/** From the plane's rows to its columns. */
function angleOf(direction: number): number {
  return (Math.PI * (direction + 0.5)) / DIRECTIONS;
}

function inAxes(direction: Vec3, slices: SliceGrid): Vec3 {
  return [
    dot(direction, slices.rowDirection),
    dot(direction, slices.columnDirection),
    dot(direction, gridNormal(slices)),
  ];
}

/**
 * Noise power across the slices, mm: periodic with their spacing, its integral over a period is 1. Slices share the part of
 * their thickness that overlaps.
 */
function acrossSlices(fz: number, { thicknessMm, sliceSpacingMm }: SampledStack): number {
  let sum = 1;
  for (let apart = 1; apart * sliceSpacingMm < thicknessMm; apart += 1)
    sum +=
      2 *
      (1 - (apart * sliceSpacingMm) / thicknessMm) *
      Math.cos(2 * Math.PI * apart * fz * sliceSpacingMm);
  return sliceSpacingMm * Math.max(0, sum);
}

/** Power over the plane. */
function total(power: Float64Array): number {
  let sum = 0;
  for (let index = 0; index < power.length; index += 1)
    sum += (power[index] as number) * (FREQUENCIES[index] as number);
  return sum;
}

/** A table's value at a frequency, straight between its places; nothing beyond them. */
function at(table: Float64Array, perMm: number): number {
  const place = perMm / STEP_PER_MM - 0.5;
  if (place >= table.length - 1) return 0;
  const below = Math.max(0, Math.floor(place));
  const beyond = Math.max(0, place - below);
  return (1 - beyond) * (table[below] as number) + beyond * (table[below + 1] as number);
}

import type { EdgeKind } from './nearEdgeStructures.js';
import type { Flag } from './value.js';

const NO_STANDARD_ERROR = 'no-standard-error';

const EDGE_NAME: Readonly<Record<EdgeKind, string>> = {
  strut: 'A strut',
  calcium: 'Calcium or bone',
  air: 'Air',
};

/** Its distance is known to half a blur or so: what seems to lie a little farther may lie within one. */
function edgePlace(distanceMm: number, blurMm: number): string {
  if (distanceMm < 0.05) return 'lies in the region or at its border, within';
  const place = `is about ${distanceMm.toFixed(1)} mm away`;
  return distanceMm <= blurMm ? `${place}, within` : `${place}, perhaps within`;
}

/** What may be said of a measured value. Each sentence says what it means for the reader. */
export const FLAGS = {
  sliceMissing: {
    code: 'slice-missing',
    text: 'The slice here could not be read: nothing is measured.',
  },
  notHu: (unit: string): Flag => ({
    code: 'not-hu',
    text: `The values of this stack are “${unit}”, not HU: nothing is measured.`,
  }),
  noPixelSpacing: {
    code: 'no-pixel-spacing',
    text: 'The files have no pixel spacing: nothing is measured.',
  },
  paddingInside: (count: number): Flag => ({
    code: 'padding-inside',
    text: `${count} pixel(s) inside are padding and were left out: move the region off the border of the scan.`,
  }),
  belowAir: {
    code: 'unmarked-padding',
    text: 'Pixels inside lie below −1500 HU and are no image, though the file does not mark them: move the region off the border of the scan, or leave unmarked padding out.',
  },
  overBorder: {
    code: 'over-border',
    text: 'The region reaches over the border of the image: only the part inside is measured.',
  },
  noPixels: {
    code: 'no-pixels',
    text: 'No pixel centre lies inside: make the region larger.',
  },
  onePixel: { code: 'one-pixel', text: 'One pixel has no SD: make the region larger.' },
  zeroSd: { code: 'zero-sd', text: 'The SD is zero: no SNR.' },
  lossy: {
    code: 'lossy',
    text: 'The image was compressed with loss: SD and SNR are not the scanner’s. Measure on images without loss, or say so beside the number.',
  },
  positionsNotComparable: {
    code: 'positions-not-comparable',
    text: 'Not measured here: positions of the two stacks can’t be compared.',
  },
  notOneAcquisition: (why: string): Flag => ({
    code: 'not-one-acquisition',
    text: `Not measured here. ${why}`,
  }),
  noStandardError: {
    code: NO_STANDARD_ERROR,
    text: 'No standard error: the noise of this kernel was not measured.',
  },
  noStandardErrorAlone: {
    code: NO_STANDARD_ERROR,
    text: 'No standard error: noise is measured in the same places of a soft and a sharp stack, and here is one stack.',
  },
  noStandardErrorYet: {
    code: NO_STANDARD_ERROR,
    text: 'No standard error yet: the noise of the two kernels is still to be measured.',
  },
  noStandardErrorFewAreas: {
    code: NO_STANDARD_ERROR,
    text: 'No standard error: the two stacks have too few uniform areas in common to measure their noise.',
  },
  noStandardErrorSoWide: {
    code: NO_STANDARD_ERROR,
    text: 'No standard error: the region is wider than 256 pixels, and the noise is not known so far.',
  },
  noStandardErrorWithoutPixels: {
    code: NO_STANDARD_ERROR,
    text: 'No standard error: no pixel lies inside.',
  },
  fewPixels: (count: number): Flag => ({
    code: 'few-pixels',
    text: `Only ${count} pixels inside: the SD is uncertain by more than a fifth. Make the region larger.`,
  }),
  belowTwoBlurs: (blurMm: number): Flag => ({
    code: 'below-two-blurs',
    text: `Narrower than twice this kernel’s blur (${blurMm.toFixed(2)} mm): the mean takes in its surroundings. Make the region wider, or say so beside the number.`,
  }),
  nearEdge: (kind: EdgeKind, distanceMm: number, blurMm: number): Flag => ({
    code: `near-${kind}`,
    text: `${EDGE_NAME[kind]} ${edgePlace(distanceMm, blurMm)} this kernel’s blur (${blurMm.toFixed(2)} mm): the mean is not of this tissue alone. Move the region away or make it smaller.`,
  }),
  edgesNotSought: {
    code: 'edges-not-sought',
    text: 'Struts, calcium and air close by were not looked for: the blur of this kernel was not measured. Look for them yourself.',
  },
  sliceApart: (offsetMm: number, spacingMm: number): Flag => ({
    code: 'slice-apart',
    text: `The slice lies ${offsetMm.toFixed(2)} mm from the region, more than a quarter of the spacing of ${spacingMm.toFixed(2)} mm: it may show other tissue. Draw the region on a slice that lies nearer to one of the other stack.`,
  }),
  beyondShared: {
    code: 'beyond-shared-field',
    text: 'The region reaches beyond what the other stack shows: the two kernels can’t be compared here. Move it into the field that both share.',
  },
  noPlacement: {
    code: 'no-placement',
    text: 'No placement sensitivity: moved by half a pixel or made 0.25 mm smaller, the region holds no pixel. Make it larger.',
  },
} as const;

/** Flags that hold for every value alike: said in exports and help, not beside each number in the window. */
export function isQuiet(flag: Flag): boolean {
  return flag.code === FLAGS.noStandardError.code || flag.code === FLAGS.edgesNotSought.code;
}

import type { Flag } from './value.js';

const NO_STANDARD_ERROR = 'no-standard-error';

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
    text: 'The image was compressed with loss: SD and SNR are not the scanner’s.',
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
  noPlacement: {
    code: 'no-placement',
    text: 'No placement sensitivity: moved by half a pixel or made 0.25 mm smaller, the region holds no pixel. Make it larger.',
  },
} as const;

/** Flags that hold for every value alike: said in exports and help, not beside each number in the window. */
export function isQuiet(flag: Flag): boolean {
  return flag.code === FLAGS.noStandardError.code;
}

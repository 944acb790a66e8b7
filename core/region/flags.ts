import type { Flag } from './value.js';

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
  paddingInside: (count: number): Flag => ({
    code: 'padding-inside',
    text: `${count} pixel(s) inside are padding and were left out: move the region off the border of the scan.`,
  }),
  belowAir: {
    code: 'unmarked-padding',
    text: 'Pixels inside lie below −1500 HU and are no image, though the file does not mark them: move the region off the border of the scan.',
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
    code: 'no-standard-error',
    text: 'No standard error: this version does not measure how the noise is correlated.',
  },
} as const;

/** Flags that hold for every value alike: said in exports and help, not beside each number in the window. */
export function isQuiet(flag: Flag): boolean {
  return flag.code === FLAGS.noStandardError.code;
}

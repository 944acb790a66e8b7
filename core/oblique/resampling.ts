import type { Flag } from '../region/index.js';

/** How the values between pixels are made. */
export type Interpolation = 'linear' | 'cubic';

/** How a plane was cut: it goes with every value that is measured on it. */
export interface Resampling {
  readonly interpolation: Interpolation;
  /** Thickness that was averaged over, across the plane, mm; null for a cut without thickness. */
  readonly slabMm: number | null;
  /** Planes that were averaged. */
  readonly planes: number;
}

const METHOD: Readonly<Record<Interpolation, string>> = {
  linear: 'trilinear interpolation',
  cubic: 'cubic convolution',
};

/** The method in words, for the note and the exports: “cubic convolution, mean over 3.0 mm”. */
export function resamplingInWords({ interpolation, slabMm }: Resampling): string {
  const method = METHOD[interpolation];
  return slabMm === null ? method : `${method}, mean over ${slabMm.toFixed(1)} mm`;
}

/** The flags of values that were measured on an oblique cut. */
export const CUT_FLAGS = {
  resampled: (resampling: Resampling): Flag => ({
    code: 'resampled',
    text: `Measured on an oblique cut, resampled by ${resamplingInWords(resampling)}: noise and SD are smoothed by it, and SNR and CNR seem better than on the slices.`,
  }),
  noStandardError: {
    code: 'no-standard-error',
    text: 'No standard error: the noise of the kernel was measured on the slices, and it is another on a resampled plane.',
  },
  edgesNotSought: {
    code: 'edges-not-sought',
    text: 'Struts, calcium and air close by were not looked for: the blur of the kernel holds on the slices, and it is another on an oblique cut. Look for them yourself.',
  },
} as const;

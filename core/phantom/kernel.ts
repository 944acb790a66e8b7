/** Apodisations of the ramp that have a published name. */
export type Apodisation = 'ram-lak' | 'shepp-logan' | 'cosine' | 'hann' | 'hamming';

/** A reconstruction kernel: the ramp |f| times W(f), nothing beyond the cut-off. */
export interface Kernel {
  readonly apodisation: Apodisation;
  /** Frequency at which W ends, per mm. */
  readonly cutOffPerMm: number;
}

/**
 * W(f) with x = f / cut-off: 1; sinc(x/2); cos(πx/2); ½(1 + cos πx); 0.54 + 0.46 cos πx (Kak & Slaney 1988
 * chapter 3; the Hann and Hamming windows in Harris 1978, doi 10.1109/PROC.1978.10837). 0 beyond the cut-off.
 */
export function apodisation(kernel: Kernel, frequencyPerMm: number): number {
  const x = Math.abs(frequencyPerMm) / kernel.cutOffPerMm;
  // A cut-off that lies on a frequency of the transform must not be lost to rounding.
  if (x > 1 + 1e-12) return 0;
  switch (kernel.apodisation) {
    case 'ram-lak':
      return 1;
    case 'shepp-logan':
      return x === 0 ? 1 : Math.sin((Math.PI * x) / 2) / ((Math.PI * x) / 2);
    case 'cosine':
      return Math.cos((Math.PI * x) / 2);
    case 'hann':
      return 0.5 + 0.5 * Math.cos(Math.PI * x);
    case 'hamming':
      return 0.54 + 0.46 * Math.cos(Math.PI * x);
  }
}

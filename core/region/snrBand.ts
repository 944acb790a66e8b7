/** Reading bands of SNR: common practice, no source. An aid, never a verdict. */
export type SnrBand = 'unreadable' | 'poor' | 'tolerable at best' | 'diagnostic';

/** ≤ 1 unreadable; up to 2 poor; 2 to 4 tolerable at best; above 4 diagnostic. No band for a mean below zero: fat has none. */
export function snrBand(snr: number): SnrBand | undefined {
  if (snr < 0) return undefined;
  if (snr <= 1) return 'unreadable';
  if (snr < 2) return 'poor';
  if (snr <= 4) return 'tolerable at best';
  return 'diagnostic';
}

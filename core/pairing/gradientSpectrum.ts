import { type Fft, makeFft } from '../quality/fft.js';

/** A complex image and its transform, row after row: frequency 0 first (as the discrete transform orders them). */
export interface ComplexImage {
  readonly size: number;
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/**
 * Frequencies that are used, cycles per sample: up to a quarter, where a soft kernel still has signal and bilinear
 * sampling does not yet bend the phase. What lies beyond is not computed.
 */
export const BAND_END = 0.25;

/** Tools of one square size, made once. */
export interface SpectrumMaker {
  readonly size: number;
  /** Transform of the windowed gradient ∂/∂x + i·∂/∂y of a square of samples; columns beyond the band hold nothing. */
  readonly gradientSpectrum: (samples: Float64Array) => ComplexImage;
  /** Undoes the transform of an image that is empty beyond the band, in place, in the rows up to `reach` from row 0. */
  readonly inverseRows: (image: ComplexImage, reach: number) => void;
}

/**
 * Spectra of gradients under a Hann window. The gradient carries no mean and little of what varies slowly, so that the
 * window's own shape does not correlate; as one complex number it keeps the direction of an edge, which makes the
 * correlation peak narrow (Argyriou & Vlachos 2003, gradient correlation).
 *
 * @param size a power of two
 */
export function makeSpectrumMaker(size: number): SpectrumMaker {
  const fft = makeFft(size);
  const window = Float64Array.from(
    { length: size },
    (_, index) => 0.5 - 0.5 * Math.cos((2 * Math.PI * (index + 0.5)) / size),
  );
  const band = Math.ceil(BAND_END * size);
  return {
    size,
    gradientSpectrum(samples) {
      const re = new Float64Array(size * size);
      const im = new Float64Array(size * size);
      for (let row = 1; row < size - 1; row += 1) {
        const across = (window[row] as number) * 0.5;
        for (let column = 1; column < size - 1; column += 1) {
          const index = row * size + column;
          const weight = across * (window[column] as number);
          re[index] = weight * ((samples[index + 1] as number) - (samples[index - 1] as number));
          im[index] =
            weight * ((samples[index + size] as number) - (samples[index - size] as number));
        }
      }
      const image = { size, re, im };
      for (let row = 0; row < size; row += 1) transformRow(image, row, fft.forward);
      transformColumns(image, band, fft.forward);
      return image;
    },
    inverseRows(image, reach) {
      transformColumns(image, band, fft.inverse);
      for (let row = -reach; row <= reach; row += 1) {
        transformRow(image, (row + size) % size, fft.inverse);
      }
    },
  };
}

function transformRow({ size, re, im }: ComplexImage, row: number, along: Fft['forward']): void {
  along(re.subarray(row * size, (row + 1) * size), im.subarray(row * size, (row + 1) * size));
}

/** Columns up to `band` from column 0 on either side. */
function transformColumns(
  { size, re, im }: ComplexImage,
  band: number,
  along: Fft['forward'],
): void {
  const lineRe = new Float64Array(size);
  const lineIm = new Float64Array(size);
  for (let offset = -band; offset <= band; offset += 1) {
    const column = (offset + size) % size;
    for (let row = 0; row < size; row += 1) {
      lineRe[row] = re[row * size + column] as number;
      lineIm[row] = im[row * size + column] as number;
    }
    along(lineRe, lineIm);
    for (let row = 0; row < size; row += 1) {
      re[row * size + column] = lineRe[row] as number;
      im[row * size + column] = lineIm[row] as number;
    }
  }
}

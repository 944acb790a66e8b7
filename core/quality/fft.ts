/** A Fourier transform of one length, in place on the real and imaginary parts. */
export interface Fft {
  readonly size: number;
  /** Σ x[n]·exp(−2πi·kn/size), not scaled. */
  readonly forward: (re: Float64Array, im: Float64Array) => void;
  /** Σ X[k]·exp(+2πi·kn/size) / size: undoes `forward`. */
  readonly inverse: (re: Float64Array, im: Float64Array) => void;
}

/**
 * Discrete Fourier transform of a power of two, radix 2, decimation in time (Cooley & Tukey 1965,
 * doi 10.1090/S0025-5718-1965-0178586-1). Tables are made once. Throws for a size that is no power of two.
 */
export function makeFft(size: number): Fft {
  if (!Number.isInteger(size) || size < 1 || (size & (size - 1)) !== 0)
    throw new RangeError(`invalid transform size: ${size}`);
  const cosines = new Float64Array(size >> 1);
  const sines = new Float64Array(size >> 1);
  for (let k = 0; k < size >> 1; k += 1) {
    cosines[k] = Math.cos((2 * Math.PI * k) / size);
    sines[k] = Math.sin((2 * Math.PI * k) / size);
  }
  const swaps = reversedPairs(size);
  const forward = (re: Float64Array, im: Float64Array): void => {
    if (re.length !== size || im.length !== size)
      throw new RangeError(`invalid transform length: ${re.length}, ${im.length}`);
    reorder(re, swaps);
    reorder(im, swaps);
    butterflies(re, im, cosines, sines);
  };
  return {
    size,
    forward,
    inverse: (re, im) => {
      // Real and imaginary part change places on the way in and out: the forward sum becomes the inverse one.
      forward(im, re);
      for (let index = 0; index < size; index += 1) {
        re[index] = (re[index] ?? 0) / size;
        im[index] = (im[index] ?? 0) / size;
      }
    },
  };
}

/** Index pairs that bit reversal exchanges, one after the other. */
function reversedPairs(size: number): Uint32Array {
  const pairs: number[] = [];
  let reversed = 0;
  for (let index = 0; index < size; index += 1) {
    if (index < reversed) pairs.push(index, reversed);
    let bit = size >> 1;
    while (bit > 0 && (reversed & bit) !== 0) {
      reversed ^= bit;
      bit >>= 1;
    }
    reversed |= bit;
  }
  return Uint32Array.from(pairs);
}

function reorder(values: Float64Array, swaps: Uint32Array): void {
  for (let pair = 0; pair < swaps.length; pair += 2) {
    const a = swaps[pair] ?? 0;
    const b = swaps[pair + 1] ?? 0;
    const kept = values[a] ?? 0;
    values[a] = values[b] ?? 0;
    values[b] = kept;
  }
}

function butterflies(
  re: Float64Array,
  im: Float64Array,
  cosines: Float64Array,
  sines: Float64Array,
): void {
  const size = re.length;
  for (let half = 1; half < size; half <<= 1) {
    const stride = size / (2 * half);
    for (let start = 0; start < size; start += 2 * half) {
      for (let k = 0; k < half; k += 1) {
        const c = cosines[k * stride] ?? 0;
        const s = sines[k * stride] ?? 0;
        const a = start + k;
        const b = a + half;
        const reB = re[b] ?? 0;
        const imB = im[b] ?? 0;
        const turnedRe = reB * c + imB * s;
        const turnedIm = imB * c - reB * s;
        const reA = re[a] ?? 0;
        const imA = im[a] ?? 0;
        re[b] = reA - turnedRe;
        im[b] = imA - turnedIm;
        re[a] = reA + turnedRe;
        im[a] = imA + turnedIm;
      }
    }
  }
}

/** Keys' parameter: third-order exact (Keys 1981, doi 10.1109/TASSP.1981.1163711). */
const A = -0.5;

/**
 * What cubic convolution does to a frequency, on average over all places between the samples: the Fourier transform of its
 * kernel. @param cyclesPerSample frequency times the distance of the samples
 */
export function keysResponse(cyclesPerSample: number): number {
  const f = Math.abs(cyclesPerSample);
  const place = f / TABLE_STEP;
  const below = Math.floor(place);
  if (below + 1 >= TABLE.length) return computed(f);
  const beyond = place - below;
  return (1 - beyond) * (TABLE[below] as number) + beyond * (TABLE[below + 1] as number);
}

function computed(f: number): number {
  // 1 − O(f⁴): the closed form loses its digits here.
  if (f < 0.02) return 1;
  const square = (Math.PI * f) ** 2;
  const middle = (3 / square) * (sinc(f) ** 2 - sinc(2 * f));
  const lobes = (2 * A * (3 * sinc(2 * f) ** 2 - 2 * sinc(2 * f) - sinc(4 * f))) / square;
  return middle + lobes;
}

const TABLE_STEP = 0.002;
const TABLE = Float64Array.from({ length: 1000 }, (_, index) => computed(index * TABLE_STEP));

/** sin(πx)/(πx). */
export function sinc(x: number): number {
  return x === 0 ? 1 : Math.sin(Math.PI * x) / (Math.PI * x);
}

/** Selection value of the prediction, ITU-T T.81 table H.1. */
export type Predictor = 1 | 2 | 3 | 4 | 5 | 6 | 7;

/**
 * A small encoder of JPEG lossless, one component (ITU-T T.81 Annex H, process 14), for test files: every category
 * has a code of 5 bits.
 */
export function losslessJpeg(
  samples: Uint16Array,
  columns: number,
  { predictor, precision = 16 }: { readonly predictor: Predictor; readonly precision?: number },
): Uint8Array {
  const rows = samples.length / columns;
  const bits = bitWriter();
  for (const [index, sample] of samples.entries()) {
    const prediction = predict(samples, index, columns, predictor, precision);
    // Differences are modulo 2^16 (H.1.2.1), from −32767 to 32768.
    const wrapped = (sample - prediction) & 0xffff;
    const difference = wrapped > 32768 ? wrapped - 65536 : wrapped;
    const category = difference === 0 ? 0 : 32 - Math.clz32(Math.abs(difference));
    bits.put(category, 5);
    if (category > 0 && category < 16) {
      bits.put(difference > 0 ? difference : difference + 2 ** category - 1, category);
    }
  }
  const word = (value: number) => [value >> 8, value & 0xff];
  const lengths = Array.from({ length: 16 }, (_, index) => (index === 4 ? 17 : 0));
  const categories = Array.from({ length: 17 }, (_, index) => index);
  return Uint8Array.from([
    ...[0xff, 0xd8],
    ...[0xff, 0xc3, ...word(11), precision, ...word(rows), ...word(columns), 1, 1, 0x11, 0],
    ...[0xff, 0xc4, ...word(2 + 1 + 16 + 17), 0, ...lengths, ...categories],
    ...[0xff, 0xda, ...word(8), 1, 1, 0, predictor, 0, 0],
    ...bits.end(),
    ...[0xff, 0xd9],
  ]);
}

/** H.1.2.1: the first line is predicted from the left, each other line begins with what stands above. */
function predict(
  samples: Uint16Array,
  index: number,
  columns: number,
  predictor: Predictor,
  precision: number,
): number {
  const at = (i: number) => samples[i] ?? 0;
  const isFirstLine = index < columns;
  const isFirstOfLine = index % columns === 0;
  if (index === 0) return 2 ** (precision - 1);
  if (isFirstLine) return at(index - 1);
  if (isFirstOfLine) return at(index - columns);
  const [a, b, c] = [at(index - 1), at(index - columns), at(index - columns - 1)];
  switch (predictor) {
    case 1:
      return a;
    case 2:
      return b;
    case 3:
      return c;
    case 4:
      return a + b - c;
    case 5:
      return a + ((b - c) >> 1);
    case 6:
      return b + ((a - c) >> 1);
    case 7:
      return (a + b) >> 1;
  }
}

/** Bits, most significant first; a byte FF is followed by 00 (B.1.1.5), the last byte is filled with ones. */
function bitWriter() {
  const bytes: number[] = [];
  let held = 0;
  let count = 0;
  const put = (value: number, width: number): void => {
    for (let bit = width - 1; bit >= 0; bit--) {
      held = (held << 1) | ((value >> bit) & 1);
      count += 1;
      if (count < 8) continue;
      bytes.push(held);
      if (held === 0xff) bytes.push(0);
      held = 0;
      count = 0;
    }
  };
  const end = (): readonly number[] => {
    while (count > 0) put(1, 1);
    return bytes;
  };
  return { put, end };
}

import { execFileSync } from 'node:child_process';
import { existsSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it, test } from 'vitest';
import { decodeImage, type PixelEncoding } from '../../../../core/dicom/index.js';
import { displayTable, NO_DATA_GREY } from '../../../../core/intensity/index.js';
import { noteStack, selectStack } from '../../../../core/note/index.js';
import { FLAGS, measureRegion } from '../../../../core/region/index.js';
import { type Stack, withMaskedPadding } from '../../../../core/stack/index.js';
import { ctSlice } from '../../../corpus/ctSlice.js';
import { axial, sampleStack } from '../../renderer/sample.js';

const PYTHON = '/usr/bin/python3';

function stackWith(pixels: Partial<PixelEncoding>): Stack {
  const stack = sampleStack();
  const [first, ...rest] = stack.slices.map((slice) => ({
    ...slice,
    image: { ...slice.image, pixels: { ...slice.image.pixels, ...pixels } },
  }));
  if (first === undefined) throw new Error('invalid sample');
  return { ...stack, slices: [first, ...rest] };
}

function paddingOf(stack: Stack, belowHu = -1500): PixelEncoding['padding'] | string {
  const masked = withMaskedPadding(stack, belowHu);
  return masked.ok ? masked.value.slices[0].image.pixels.padding : masked.refusal.code;
}

describe('The reader’s mask of a stack', () => {
  it.each([
    ['signed, as HU', { rescale: { slope: 1, intercept: 0 } }, { low: -32768, high: -1501 }],
    [
      'unsigned of 12 bits, which never goes so low',
      { signed: false, bitsStored: 12, rescale: { slope: 1, intercept: -1024 } },
      undefined,
    ],
    [
      'unsigned, intercept −8192',
      { signed: false, rescale: { slope: 1, intercept: -8192 } },
      { low: 0, high: 6691 },
    ],
    [
      'a slope that meets the limit between two values',
      { rescale: { slope: 0.7, intercept: 0 } },
      // −2142.857…: −2143 is −1500.1 HU, −2142 is −1499.4 HU.
      { low: -32768, high: -2143 },
    ],
    [
      'a slope below zero: high stored values are low HU',
      { rescale: { slope: -1, intercept: 0 } },
      { low: 1501, high: 32767 },
    ],
    [
      'with marked padding among the masked values',
      { rescale: { slope: 1, intercept: 0 }, padding: { low: -2000, high: -2000 } },
      { low: -32768, high: -1501 },
    ],
    [
      'with marked padding right above them',
      { rescale: { slope: 1, intercept: 0 }, padding: { low: -1500, high: -1400 } },
      { low: -32768, high: -1400 },
    ],
  ])('is the range of stored values below the limit: %s', (_name, pixels, expected) => {
    expect(paddingOf(stackWith(pixels))).toEqual(expected);
  });

  it('is refused where the files mark padding elsewhere, and without HU', () => {
    expect(paddingOf(stackWith({ padding: { low: 3000, high: 3000 } }))).toBe('no-mask');
    expect(paddingOf(sampleStack({ unit: 'stored' }))).toBe('no-mask');
  });

  it('is said by the stack, leaves the stack that it came from alone, and is put on once', () => {
    const stack = stackWith({});
    const masked = withMaskedPadding(stack, -1500);
    if (!masked.ok) throw new Error(masked.refusal.text);
    expect(masked.value.findings).toEqual([
      {
        code: 'masked-padding',
        text: 'Values below −1500 HU are left out as no image: the files do not mark them, the reader chose it.',
      },
    ]);
    expect(stack.slices[0].image.pixels.padding).toBeUndefined();
    expect(stack.findings).toEqual([]);
    expect(withMaskedPadding(masked.value, -1500)).toEqual({ ok: true, value: masked.value });
  });

  it('travels into the note, and from the note or a plan back to the stack', () => {
    const stack = stackWith({});
    const masked = withMaskedPadding(stack, -1500);
    if (!masked.ok) throw new Error(masked.refusal.text);
    const noted = noteStack(masked.value);
    expect(noted.maskedBelowHu).toBe(-1500);
    expect(noted.findings.map(({ code }) => code)).toEqual(['masked-padding']);
    expect(selectStack(noted, [stack])).toEqual({ ok: true, value: masked.value });
    expect('maskedBelowHu' in noteStack(stack)).toBe(false);
    expect(selectStack(noteStack(stack), [stack])).toEqual({ ok: true, value: stack });
  });
});

describe('A region over unmarked padding', () => {
  // 40 × 40 pixels of 0.5 mm: a circle of image in a square of −2000, as scanners write it.
  const side = 40;
  const stored = Int16Array.from({ length: side * side }, (_, index) => {
    const [x, y] = [(index % side) - 19.5, Math.floor(index / side) - 19.5];
    return x * x + y * y > 400 ? -2000 : ((index * 7) % 50) + 30;
  });
  const stack = sampleStack({ positionsMm: axial(1, 1), rows: side, columns: side });
  const whole = {
    kind: 'outline',
    pointsMm: [
      [-10.2, -20.2, 0],
      [9.7, -20.2, 0],
      [9.7, -0.3, 0],
      [-10.2, -0.3, 0],
    ],
  } as const;
  const measured = (one: Stack) => measureRegion(whole, one, () => stored, FLAGS.noStandardError);

  it('takes them in and says so, until the reader leaves them out; then it says that', () => {
    const before = measured(stack);
    expect(before.n).toBe(1600);
    expect(before.flags.map(({ code }) => code)).toContain('unmarked-padding');
    const masked = withMaskedPadding(stack, -1500);
    if (!masked.ok) throw new Error(masked.refusal.text);
    const after = measured(masked.value);
    const codes = after.flags.map(({ code }) => code);
    expect(codes).toContain('padding-inside');
    expect(codes).not.toContain('unmarked-padding');
    expect(after.minHu).toBe(30);
  });

  it('draws them as no data', () => {
    const masked = withMaskedPadding(stack, -1500);
    if (!masked.ok) throw new Error(masked.refusal.text);
    const window = { centre: 40, width: 400, function: 'LINEAR' } as const;
    const table = displayTable(masked.value.slices[0].image.pixels, window);
    expect([table[-2000 & 0xffff], table[-1501 & 0xffff], table[-1500 & 0xffff]]).toEqual([
      NO_DATA_GREY,
      NO_DATA_GREY,
      0,
    ]);
  });

  test.skipIf(!existsSync(PYTHON))('has then the mean and SD of numpy’s masked array', async () => {
    const bytes = ctSlice({ rows: side, columns: side, stored });
    const decoded = await decodeImage(bytes);
    if (!decoded.ok) throw new Error(decoded.refusal.text);
    const folder = mkdtempSync(join(tmpdir(), 'diptych-mask-'));
    const path = join(folder, 'a.dcm');
    writeFileSync(path, bytes);
    const script = [
      'import sys, json, numpy as np, pydicom',
      'd = pydicom.dcmread(sys.argv[1])',
      'a = np.ma.masked_less(d.pixel_array.astype(float), -1500)',
      'print(json.dumps([int(a.count()), float(a.mean()), float(a.std(ddof=1))]))',
    ].join('\n');
    const [n, mean, sd] = JSON.parse(
      execFileSync(PYTHON, ['-c', script, path], { encoding: 'utf8' }),
    );
    rmSync(folder, { recursive: true });
    const masked = withMaskedPadding(stack, -1500);
    if (!masked.ok) throw new Error(masked.refusal.text);
    const value = measured(masked.value);
    expect(value.n).toBe(n);
    expect(value.meanHu).toBeCloseTo(mean, 9);
    expect(value.sdHu).toBeCloseTo(sd, 9);
  });
});

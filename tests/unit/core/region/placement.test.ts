import { describe, expect, it } from 'vitest';
import { decodeImage } from '../../../../core/dicom/index.js';
import {
  type Outline,
  offsetOutline,
  placementSensitivity,
  type Shape,
  shapeArea,
} from '../../../../core/region/index.js';
import { buildStacks } from '../../../../core/stack/index.js';
import { ctSlice } from '../../../corpus/ctSlice.js';

const outline = (...points: readonly (readonly [number, number])[]): Outline => ({
  kind: 'outline',
  pointsMm: points.map(([x, y]) => [x, y, 5]),
});
const square = outline([0, 0], [4, 0], [4, 4], [0, 4]);

describe('offsetOutline', () => {
  it('moves each side along its normal, whichever way round the outline is drawn', () => {
    const grown = outline([-0.25, -0.25], [4.25, -0.25], [4.25, 4.25], [-0.25, 4.25]);
    const turned: Outline = { kind: 'outline', pointsMm: square.pointsMm.toReversed() };
    expect(offsetOutline(square, 0.25)).toEqual(grown);
    expect(offsetOutline(turned, 0.25)?.pointsMm.toReversed()).toEqual(grown.pointsMm);
    expect(offsetOutline(square, -1)).toEqual(outline([1, 1], [3, 1], [3, 3], [1, 3]));
  });

  it('makes a hollow outline thicker on both of its sides', () => {
    // An angle of 1 mm thickness, 4 mm long both ways: 7 mm². Grown by 0.25 mm: 4.5² − 3² mm².
    const angle = outline([0, 0], [4, 0], [4, 1], [1, 1], [1, 4], [0, 4]);
    const grown = offsetOutline(angle, 0.25);
    expect(shapeArea(angle)).toBeCloseTo(7, 12);
    expect(grown && shapeArea(grown)).toBeCloseTo(4.5 ** 2 - 3 ** 2, 9);
  });

  it('changes the area of a circle as its radius says, and takes points that lie on each other', () => {
    const ring = Array.from({ length: 200 }, (_, index) => {
      const angle = (2 * Math.PI * Math.floor(index / 2)) / 100;
      return [3 * Math.cos(angle), 3 * Math.sin(angle)] as const;
    });
    const smaller = offsetOutline(outline(...ring), -0.25);
    // Regular polygon of 100 corners whose sides lie 3·cos(π/100) − 0.25 from the middle.
    const inner = 3 * Math.cos(Math.PI / 100) - 0.25;
    expect(smaller && shapeArea(smaller)).toBeCloseTo(
      100 * inner ** 2 * Math.tan(Math.PI / 100),
      6,
    );
  });

  it('leaves nothing of an outline thinner than twice the distance, or without an area', () => {
    expect(offsetOutline(square, -2.1)).toBeUndefined();
    expect(offsetOutline(outline([0, 0], [1, 0], [2, 0]), 0.25)).toBeUndefined();
  });
});

describe('placementSensitivity', () => {
  /** 24 × 24 pixels of 0.5 mm, the first at (−10, −20), HU as the function of x and y in mm from there says. */
  async function sliceOf(hu: (x: number, y: number) => number) {
    const spacing = { 2621488: { tag: 0x00280030, vr: 'DS', value: [0.5, 0.5] } as const };
    const stored = Int16Array.from(
      { length: 24 * 24 },
      (_, index) => hu((index % 24) / 2, Math.floor(index / 24) / 2) + 1024,
    );
    const decoded = await decodeImage(ctSlice({ rows: 24, columns: 24, stored, change: spacing }));
    if (!decoded.ok) throw new Error(decoded.refusal.text);
    const { image } = decoded.value;
    const [stack] = buildStacks([{ fileId: 0, file: 'slice', image }]).stacks;
    if (stack === undefined) throw new Error('no stack');
    return { slice: stack.slices[0], stored: decoded.value.stored };
  }
  const disc = (radius: number): Shape => ({
    kind: 'ellipse',
    centreMm: [-10 + 6, -20 + 6, 0],
    radiiMm: [radius, radius],
  });

  it('is 0 in an even region', async () => {
    const { slice, stored } = await sliceOf(() => 40);
    expect(placementSensitivity(disc(2), slice, stored, 40)).toBe(0);
  });

  it('is half a pixel of a slope', async () => {
    const { slice, stored } = await sliceOf((x) => 100 * x);
    // 4 × 4 pixels from 4.5 to 6.5 mm; moved by half a pixel they are 5 columns in a row, 4 in the next ones.
    const block: Shape = {
      kind: 'outline',
      pointsMm: [
        [-10 + 4.3, -20 + 4.3, 0],
        [-10 + 6.2, -20 + 4.3, 0],
        [-10 + 6.2, -20 + 6.2, 0],
        [-10 + 4.3, -20 + 6.2, 0],
      ],
    };
    // Columns 4.5 … 6.0 mm, mean 525 HU. By 0.25 mm to the right 5.0 … 6.0 mm lie inside: 550 HU, and so to the left.
    expect(placementSensitivity(block, slice, stored, 525)).toBe(25);
  });

  it('counts a change of size where a move alone changes nothing', async () => {
    // A ring of 500 HU around a middle of 0 HU within 2.1 mm.
    const { slice, stored } = await sliceOf((x, y) => (Math.hypot(x - 6, y - 6) > 2.1 ? 500 : 0));
    const found = placementSensitivity(disc(2.05), slice, stored, 0) ?? 0;
    // Grown to 2.3 mm the disc holds pixels that lie beyond 2.1 mm.
    const pixels = Array.from({ length: 24 * 24 }, (_, index) =>
      Math.hypot((index % 24) / 2 - 6, Math.floor(index / 24) / 2 - 6),
    );
    const grown = pixels.filter((far) => far <= 2.3);
    const beyond = grown.filter((far) => far > 2.1).length;
    expect(found).toBeGreaterThanOrEqual((500 * beyond) / grown.length - 1e-9);
    expect(beyond).toBeGreaterThan(0);
  });

  it('is not there where a smaller region would hold no pixel', async () => {
    const { slice, stored } = await sliceOf(() => 40);
    expect(placementSensitivity(disc(0.2), slice, stored, 40)).toBeUndefined();
  });
});

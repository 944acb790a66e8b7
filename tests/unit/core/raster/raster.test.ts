import { describe, expect, it } from 'vitest';
import {
  blend,
  colourOf,
  drawLine,
  drawText,
  fillBox,
  fitText,
  LINE_HEIGHT_PX,
  makeRaster,
  type Raster,
  textWidth,
} from '../../../../core/raster/index.js';

const BLACK = [0, 0, 0] as const;
const WHITE = [255, 255, 255] as const;

/** Sum of the red channel as so many fully covered pixels. */
function covered({ rgb }: Raster): number {
  let sum = 0;
  for (let index = 0; index < rgb.length; index += 3) sum += (rgb[index] as number) / 255;
  return sum;
}

describe('A raster', () => {
  it('mixes a colour in by its coverage, and draws nothing outside', () => {
    const raster = makeRaster(2, 1, BLACK);
    blend(raster, 0, 0, [200, 100, 0], 0.5);
    blend(raster, 2, 0, WHITE, 1);
    blend(raster, 0, -1, WHITE, 1);
    expect([...raster.rgb]).toEqual([100, 50, 0, 0, 0, 0]);
  });

  it('fills the part of a box that lies inside', () => {
    const raster = makeRaster(4, 4, BLACK);
    fillBox(raster, { x: 2, y: -1, width: 9, height: 3 }, WHITE);
    expect(covered(raster)).toBe(4);
  });

  it('reads colours as style sheets write them', () => {
    expect(colourOf('#56b4e9')).toEqual([86, 180, 233]);
    expect(() => colourOf('blue')).toThrow('invalid colour');
  });
});

describe('A line', () => {
  // Area of a stroke with round ends: length · width + π(width/2)².
  it('covers its area whatever its direction', () => {
    for (const angle of [0, 0.3, Math.PI / 4, 1.2]) {
      const raster = makeRaster(60, 60, BLACK);
      const end = { x: 10 + 36 * Math.cos(angle), y: 10 + 36 * Math.sin(angle) };
      drawLine(raster, [{ x: 10, y: 10 }, end], { colour: WHITE, widthPx: 3 });
      expect(Math.abs(covered(raster) - (36 * 3 + Math.PI * 1.5 ** 2))).toBeLessThan(3);
    }
  });

  it('with dashes covers their share, and goes on around corners', () => {
    const square = [
      { x: 5, y: 5 },
      { x: 45, y: 5 },
      { x: 45, y: 45 },
      { x: 5, y: 45 },
    ];
    const draw = (dashPx: readonly number[]): number => {
      const raster = makeRaster(50, 50, BLACK);
      drawLine(raster, square, { colour: WHITE, widthPx: 1, dashPx, closed: true });
      return covered(raster);
    };
    expect(draw([])).toBeCloseTo(160, -0.5);
    // Each dash of 5 px has round ends of π/4 px² together.
    expect(draw([5, 5])).toBeCloseTo(16 * (5 + Math.PI / 4), -1);
  });

  it('stays inside its clip', () => {
    const raster = makeRaster(20, 20, BLACK);
    const clip = { x: 5, y: 5, width: 10, height: 10 };
    drawLine(
      raster,
      [
        { x: 0, y: 10 },
        { x: 19, y: 10 },
      ],
      { colour: WHITE, widthPx: 2, clip },
    );
    for (let y = 0; y < 20; y += 1)
      for (const x of [0, 4, 15, 19]) expect(raster.rgb[(y * 20 + x) * 3]).toBe(0);
  });
});

describe('Text', () => {
  it('is as wide as it says, with no ink outside', () => {
    const text = 'Mean 536.3 ± 2.1 HU · 3.1 mm²';
    const raster = makeRaster(Math.ceil(textWidth(text)) + 2, LINE_HEIGHT_PX, BLACK);
    drawText(raster, text, 0, 0, { colour: WHITE });
    expect(covered(raster)).toBeGreaterThan(300);
    const columns = Array.from({ length: raster.width }, (_, x) =>
      Array.from(
        { length: raster.height },
        (_, y) => raster.rgb[(y * raster.width + x) * 3] ?? 0,
      ).some((level) => level > 40),
    );
    expect(columns.lastIndexOf(true)).toBeGreaterThan(textWidth(text) - 6);
  });

  it('ends or is centred where it is asked to', () => {
    const left = (align: 'start' | 'middle' | 'end', x: number): number => {
      const raster = makeRaster(200, LINE_HEIGHT_PX, BLACK);
      drawText(raster, 'HHHH', x, 0, { colour: WHITE, align });
      for (let column = 0; column < 200; column += 1)
        for (let y = 0; y < raster.height; y += 1)
          if ((raster.rgb[(y * 200 + column) * 3] ?? 0) > 100) return column;
      return -1;
    };
    const width = textWidth('HHHH');
    expect(left('end', 150)).toBeCloseTo(left('start', 150) - width, -0.3);
    expect(left('middle', 100)).toBeCloseTo(left('start', 100) - width / 2, -0.3);
  });

  it('has a form for every letter of Latin 1, and a question mark for others', () => {
    const drawn = (text: string): string => {
      const raster = makeRaster(30, LINE_HEIGHT_PX, BLACK);
      drawText(raster, text, 2, 0, { colour: WHITE });
      return Buffer.from(raster.rgb).toString('hex');
    };
    for (let code = 0xc0; code <= 0xff; code += 1) {
      expect(drawn(String.fromCharCode(code))).not.toBe(drawn('?'));
    }
    expect(drawn('心')).toBe(drawn('?'));
  });

  it('is cut to a width with an ellipsis', () => {
    expect(fitText('short', 500)).toBe('short');
    const cut = fitText('a very long place in the words of the reader', 120);
    expect(cut.endsWith('…')).toBe(true);
    expect(textWidth(cut)).toBeLessThanOrEqual(120);
  });
});

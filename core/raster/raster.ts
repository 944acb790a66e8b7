/** A picture of opaque colours, row after row, three bytes a pixel: red, green, blue. */
export interface Raster {
  readonly width: number;
  readonly height: number;
  readonly rgb: Uint8ClampedArray;
}

/** Red, green and blue, 0 … 255. */
export type Colour = readonly [number, number, number];

/** A rectangle of pixels: left and top edge, width and height. */
export interface Box {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

/** A picture of one colour. */
export function makeRaster(width: number, height: number, ground: Colour): Raster {
  const rgb = new Uint8ClampedArray(width * height * 3);
  const raster = { width, height, rgb };
  fillBox(raster, { x: 0, y: 0, width, height }, ground);
  return raster;
}

/** Lays a colour over one pixel with a coverage of 0 to 1; nothing outside the picture. */
export function blend(
  { width, height, rgb }: Raster,
  x: number,
  y: number,
  [r, g, b]: Colour,
  coverage: number,
): void {
  if (x < 0 || y < 0 || x >= width || y >= height || coverage <= 0) return;
  const at = (y * width + x) * 3;
  const under = 1 - Math.min(1, coverage);
  const over = 1 - under;
  rgb[at] = (rgb[at] as number) * under + r * over;
  rgb[at + 1] = (rgb[at + 1] as number) * under + g * over;
  rgb[at + 2] = (rgb[at + 2] as number) * under + b * over;
}

/** Fills a rectangle; the part outside the picture is left out. */
export function fillBox(raster: Raster, box: Box, colour: Colour, coverage = 1): void {
  for (let y = Math.max(0, box.y); y < Math.min(raster.height, box.y + box.height); y += 1)
    for (let x = Math.max(0, box.x); x < Math.min(raster.width, box.x + box.width); x += 1)
      blend(raster, x, y, colour, coverage);
}

/** A colour as style sheets write it: '#56b4e9'. */
export function colourOf(hex: string): Colour {
  if (!/^#[0-9a-f]{6}$/.test(hex)) throw new RangeError(`invalid colour: ${hex}`);
  const value = Number.parseInt(hex.slice(1), 16);
  return [value >> 16, (value >> 8) & 255, value & 255];
}

import { GLYPH_COVERAGE, GLYPH_HEIGHT_PX, GLYPH_TABLE } from './glyphs.js';
import { blend, type Colour, type Raster } from './raster.js';

interface Glyph {
  readonly width: number;
  readonly advance: number;
  /** Place of its first digit in the coverage. */
  readonly start: number;
}

const GLYPHS = readGlyphs();
/** Drawn for letters that the font of key images has not: an empty box would be mistaken for one. */
const UNKNOWN = '?';

/** Height of a line of text, px. */
export const LINE_HEIGHT_PX = GLYPH_HEIGHT_PX;

export interface TextStyle {
  readonly colour: Colour;
  /** Which end of the text x is; its start by default. */
  readonly align?: 'start' | 'middle' | 'end';
  /** A dark line around each letter, for text over an image. */
  readonly halo?: Colour;
}

/** Draws one line of text with its upper edge at y. Letters outside Latin 1 are drawn as question marks. */
export function drawText(
  raster: Raster,
  text: string,
  x: number,
  y: number,
  { colour, align = 'start', halo }: TextStyle,
): void {
  const width = textWidth(text);
  let pen = align === 'start' ? x : align === 'end' ? x - width : x - width / 2;
  if (halo !== undefined) {
    for (const [dx, dy] of AROUND) {
      drawText(raster, text, Math.round(pen) + dx, y + dy, { colour: halo });
    }
    pen = Math.round(pen);
  }
  for (const letter of text) {
    const glyph = glyphOf(letter);
    drawGlyph(raster, glyph, Math.round(pen), Math.round(y), colour);
    pen += glyph.advance;
  }
}

/** Width of a line of text, px. */
export function textWidth(text: string): number {
  let width = 0;
  for (const letter of text) width += glyphOf(letter).advance;
  return width;
}

/** The text, cut to a width with an ellipsis where it is wider. */
export function fitText(text: string, widthPx: number): string {
  if (textWidth(text) <= widthPx) return text;
  const letters = [...text];
  while (letters.length > 0 && textWidth(`${letters.join('')}…`) > widthPx) letters.pop();
  return `${letters.join('').trimEnd()}…`;
}

const AROUND = [-1, 0, 1].flatMap((dy) => [-1, 0, 1].map((dx) => [dx, dy] as const));

function drawGlyph(
  raster: Raster,
  { width, start }: Glyph,
  left: number,
  top: number,
  colour: Colour,
): void {
  for (let index = 0; index < width * GLYPH_HEIGHT_PX; index += 1) {
    const level = Number.parseInt(GLYPH_COVERAGE.charAt(start + index), 16);
    if (level === 0) continue;
    const column = index % width;
    blend(raster, left + column, top + (index - column) / width, colour, level / 15);
  }
}

function glyphOf(letter: string): Glyph {
  const glyph = GLYPHS.get(letter) ?? GLYPHS.get(UNKNOWN);
  if (glyph === undefined) throw new Error('the glyphs have no question mark');
  return glyph;
}

function readGlyphs(): ReadonlyMap<string, Glyph> {
  const glyphs = new Map<string, Glyph>();
  let start = 0;
  for (const entry of GLYPH_TABLE.split(' ')) {
    const [code = 0, width = 0, advance = 0] = entry.split(',').map(Number);
    glyphs.set(String.fromCodePoint(code), { width, advance, start });
    start += width * GLYPH_HEIGHT_PX;
  }
  return glyphs;
}

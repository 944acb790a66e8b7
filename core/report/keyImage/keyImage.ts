import type { CtImage, StoredValues, VoiWindow } from '../../dicom/index.js';
import { formatQuantity } from '../../format/index.js';
import { orientationLetters, scaleBar } from '../../geometry/index.js';
import type { Kernel, Note, NoteRegion } from '../../note/schema.js';
import { segmentOf } from '../../note/segments.js';
import {
  type Colour,
  colourOf,
  drawLine,
  drawText,
  fillBox,
  fitText,
  LINE_HEIGHT_PX,
  makeRaster,
  type Raster,
  textWidth,
} from '../../raster/index.js';
import { ROLE_SIGNS, shapeCentre } from '../../region/index.js';
import { drawSlice } from './drawSlice.js';
import { fieldMm, type PlateField, shapeOnField } from './plateField.js';
import { readoutLines } from './readoutLines.js';

/** A slice that a key image shows. */
export interface KeySlice {
  readonly image: CtImage;
  readonly stored: StoredValues;
  readonly window: VoiWindow;
}

/** The slices that a region was measured on; undefined where it was not, or where the slice can't be had. */
export type KeySlices = Readonly<Record<Kernel, KeySlice | undefined>>;

const SIDE_PX = 440;
const GAP_PX = 12;
const GROUND: Colour = [22, 23, 26];
const TEXT: Colour = [226, 228, 232];
const FAINT: Colour = [158, 163, 171];
const HALO: Colour = [0, 0, 0];
const SYNTHETIC: Colour = [240, 190, 96];
const NAME: Readonly<Record<Kernel, string>> = { soft: 'Soft', sharp: 'Sharp' };

/**
 * The key image of a region: the same place on both kernels, the region's outline in the colour and dashes of its
 * role, orientation, scale, window and slice, and below them what was measured there. Nothing in it says who the
 * patient is. The same note and pixels always give the same picture.
 */
export function keyImage(note: Note, region: NoteRegion, slices: KeySlices): Raster {
  const kernels: readonly Kernel[] = note.pair.sharp === null ? ['soft'] : ['soft', 'sharp'];
  const lines = kernels.map((kernel) => readoutLines(note, region, kernel));
  const readoutPx = Math.max(...lines.map(({ length }) => length)) * LINE_HEIGHT_PX;
  const width = GAP_PX + kernels.length * (SIDE_PX + GAP_PX);
  const top = GAP_PX + LINE_HEIGHT_PX + 6;
  const height = top + SIDE_PX + 8 + readoutPx + LINE_HEIGHT_PX + GAP_PX;
  const raster = makeRaster(width, height, GROUND);
  drawTitle(raster, note, region);
  for (const [index, kernel] of kernels.entries()) {
    const left = GAP_PX + index * (SIDE_PX + GAP_PX);
    drawPlate(raster, { note, region, kernel, slice: slices[kernel], left, top });
    for (const [line, text] of (lines[index] ?? []).entries()) {
      const y = top + SIDE_PX + 8 + line * LINE_HEIGHT_PX;
      drawText(raster, fitText(text, SIDE_PX), left, y, { colour: line === 0 ? TEXT : FAINT });
    }
  }
  const caution =
    'Measuring aid, not a medical device. Check each value against the source images.';
  const y = height - GAP_PX - LINE_HEIGHT_PX + 4;
  drawText(raster, fitText(caution, width - 2 * GAP_PX), GAP_PX, y, { colour: FAINT });
  return raster;
}

function drawTitle(raster: Raster, note: Note, region: NoteRegion): void {
  const finding = note.findings.find(({ id }) => id === region.findingId);
  const segment = segmentOf(finding?.segment ?? null);
  const parts = [
    region.label,
    region.place,
    finding === undefined ? '' : finding.kind,
    segment === undefined ? '' : `${segment.number} ${segment.abbreviation}`,
  ];
  const mark = 'SYNTHETIC';
  const markPx = note.synthetic ? textWidth(mark) + GAP_PX : 0;
  const text = parts.filter((part) => part !== '').join(' · ');
  const roomPx = raster.width - 2 * GAP_PX - markPx;
  drawText(raster, fitText(text, roomPx), GAP_PX, GAP_PX - 2, { colour: TEXT });
  if (note.synthetic) {
    const x = raster.width - GAP_PX;
    drawText(raster, mark, x, GAP_PX - 2, { colour: SYNTHETIC, align: 'end' });
  }
}

interface PlateDrawing {
  readonly note: Note;
  readonly region: NoteRegion;
  readonly kernel: Kernel;
  readonly slice: KeySlice | undefined;
  readonly left: number;
  readonly top: number;
}

function drawPlate(raster: Raster, { note, region, kernel, slice, left, top }: PlateDrawing): void {
  const box = { x: left, y: top, width: SIDE_PX, height: SIDE_PX };
  fillBox(raster, box, HALO);
  const over = { colour: TEXT, halo: HALO };
  const stack = note.pair[kernel];
  const label = stack?.kernelLabel ?? 'no kernel label';
  const name = fitText(`${NAME[kernel]} · ${label}`, SIDE_PX / 2 - 20);
  if (slice === undefined) {
    const middle = top + SIDE_PX / 2;
    drawText(raster, 'No image of this slice', left + SIDE_PX / 2, middle, {
      colour: FAINT,
      align: 'middle',
    });
    drawText(raster, name, left + 6, top + 4, over);
    return;
  }
  const { image, stored, window } = slice;
  const field: PlateField = {
    grid: image.grid,
    centreMm: shapeCentre(region.shape),
    mmPerPx: fieldMm(region.shape) / SIDE_PX,
    left,
    top,
    sidePx: SIDE_PX,
  };
  drawSlice(raster, field, image, stored, window);
  const border = shapeOnField(region.shape, field);
  const sign = ROLE_SIGNS[region.role];
  drawLine(raster, border, { colour: HALO, widthPx: 3.4, closed: true, clip: box });
  drawLine(raster, border, {
    colour: colourOf(sign.colour),
    widthPx: 1.7,
    dashPx: sign.dashPx,
    closed: true,
    clip: box,
  });
  drawText(raster, name, left + 6, top + 4, over);
  drawText(raster, windowText(window), left + SIDE_PX - 6, top + 4, { ...over, align: 'end' });
  drawSides(raster, field);
  drawScale(raster, field);
}

function windowText({ centre, width, explanation, table }: VoiWindow): string {
  if (table !== undefined) return explanation ?? 'window of the file';
  return `C ${formatQuantity(centre, 'pixelHu')} W ${formatQuantity(width, 'pixelHu')}`;
}

function drawSides(raster: Raster, { grid, left, top, sidePx }: PlateField): void {
  const sides = orientationLetters(grid);
  const middle = { x: left + sidePx / 2, y: top + sidePx / 2 - LINE_HEIGHT_PX / 2 };
  const over = { colour: TEXT, halo: HALO };
  drawText(raster, sides.left, left + 6, middle.y, over);
  drawText(raster, sides.right, left + sidePx - 6, middle.y, { ...over, align: 'end' });
  drawText(raster, sides.top, middle.x, top + 4, { ...over, align: 'middle' });
  const bottom = top + sidePx - LINE_HEIGHT_PX - 4;
  drawText(raster, sides.bottom, middle.x, bottom, { ...over, align: 'middle' });
}

function drawScale(raster: Raster, { mmPerPx, left, top, sidePx }: PlateField): void {
  const bar = scaleBar(1 / mmPerPx, 130);
  if (bar === undefined) return;
  const y = top + sidePx - 12;
  const right = left + sidePx - 10;
  const ends = [right - bar.lengthPx, right].map((x) => ({ x, y }));
  drawLine(raster, ends, { colour: HALO, widthPx: 5 });
  drawLine(raster, ends, { colour: TEXT, widthPx: 2.4 });
  const text = `${bar.lengthMm} mm`;
  const x = right - bar.lengthPx - 8;
  drawText(raster, text, x, y - LINE_HEIGHT_PX / 2, { colour: TEXT, halo: HALO, align: 'end' });
}

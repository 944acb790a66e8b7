import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import type { Note } from '../../core/note/index.js';
import { encodePng, makeRaster } from '../../core/raster/index.js';
import { fieldMm, type KeySlices, keyImage } from '../../core/report/keyImage/index.js';
import type { Stack } from '../../core/stack/index.js';
import { pythonHas, pythonJson } from '../support/python.js';
import { pair } from '../unit/core/note/noteFixture.js';
import { richNote } from '../unit/core/note/richNote.js';

const WINDOW = { centre: 130, width: 120, function: 'LINEAR' } as const;

const images = await pair();

function slicesOf(note: Note): KeySlices {
  const region = note.regions[0];
  const one = (stack: Stack, index: number | null | undefined) => {
    const image = stack.slices[index ?? -1]?.image;
    const stored = images.storedOf(stack, index ?? -1);
    return image && stored && { image, stored, window: WINDOW };
  };
  return {
    soft: one(images.soft, region?.soft?.sliceIndex),
    sharp: one(images.sharp, region?.sharp?.sliceIndex),
  };
}

interface Picture {
  readonly size: readonly number[];
  readonly mode: string;
  readonly hex: string;
}

const READ = `
import json, sys
from PIL import Image
image = Image.open(sys.argv[1])
image.load()
print(json.dumps({"size": image.size, "mode": image.mode, "hex": image.tobytes().hex()}))`;

/** What Pillow, a general image library, reads of a PNG file. */
function readByPillow(png: Uint8Array): Picture {
  const folder = mkdtempSync(join(tmpdir(), 'png-'));
  try {
    writeFileSync(join(folder, 'a.png'), png);
    return pythonJson(READ, [join(folder, 'a.png')]) as Picture;
  } finally {
    rmSync(folder, { recursive: true });
  }
}

describe.skipIf(!pythonHas('PIL'))('A picture as PNG, read by Pillow', () => {
  it('has the same pixels', () => {
    const raster = makeRaster(37, 11, [0, 0, 0]);
    raster.rgb.forEach((_, index) => {
      raster.rgb[index] = (index * 7919) % 256;
    });
    const read = readByPillow(encodePng(raster));
    expect(read.size).toEqual([37, 11]);
    expect(read.mode).toBe('RGB');
    expect(read.hex).toBe(Buffer.from(raster.rgb).toString('hex'));
  });
});

describe('A key image', () => {
  const note = richNote();
  const region = note.regions[0];
  if (region === undefined) throw new Error('no region');

  it('is the same picture each time', () => {
    const one = keyImage(note, region, slicesOf(note));
    expect(encodePng(one)).toEqual(encodePng(keyImage(note, region, slicesOf(note))));
  });

  // PS3.3 C.11.2.1.2.1: grey = ((x − (c − 0.5))/(w − 1) + 0.5)·255. The soft fixture has x = 100 + column.
  it('shows HU through the window as the standard states it, at the right place', () => {
    const raster = keyImage(note, region, slicesOf(note));
    const mmPerPx = fieldMm(region.shape) / 440;
    // The lumen's centre is column 8 of 0.25 mm; a place 30 px right of the middle of the soft plate.
    const column = 8 + ((232 + 30 - 12 - 219.5) * mmPerPx) / 0.25;
    const grey = ((100 + column - (130 - 0.5)) / 119 + 0.5) * 255;
    const y = 37 + 150;
    expect(raster.rgb[(y * raster.width + 232 + 30) * 3]).toBeCloseTo(grey, -0.3);
  });

  it('says so where the slice can’t be had, and goes on', () => {
    const whole = keyImage(note, region, slicesOf(note));
    const half = keyImage(note, region, { ...slicesOf(note), sharp: undefined });
    expect([half.width, half.height]).toEqual([whole.width, whole.height]);
    expect(encodePng(half)).not.toEqual(encodePng(whole));
  });
});

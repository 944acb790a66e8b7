/**
 * Fitted stents against pairs that the program had no part in (stentStudies.py): line integrals and filters in numpy, photon
 * noise by numpy, back projection by scikit-image. Struts are rings or 8 to 16 wires that turn from slice to slice.
 */
import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { measureSharpness } from '../../core/pairing/sharpness.js';
import { fitStent } from '../../core/stent/index.js';
import { type ImageStack, imageStack, readFrom } from '../bench/evidence/imageStack.js';
import { pythonHas } from '../support/python.js';

const PYTHON = '/usr/bin/python3';
const available = pythonHas('numpy', 'skimage');
const title = available
  ? 'fitted stents on pairs that numpy and scikit-image made'
  : 'fitted stents on pairs that numpy and scikit-image made (SKIPPED: install python3-skimage to run it)';

interface Study {
  readonly size: number;
  readonly pixelMm: number;
  readonly firstMm: readonly [number, number];
  readonly heightsMm: readonly number[];
  readonly stents: readonly {
    readonly centreMm: readonly [number, number];
    readonly innerDiameterMm: number;
    readonly strutMm: number;
    readonly lumenHu: number;
    readonly wires: number;
  }[];
}

describe.skipIf(!available)(title, () => {
  let folder = '';
  let study: Study;
  let stacks: readonly [ImageStack, ImageStack];

  beforeAll(() => {
    folder = mkdtempSync(join(tmpdir(), 'stents-'));
    const script = join(import.meta.dirname, 'stentStudies.py');
    execFileSync(PYTHON, [script, folder, '2', 'wires']);
    study = JSON.parse(readFileSync(join(folder, 'truth.json'), 'utf8'));
    stacks = [stackOf('soft'), stackOf('sharp')];
  }, 180_000);

  afterAll(() => rmSync(folder, { recursive: true, force: true }));

  function stackOf(side: string): ImageStack {
    const { size, pixelMm, firstMm, heightsMm } = study;
    const bytes = readFileSync(join(folder, `${side}.bin`));
    const half = ((size - 1) / 2) * pixelMm;
    const slices = heightsMm.map((zMm, slice) => ({
      zMm,
      hu: Float64Array.from({ length: size * size }, (_, pixel) =>
        bytes.readInt16LE(2 * (slice * size * size + pixel)),
      ),
    }));
    const grid = {
      centreMm: [firstMm[0] + half, firstMm[1] + half],
      fieldOfViewMm: size * pixelMm,
      matrix: size,
    } as const;
    return imageStack(side, grid, slices);
  }

  it('tells strut diameters within 0.15 mm and lumens within 60 HU', async () => {
    const [soft, sharp] = stacks;
    const { textures, text } = await measureSharpness(
      soft.stack,
      sharp.stack,
      readFrom(soft, sharp),
    );
    if (textures === undefined) throw new Error(text);
    const fits = study.stents.map((stent) => ({
      stent,
      fit: fitStent(
        { centreMm: [stent.centreMm[0] + 0.3, stent.centreMm[1] - 0.2, 0] },
        soft.stack,
        sharp.stack,
        (stack, slice) => (stack === soft.stack ? soft : sharp).stored[slice],
        { soft: textures.first, sharp: textures.second },
      ),
    }));
    expect(fits.map(({ fit }) => fit.reason?.code)).toEqual(study.stents.map(() => undefined));
    for (const { stent, fit } of fits) {
      if (fit.reason !== undefined) continue;
      const truth = stent.innerDiameterMm + stent.strutMm;
      expect(Math.abs(fit.strutDiameterMm.value - truth)).toBeLessThan(0.15);
      expect(Math.abs(fit.lumenHu.value - stent.lumenHu)).toBeLessThan(60);
    }
  }, 60_000);
});

import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import {
  addQuantumNoise,
  firstPixelMm,
  pixelMm,
  projectSlice,
  reconstructPairHu,
  seededUniform,
} from '../../core/phantom/index.js';
import {
  drawStents,
  STENT_GRID,
  STENT_SCAN,
  stentSlice,
  type TrueStent,
} from '../bench/evidence/stentScene.js';
import { ctSlice } from './ctSlice.js';
import { change } from './element.js';

/** Heights of the slices, mm. */
export const STUDY_HEIGHTS_MM = [-2, -1.5, -1, -0.5, 0, 0.5, 1, 1.5, 2] as const;
/** Side of the image, mm; its middle is the patient's origin. */
export const STUDY_FIELD_MM = STENT_GRID.fieldOfViewMm;

/** The stent in the middle, whose truth is known; the others are drawn. Place 4 is a lumen without struts. */
export const STUDY_STENTS: readonly TrueStent[] = drawStents(seededUniform(61, 1), 8).map(
  (stent, index) => {
    if (index === 0)
      return {
        ...stent,
        centreMm: [0, -5],
        innerDiameterMm: 3,
        massHuMm: 500,
        lumenHu: 340,
        wallMm: 0.5,
        tiltDeg: 4,
        azimuthDeg: 30,
      };
    return index === 4 ? { ...stent, centreMm: [-18, 6], massHuMm: 0, tiltDeg: 0 } : stent;
  },
);

/** Writes a pair of stacks of one synthetic acquisition with stents as DICOM files. */
export function writeStentStudy(folder: string): void {
  mkdirSync(folder, { recursive: true });
  const [x, y] = firstPixelMm(STENT_GRID);
  const spacing = pixelMm(STENT_GRID);
  STUDY_HEIGHTS_MM.forEach((z, index) => {
    const clean = projectSlice(stentSlice(STUDY_STENTS, z, 380), STENT_SCAN);
    const noisy = addQuantumNoise(clean, 1.6e4, seededUniform(61, 2, index));
    const both = reconstructPairHu(
      noisy,
      STENT_SCAN,
      [
        { apodisation: 'hann', cutOffPerMm: 0.62 },
        { apodisation: 'cosine', cutOffPerMm: 1.26 },
      ],
      STENT_GRID,
    );
    both.forEach((hu, kernel) => {
      const number = 3 + kernel;
      const options = {
        rows: STENT_GRID.matrix,
        columns: STENT_GRID.matrix,
        stored: Int16Array.from(hu, (value) => Math.round(value) + 1024),
        series: `2.25.61.${number}`,
        number: index + 1,
        change: change(
          { tag: 0x00180060, vr: 'DS', value: 120 },
          { tag: 0x00181210, vr: 'SH', value: kernel === 0 ? 'Plain 1' : 'Plain 2' },
          { tag: 0x00200011, vr: 'IS', value: number },
          { tag: 0x00200012, vr: 'IS', value: 7 },
          { tag: 0x00200032, vr: 'DS', value: [x, y, z] },
          { tag: 0x00280030, vr: 'DS', value: [spacing, spacing] },
        ),
      };
      writeFileSync(join(folder, `${number}-${index}`), ctSlice(options));
    });
  });
}

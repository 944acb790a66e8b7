import { writeFile } from '../../dicom/write/index.js';
import { projectSlice } from '../projectSlice.js';
import { addQuantumNoise } from '../quantumNoise.js';
import { reconstructPairHu } from '../reconstruct.js';
import { seededUniform } from '../uniformSource.js';
import {
  checkOptions,
  type DemonstrationOptions,
  demonstrationGrid,
  KERNELS,
  PHOTONS_PER_RAY,
  SCAN,
  SIDES,
  sliceZMm,
} from './acquisition.js';
import { identifiersOf } from './identifiers.js';
import { demonstrationScene } from './scene.js';
import { RESCALE_INTERCEPT, sliceElements } from './sliceElements.js';

/** A file of the demonstration: path below its folder, and bytes. */
export interface DemonstrationFile {
  readonly path: string;
  readonly bytes: Uint8Array;
}

/** One slice of the demonstration: one noisy sinogram, reconstructed with both kernels, as two DICOM files. */
export function makeSlice(
  options: DemonstrationOptions,
  index: number,
): readonly DemonstrationFile[] {
  checkOptions(options);
  const ids = identifiersOf(options);
  const grid = demonstrationGrid(options.matrix);
  const scene = demonstrationScene(sliceZMm(options.slices, index));
  const noisy = addQuantumNoise(
    projectSlice(scene, SCAN),
    PHOTONS_PER_RAY,
    seededUniform(options.seed, index),
  );
  const [soft, sharp] = reconstructPairHu(noisy, SCAN, [KERNELS.soft, KERNELS.sharp], grid);
  const images = { soft, sharp };
  return SIDES.map((side) => ({
    path: ids.fileOf(side, index),
    bytes: writeFile(sliceElements(options, side, index, storedValues(images[side]))),
  }));
}

/** HU as 16-bit unsigned stored values; what does not fit is set to the nearest that does. */
function storedValues(hu: Float64Array): Uint16Array {
  const last = 0xffff;
  return Uint16Array.from(hu, (value) =>
    Math.min(last, Math.max(0, Math.round(value - RESCALE_INTERCEPT))),
  );
}

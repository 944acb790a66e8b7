import type { Vec3 } from '../../geometry/index.js';
import { expectedNoiseHu } from '../expectedNoise.js';
import { projectSlice } from '../projectSlice.js';
import type { SceneObject } from '../scene.js';
import {
  checkOptions,
  DEMONSTRATION_VERSION,
  type DemonstrationOptions,
  demonstrationGrid,
  KERNELS,
  PHOTONS_PER_RAY,
  SCAN,
  SIDES,
  SLICE_SPACING_MM,
  SLICE_THICKNESS_MM,
  sliceZMm,
} from './acquisition.js';
import { coronaryCentreMm, inStent, STENT } from './coronary.js';
import { identifiersOf } from './identifiers.js';
import { demonstrationScene } from './scene.js';
import { SYNTHETIC_STATEMENT } from './sliceElements.js';
import { HU } from './tissue.js';
import { REGIONS_Z_MM, trueRegions } from './trueRegions.js';

/** Everything that is known of a demonstration because it was made: the content of its truth file. */
export type DemonstrationTruth = ReturnType<typeof demonstrationTruth>;

/** The truth of a demonstration, as plain data for JSON. Lengths in mm, LPS; values in HU. */
export function demonstrationTruth(options: DemonstrationOptions) {
  checkOptions(options);
  const ids = identifiersOf(options);
  const heights = Array.from({ length: options.slices }, (_, i) => sliceZMm(options.slices, i));
  const isInside = (z: number): boolean => heights.includes(z);
  const regions = trueRegions().filter(({ shape }) => isInside(shape.centreMm[2]));
  return {
    statement: SYNTHETIC_STATEMENT,
    /** What the demonstration was made of: the stamp by which a finished one is known. */
    stamp: { version: DEMONSTRATION_VERSION, ...options },
    studyInstanceUid: ids.studyInstanceUid,
    frameOfReferenceUid: ids.frameOfReferenceUid,
    scan: { ...SCAN, photonsPerRay: PHOTONS_PER_RAY },
    grid: demonstrationGrid(options.matrix),
    sliceSpacingMm: SLICE_SPACING_MM,
    sliceThicknessMm: SLICE_THICKNESS_MM,
    thicknessNote: 'Each slice is computed at its middle; tissues are even through its thickness.',
    kernels: SIDES.map((side) => ({
      side,
      ...KERNELS[side],
      seriesInstanceUid: ids.seriesInstanceUid(side),
      formula: FORMULA[KERNELS[side].apodisation],
    })),
    blurNote: 'One Gaussian of blurSigmaMm, before the noise, is common to both kernels.',
    expectedNoise: expectedNoise(regions.map(({ id, shape }) => ({ id, placeMm: shape.centreMm }))),
    stents: [stentTruth()],
    regions,
    contrasts: [{ id: 'C1', lumen: 'L1', wall: 'W1', noise: 'reference', reference: 'R1' }].filter(
      ({ lumen, wall }) => [lumen, wall].every((id) => regions.some((one) => one.id === id)),
    ),
    profiles: [profile()],
    slices: heights.map((zMm, index) => ({
      zMm,
      soft: ids.fileOf('soft', index),
      sharp: ids.fileOf('sharp', index),
      objects: objectsAt(zMm),
    })),
  };
}

const FORMULA = {
  'ram-lak': 'W(f) = 1',
  'shepp-logan': 'W(f) = sin(πf/2c) / (πf/2c), c the cut-off',
  cosine: 'W(f) = cos(πf/2c), c the cut-off',
  hann: 'W(f) = (1 + cos(πf/c)) / 2, c the cut-off',
  hamming: 'W(f) = 0.54 + 0.46 cos(πf/c), c the cut-off',
} as const;

/** SD of the quantum noise at the places of those regions that lie in the slice of the stent's middle. */
function expectedNoise(places: readonly { readonly id: string; readonly placeMm: Vec3 }[]) {
  const sinogram = projectSlice(demonstrationScene(REGIONS_Z_MM), SCAN);
  return places
    .filter(({ placeMm }) => placeMm[2] === REGIONS_Z_MM)
    .map(({ id, placeMm: [x, y] }) => {
      const sdHu = (side: 'soft' | 'sharp'): number =>
        expectedNoiseHu(sinogram, SCAN, KERNELS[side], PHOTONS_PER_RAY, [x, y]);
      return { region: id, softSdHu: sdHu('soft'), sharpSdHu: sdHu('sharp') };
    });
}

function stentTruth() {
  const inner = STENT.innerDiameterMm / 2;
  const outer = inner + STENT.strutMm;
  return {
    id: 'S1',
    centreMm: [...coronaryCentreMm(REGIONS_Z_MM), REGIONS_Z_MM],
    fromZMm: STENT.fromMm,
    toZMm: STENT.toMm,
    nominalMm: STENT.innerDiameterMm,
    innerDiameterMm: STENT.innerDiameterMm,
    outerDiameterMm: 2 * outer,
    strutDiameterMm: inner + outer,
    strutMm: STENT.strutMm,
    strutHu: STENT.strutHu,
    /** What the ring has more than the lumen would have in its place, over its cross-section. */
    massHuMm2: (STENT.strutHu - STENT.lumenHu) * Math.PI * (outer ** 2 - inner ** 2),
    lumenHu: STENT.lumenHu,
    wallMm: STENT.wallMm,
    wallHu: HU.vesselWall,
    outsideHu: HU.fat,
  };
}

function profile() {
  const [x, y] = coronaryCentreMm(REGIONS_Z_MM);
  return {
    id: 'X1',
    fromMm: [x - 4, y, REGIONS_Z_MM],
    toMm: [x + 4, y, REGIONS_Z_MM],
    bandMm: 0.8,
    nominalMm: STENT.innerDiameterMm,
  };
}

/** Tissues in the order of painting: a later one covers what is under it. */
function objectsAt(zMm: number) {
  const { painted, insets } = demonstrationScene(zMm);
  const plain = ({ name, hu, centreMm, radiiMm, angleDeg }: SceneObject) => ({
    name,
    hu,
    centreMm: [...centreMm, zMm],
    radiiMm,
    angleDeg,
  });
  return { inStent: inStent(zMm), tissues: [...painted, ...insets].map(plain) };
}

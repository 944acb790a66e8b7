import type { ImageGrid, Inset, ParallelScan, SceneSlice } from '../../../core/phantom/index.js';

export const OBSERVER_SCAN: ParallelScan = {
  views: 480,
  detectors: 432,
  pitchMm: 0.35,
  blurSigmaMm: 0.18,
  waterPerMm: 0.02059,
};

/** Pixels of 0.39 mm, as in the demonstration study. */
export const OBSERVER_GRID: ImageGrid = { centreMm: [0, 0], fieldOfViewMm: 100, matrix: 256 };

const TISSUE_HU = 50;

/** Chambers whose edges tell the blur. */
const CHAMBERS = [
  [-24, -24, 13, 350],
  [25, -22, 12, 300],
  [-2, 29, 13, 250],
] as const;

/** Where the discs lie: in even tissue, 10 mm and more from each other and from the chambers. */
export const DISC_PLACES_MM: readonly (readonly [number, number])[] = [
  [0, -4],
  [0, -36],
  [-40, 4],
  [40, 4],
  [-26, 14],
  [24, 14],
  [20, 34],
  [-24, 32],
  [-15, -4],
  [15, -4],
  [0, -20],
];

/** A round body with three chambers, and a disc of one contrast at each place, or none. */
export function observerScene(disc?: {
  readonly diameterMm: number;
  readonly contrastHu: number;
}): SceneSlice {
  const round = (x: number, y: number, radiusMm: number) => ({
    centreMm: [x, y] as const,
    radiiMm: [radiusMm, radiusMm] as const,
    angleDeg: 0,
  });
  const inset = (name: string, hu: number, x: number, y: number, radiusMm: number): Inset => ({
    name,
    hu,
    aroundHu: TISSUE_HU,
    ...round(x, y, radiusMm),
  });
  return {
    painted: [{ name: 'body', hu: TISSUE_HU, ...round(0, 0, 55) }],
    insets: [
      ...CHAMBERS.map(([x, y, radius, hu]) => inset('chamber', hu, x, y, radius)),
      ...(disc === undefined
        ? []
        : DISC_PLACES_MM.map(([x, y]) =>
            inset('disc', TISSUE_HU + disc.contrastHu, x, y, disc.diameterMm / 2),
          )),
    ],
  };
}

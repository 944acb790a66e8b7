import type {
  ImageGrid,
  Inset,
  ParallelScan,
  SceneSlice,
  UniformSource,
} from '../../../core/phantom/index.js';

/** Views and detectors for a body of 116 mm. */
export const STENT_SCAN: ParallelScan = {
  views: 480,
  detectors: 432,
  pitchMm: 0.35,
  blurSigmaMm: 0.18,
  waterPerMm: 0.02059,
};

/** Pixels of 0.39 mm, as in the demonstration study. */
export const STENT_GRID: ImageGrid = { centreMm: [0, 0], fieldOfViewMm: 100, matrix: 256 };

export const STENT_HEIGHTS_MM = [-1, -0.5, 0, 0.5, 1] as const;

/** A stent whose truth is known: a tube that may lean against the slices. */
export interface TrueStent {
  /** Where its axis meets height 0. */
  readonly centreMm: readonly [number, number];
  readonly innerDiameterMm: number;
  readonly strutMm: number;
  /** HU·mm above the wall: line mass of the strut's ring. */
  readonly massHuMm: number;
  readonly lumenHu: number;
  readonly wallMm: number;
  readonly tiltDeg: number;
  /** Direction in the slice that the axis leans to. */
  readonly azimuthDeg: number;
}

const TISSUE_HU = 60;
export const WALL_HU = 60;
const FAT_HU = -90;
/** Struts are this thick. */
const STRUT_MM = 0.1;

/** Uniform blood, where the noise is measured, and whose edges tell the blur. */
const CHAMBERS = [
  [-24, -24, 13],
  [25, -22, 12],
  [-2, 29, 13],
] as const;

/** Vessels lie here, 14 mm and more from each other. */
const VESSELS = [
  [0, -5],
  [0, -40],
  [-38, 2],
  [16, 8],
  [-18, 6],
  [26, 27],
  [-29, 30],
] as const;

/** Seven stents of the grid: sizes, masses, lumens, walls, tilts and places are drawn. */
export function drawStents(uniform: UniformSource, mostTiltDeg = 20): readonly TrueStent[] {
  const between = (low: number, high: number): number => low + (high - low) * uniform();
  return VESSELS.map(([x, y]) => ({
    centreMm: [x + between(-0.5, 0.5), y + between(-0.5, 0.5)],
    innerDiameterMm: between(2.25, 4),
    strutMm: STRUT_MM,
    massHuMm: between(200, 800),
    lumenHu: between(60, 450),
    wallMm: between(0.3, 0.8),
    tiltDeg: between(0, mostTiltDeg),
    azimuthDeg: between(0, 360),
  }));
}

/** Centre of a stent at a height. */
export function stentCentreMm(stent: TrueStent, zMm: number): readonly [number, number] {
  const away = zMm * Math.tan((stent.tiltDeg * Math.PI) / 180);
  const azimuth = (stent.azimuthDeg * Math.PI) / 180;
  return [
    stent.centreMm[0] + away * Math.cos(azimuth),
    stent.centreMm[1] + away * Math.sin(azimuth),
  ];
}

/** Diameter of the circle in the middle of the struts. */
export function strutDiameterMm({ innerDiameterMm, strutMm }: TrueStent): number {
  return innerDiameterMm + strutMm;
}

/** One height of a body with chambers and these stents, each in fat. */
export function stentSlice(
  stents: readonly TrueStent[],
  zMm: number,
  chamberHu: number,
): SceneSlice {
  const chambers = CHAMBERS.map(
    ([x, y, radius]): Inset => ({
      name: 'chamber',
      hu: chamberHu,
      aroundHu: TISSUE_HU,
      centreMm: [x, y],
      radiiMm: [radius, radius],
      angleDeg: 0,
    }),
  );
  return {
    painted: [{ name: 'body', hu: TISSUE_HU, centreMm: [0, 0], radiiMm: [58, 58], angleDeg: 0 }],
    insets: [...chambers, ...stents.flatMap((stent) => vessel(stent, zMm))],
  };
}

function vessel(stent: TrueStent, zMm: number): readonly Inset[] {
  const centreMm = stentCentreMm(stent, zMm);
  const stretch = 1 / Math.cos((stent.tiltDeg * Math.PI) / 180);
  const layer = (name: string, hu: number, aroundHu: number, radius: number): Inset => ({
    name,
    hu,
    aroundHu,
    centreMm,
    radiiMm: [radius * stretch, radius],
    angleDeg: stent.azimuthDeg,
  });
  const inner = stent.innerDiameterMm / 2;
  const outer = inner + stent.strutMm;
  const strutHu = WALL_HU + stent.massHuMm / stent.strutMm;
  return [
    {
      name: 'fat',
      hu: FAT_HU,
      aroundHu: TISSUE_HU,
      centreMm: stent.centreMm,
      radiiMm: [6, 6],
      angleDeg: 0,
    },
    layer('wall', WALL_HU, FAT_HU, outer + stent.wallMm),
    layer('strut', strutHu, WALL_HU, outer),
    layer('lumen', stent.lumenHu, strutHu, inner),
  ];
}

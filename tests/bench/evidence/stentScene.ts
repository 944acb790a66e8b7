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
  /** Wires that the struts are, evenly around the circle; 0 for a closed ring of the same line mass. */
  readonly wires: number;
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

/** Seven stents of the grid: sizes, masses, lumens, walls, tilts and places are drawn; wires too, 8 to 16 of them. */
export function drawStents(
  uniform: UniformSource,
  mostTiltDeg = 20,
  areWires = false,
): readonly TrueStent[] {
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
    wires: areWires ? Math.floor(between(8, 17)) : 0,
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
  const fat: Inset = {
    name: 'fat',
    hu: FAT_HU,
    aroundHu: TISSUE_HU,
    centreMm: stent.centreMm,
    radiiMm: [6, 6],
    angleDeg: 0,
  };
  const wall = layer('wall', WALL_HU, FAT_HU, outer + stent.wallMm);
  if (stent.wires > 0)
    return [
      fat,
      wall,
      layer('lumen', stent.lumenHu, WALL_HU, inner + stent.strutMm / 2),
      ...wiresOf(stent, centreMm, stretch, zMm),
    ];
  return [
    fat,
    wall,
    layer('strut', strutHu, WALL_HU, outer),
    layer('lumen', stent.lumenHu, strutHu, inner),
  ];
}

/** Round wires on the circle in the middle of the struts, which turn a little from height to height. */
function wiresOf(
  stent: TrueStent,
  centreMm: readonly [number, number],
  stretch: number,
  zMm: number,
): readonly Inset[] {
  const { wires, strutMm, massHuMm } = stent;
  const radius = stent.innerDiameterMm / 2 + strutMm / 2;
  const half = strutMm / 2;
  const aboveHu = (massHuMm * 2 * Math.PI * radius) / (wires * Math.PI * half * half);
  const azimuth = (stent.azimuthDeg * Math.PI) / 180;
  return Array.from({ length: wires }, (_, wire): Inset => {
    const turn = (2 * Math.PI * (wire + 0.8 * zMm)) / wires;
    const along = radius * stretch * Math.cos(turn);
    const across = radius * Math.sin(turn);
    return {
      name: 'wire',
      hu: WALL_HU + aboveHu,
      aroundHu: WALL_HU,
      centreMm: [
        centreMm[0] + along * Math.cos(azimuth) - across * Math.sin(azimuth),
        centreMm[1] + along * Math.sin(azimuth) + across * Math.cos(azimuth),
      ],
      radiiMm: [half, half],
      angleDeg: 0,
    };
  });
}

import type {
  ImageGrid,
  Inset,
  ParallelScan,
  SceneSlice,
  UniformSource,
} from '../../../core/phantom/index.js';

export const EDGE_SCAN: ParallelScan = {
  views: 480,
  detectors: 432,
  pitchMm: 0.35,
  blurSigmaMm: 0.18,
  waterPerMm: 0.02059,
};

/** Pixels of 0.39 mm, as in the demonstration study. */
export const EDGE_GRID: ImageGrid = { centreMm: [0, 0], fieldOfViewMm: 100, matrix: 256 };

const TISSUE_HU = 60;
const FAT_HU = -90;
const WALL_HU = 60;
const LUNG_HU = -840;

/** A structure whose place and border are known: a ring of a strut, a grain of calcium, a lung. */
export interface TrueStructure {
  readonly kind: 'strut' | 'calcium' | 'air';
  readonly centreMm: readonly [number, number];
  readonly radiiMm: readonly [number, number];
  readonly angleDeg: number;
  /** Half axis along which it is hollow: a place well inside a ring is away from it. */
  readonly hollowMm?: number;
  /** Line mass of a strut, HU·mm; HU of calcium. */
  readonly size: number;
}

export interface EdgeScene {
  readonly slice: SceneSlice;
  readonly structures: readonly TrueStructure[];
  readonly lumenHu: number;
}

/** Chambers whose even blood tells the level of the lumen, and whose edges tell the blur. */
const CHAMBERS = [
  [-24, -24, 13, 1],
  [25, -22, 12, 0.97],
  [-2, 29, 13, 0.6],
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

const LUNG = { centreMm: [58, 2] as const, radiiMm: [16, 22] as const, angleDeg: 0 };

/**
 * A round body with chambers and a lung at its side, and seven vessels in fat: three with a ring of a strut of
 * `leastStrutHuMm` to 800 HU·mm, three with calcium in the wall, one plain. All sizes, places and HU are drawn.
 */
export function edgeScene(uniform: UniformSource, leastStrutHuMm: number): EdgeScene {
  const between = (low: number, high: number): number => low + (high - low) * uniform();
  const lumenHu = between(280, 450);
  const insets: Inset[] = [];
  const structures: TrueStructure[] = [{ kind: 'air', size: LUNG_HU, ...LUNG }];
  const add = (
    name: string,
    hu: number,
    aroundHu: number,
    [x, y]: readonly [number, number],
    [a, b]: readonly [number, number],
    angleDeg = 0,
  ): void => {
    insets.push({ name, hu, aroundHu, centreMm: [x, y], radiiMm: [a, b], angleDeg });
  };
  for (const [x, y, radius, share] of CHAMBERS)
    add('chamber', lumenHu * share, TISSUE_HU, [x, y], [radius, radius]);
  VESSELS.forEach(([x0, y0], index) => {
    const centre = [x0 + between(-0.5, 0.5), y0 + between(-0.5, 0.5)] as const;
    add('fat', FAT_HU, TISSUE_HU, centre, [6, 6]);
    const own = lumenHu * between(0.93, 1.03);
    const wall = between(0.3, 0.8);
    if (index < 3) {
      const inner = between(1.125, 2);
      const thick = 0.1;
      const mass = between(leastStrutHuMm, 800);
      const strutHu = WALL_HU + mass / thick;
      const outer = inner + thick;
      add('wall', WALL_HU, FAT_HU, centre, [outer + wall, outer + wall]);
      add('strut', strutHu, WALL_HU, centre, [outer, outer]);
      add('lumen', own, strutHu, centre, [inner, inner]);
      structures.push({
        kind: 'strut',
        centreMm: centre,
        radiiMm: [outer, outer],
        angleDeg: 0,
        hollowMm: inner,
        size: mass,
      });
      return;
    }
    const radius = between(1.2, 2.2);
    if (index === 6) {
      add('wall', WALL_HU, FAT_HU, centre, [radius + wall, radius + wall]);
      add('lumen', own, WALL_HU, centre, [radius, radius]);
      return;
    }
    const half = [between(0.5, 1.4), between(0.4, 1)] as const;
    const hu = between(800, 1500);
    const angle = between(0, 2 * Math.PI);
    const away = radius + 0.1 + Math.max(...half);
    const grain = [centre[0] + away * Math.cos(angle), centre[1] + away * Math.sin(angle)] as const;
    const reach = Math.max(away + Math.max(...half) + 0.2, radius + wall);
    add('wall', WALL_HU, FAT_HU, centre, [Math.min(5.9, reach), Math.min(5.9, reach)]);
    add('lumen', own, WALL_HU, centre, [radius, radius]);
    const angleDeg = between(0, 180);
    add('calcium', hu, WALL_HU, grain, half, angleDeg);
    structures.push({ kind: 'calcium', centreMm: grain, radiiMm: half, angleDeg, size: hu });
  });
  return {
    slice: {
      painted: [
        {
          name: 'body',
          hu: TISSUE_HU,
          centreMm: [0, 0],
          radiiMm: [58, 58],
          angleDeg: 0,
        },
        { name: 'lung', hu: LUNG_HU, ...LUNG },
      ],
      insets,
    },
    structures,
    lumenHu,
  };
}

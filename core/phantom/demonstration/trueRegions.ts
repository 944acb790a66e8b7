import type { Vec3 } from '../../geometry/index.js';
import type { Ellipse, Role } from '../../region/index.js';
import { calcifiedPlaque, coronaryCentreMm, softPlaqueMm } from './coronary.js';
import { HU } from './tissue.js';

/** A region that lies wholly in one tissue of the scene, with that tissue's HU. */
export interface TrueRegion {
  readonly id: string;
  readonly role: Role;
  readonly label: string;
  readonly shape: Ellipse;
  readonly trueHu: number;
}

/** Height of the regions in the heart and the stent. */
export const REGIONS_Z_MM = 10;

/** Regions that are ready to be measured, at the heights of slices; some lie outside a demonstration of few slices. */
export function trueRegions(): readonly TrueRegion[] {
  const z = REGIONS_Z_MM;
  const [stentX, stentY] = coronaryCentreMm(z);
  const turn = (-38 * Math.PI) / 180;
  const along: Vec3 = [Math.cos(turn), Math.sin(turn), 0];
  const across: Vec3 = [-Math.sin(turn), Math.cos(turn), 0];
  return [
    region('R1', 'reference', 'ascending aorta', [-1, -12, z], [10, 10], HU.aorta),
    region('R2', 'reference', 'left chamber', [52, -10, z], [13, 13], HU.leftChamber),
    region('R3', 'reference', 'right chamber', [9, -48.5, z], [12, 12], HU.rightChamber),
    {
      id: 'R4',
      role: 'reference',
      label: 'muscle of the left chamber',
      shape: {
        kind: 'ellipse',
        centreMm: [66.7, 8.8, z],
        u: along,
        v: across,
        radiiMm: [9, 3],
      },
      trueHu: HU.muscle,
    },
    region('F1', 'fat', 'fat before the heart', [2, -74, z], [7, 3.5], HU.fat),
    region('L1', 'lumen', 'lumen in the stent', [stentX, stentY, z], [1, 1], HU.stentLumen),
    region(
      'L2',
      'lumen',
      'lumen above the plaques',
      [...coronaryCentreMm(21), 21],
      [1, 1],
      HU.coronary,
    ),
    region(
      'L3',
      'lumen',
      'lumen below the stent',
      [...coronaryCentreMm(3), 3],
      [0.8, 0.8],
      HU.coronary,
    ),
    ...softPlaqueRegions(),
    ...calcifiedRegions(),
  ];
}

function region(
  id: string,
  role: Role,
  label: string,
  centreMm: Vec3,
  radiiMm: readonly [number, number],
  trueHu: number,
): TrueRegion {
  return { id, role, label, shape: { kind: 'ellipse', centreMm, radiiMm }, trueHu };
}

/** The wall where the plaque begins, and the middle of the plaque. */
function softPlaqueRegions(): readonly TrueRegion[] {
  const places = [
    { id: 'W1', role: 'wall', label: 'thickened wall', z: 14.5 },
    { id: 'P1', role: 'plaque', label: 'soft plaque', z: 15 },
  ] as const;
  return places.flatMap(({ id, role, label, z }) => {
    const plaque = softPlaqueMm(z);
    if (plaque === undefined) return [];
    const radius = plaque.halfMm * 0.6;
    return region(id, role, label, [...plaque.centreMm, z], [radius, radius], HU.softPlaque);
  });
}

function calcifiedRegions(): readonly TrueRegion[] {
  const z = 18.5;
  const grain = calcifiedPlaque(z);
  if (grain === undefined) return [];
  const [a, b] = grain.radiiMm;
  return [
    region(
      'P2',
      'plaque',
      'calcified plaque',
      [...grain.centreMm, z],
      [a * 0.8, b * 0.8],
      grain.hu,
    ),
  ];
}

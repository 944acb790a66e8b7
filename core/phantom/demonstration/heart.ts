import type { PhantomEllipse } from '../ellipse.js';
import type { Inset, SceneObject } from '../scene.js';
import { HU } from './tissue.js';

/** Height at which the chambers have the size that is written here. */
const MIDDLE_MM = 12;

/** A chamber or great vessel: blood inside an even wall. */
interface Chamber {
  readonly name: string;
  readonly blood: PhantomEllipse;
  readonly bloodHu: number;
  readonly wallMm: number;
  readonly wallHu: number;
  /** Part by which the blood's half axes grow per mm towards the head. */
  readonly growthPerMm: number;
}

const CHAMBERS: readonly Chamber[] = [
  {
    name: 'left atrium',
    blood: { centreMm: [8, 20], radiiMm: [29, 12], angleDeg: 6 },
    bloodHu: HU.leftChamber,
    wallMm: 2,
    wallHu: HU.muscle,
    growthPerMm: 0.006,
  },
  {
    name: 'right atrium',
    blood: { centreMm: [-37, -11], radiiMm: [16, 24], angleDeg: 14 },
    bloodHu: HU.rightChamber,
    wallMm: 2,
    wallHu: HU.muscle,
    growthPerMm: -0.004,
  },
  {
    name: 'right chamber',
    blood: { centreMm: [9, -48.5], radiiMm: [34, 16.5], angleDeg: -14 },
    bloodHu: HU.rightChamber,
    wallMm: 3.5,
    wallHu: HU.muscle,
    growthPerMm: -0.003,
  },
  {
    name: 'left chamber',
    blood: { centreMm: [52, -10], radiiMm: [29, 18], angleDeg: -38 },
    bloodHu: HU.leftChamber,
    wallMm: 11,
    wallHu: HU.muscle,
    growthPerMm: -0.006,
  },
  {
    name: 'ascending aorta',
    blood: { centreMm: [-1, -12], radiiMm: [15, 14.5], angleDeg: 0 },
    bloodHu: HU.aorta,
    wallMm: 1.6,
    wallHu: HU.vesselWall,
    growthPerMm: 0.002,
  },
];

/** The blood of a chamber at a height. */
function bloodAt({ blood, growthPerMm }: Chamber, zMm: number): PhantomEllipse {
  const factor = 1 + growthPerMm * (zMm - MIDDLE_MM);
  return { ...blood, radiiMm: [blood.radiiMm[0] * factor, blood.radiiMm[1] * factor] };
}

/** The walls of chambers and great vessels, in the order of painting. */
export function heartWalls(zMm: number): readonly SceneObject[] {
  return [
    ...CHAMBERS.map((chamber) => {
      const { radiiMm, ...blood } = bloodAt(chamber, zMm);
      const [a, b] = radiiMm;
      return {
        name: `wall of the ${chamber.name}`,
        hu: chamber.wallHu,
        ...blood,
        // The outside changes half as much as the blood: muscle thickens where the chamber is narrow.
        radiiMm: [
          chamber.blood.radiiMm[0] + chamber.wallMm + (a - chamber.blood.radiiMm[0]) / 2,
          chamber.blood.radiiMm[1] + chamber.wallMm + (b - chamber.blood.radiiMm[1]) / 2,
        ] as const,
      };
    }),
  ];
}

/** The blood in them. */
export function heartBlood(zMm: number): readonly Inset[] {
  return CHAMBERS.map((chamber) => ({
    name: chamber.name,
    hu: chamber.bloodHu,
    aroundHu: chamber.wallHu,
    ...bloodAt(chamber, zMm),
  }));
}

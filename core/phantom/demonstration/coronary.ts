import type { PhantomEllipse } from '../ellipse.js';
import type { Inset, SceneObject } from '../scene.js';
import { HU } from './tissue.js';

/** The stent of the scene, along z. Diameters are of the metal ring. */
export const STENT = {
  fromMm: 5,
  toMm: 13,
  innerDiameterMm: 3.0,
  strutMm: 0.1,
  strutHu: HU.strut,
  lumenHu: HU.stentLumen,
  /** Tissue between ring and fat. */
  wallMm: 0.4,
} as const;

/** Stretches of plaque: length along z, and the height of its middle. */
export const SOFT_PLAQUE = { fromMm: 13.3, toMm: 16.9 } as const;
export const CALCIFIED_PLAQUE = { fromMm: 17, toMm: 20 } as const;

const WALL_MM = 0.5;

/** Centre of the vessel at a height: it runs along z and drifts a little, downwards to the left and forwards. */
export function coronaryCentreMm(zMm: number): readonly [number, number] {
  const along = zMm - 10;
  return [56 - 0.1 * along, -50 + 0.06 * along + 0.004 * along * along];
}

/** Half width of the free lumen: it tapers downwards. */
export function coronaryRadiusMm(zMm: number): number {
  return 1.3 + 0.018 * zMm;
}

/** How far a height lies inside a stretch: 0 at its ends and beyond, 1 in its middle, without corners. */
function swell(
  zMm: number,
  { fromMm, toMm }: { readonly fromMm: number; readonly toMm: number },
): number {
  const part = (zMm - fromMm) / (toMm - fromMm);
  return part > 0 && part < 1 ? Math.sin(Math.PI * part) ** 2 : 0;
}

export function inStent(zMm: number): boolean {
  return zMm >= STENT.fromMm && zMm <= STENT.toMm;
}

/** The fat that the vessel lies in, painted over the muscle. */
export function coronaryFat(zMm: number): SceneObject {
  const [x, y] = coronaryCentreMm(zMm);
  return {
    name: 'fat around the coronary',
    hu: HU.fat,
    centreMm: [x + 0.5, y - 0.5],
    radiiMm: [12, 9.5],
    angleDeg: -35,
  };
}

/** The vessel at a height, from the outside in. */
export function coronaryInsets(zMm: number): readonly Inset[] {
  return inStent(zMm) ? stented(zMm) : free(zMm);
}

function disc([x, y]: readonly [number, number], radiusMm: number): PhantomEllipse {
  return { centreMm: [x, y], radiiMm: [radiusMm, radiusMm], angleDeg: 0 };
}

function stented(zMm: number): readonly Inset[] {
  const centre = coronaryCentreMm(zMm);
  const inner = STENT.innerDiameterMm / 2;
  const outer = inner + STENT.strutMm;
  return [
    {
      name: 'wall around the stent',
      hu: HU.vesselWall,
      aroundHu: HU.fat,
      ...disc(centre, outer + STENT.wallMm),
    },
    { name: 'strut ring', hu: STENT.strutHu, aroundHu: HU.vesselWall, ...disc(centre, outer) },
    {
      name: 'lumen in the stent',
      hu: STENT.lumenHu,
      aroundHu: STENT.strutHu,
      ...disc(centre, inner),
    },
  ];
}

function free(zMm: number): readonly Inset[] {
  const [x, y] = coronaryCentreMm(zMm);
  const radius = coronaryRadiusMm(zMm);
  const narrowing = swell(zMm, SOFT_PLAQUE);
  const lumenRadius = radius * (1 - 0.42 * narrowing);
  // The plaque sits on the left wall: the lumen is pushed to the right, the outer wall bulges to the left.
  const pushed = x - (radius - lumenRadius);
  const bulge = 0.7 * narrowing;
  const front = 0.6 * Math.sqrt(swell(zMm, CALCIFIED_PLAQUE));
  const vessel: readonly Inset[] = [
    {
      name: narrowing > 0 ? 'wall with soft plaque' : 'wall of the coronary',
      hu: HU.softPlaque,
      aroundHu: HU.fat,
      centreMm: [x + bulge, y - front],
      radiiMm: [radius + WALL_MM + bulge, radius + WALL_MM + 0.3 * narrowing + front],
      angleDeg: 0,
    },
    {
      name: 'lumen of the coronary',
      hu: HU.coronary,
      aroundHu: HU.softPlaque,
      ...disc([pushed, y], lumenRadius),
    },
  ];
  const calcified = calcifiedPlaque(zMm);
  return calcified === undefined ? vessel : [...vessel, calcified];
}

/** A dense grain in the thickened front wall, close to the lumen; undefined where there is none. */
export function calcifiedPlaque(zMm: number): Inset | undefined {
  const size = swell(zMm, CALCIFIED_PLAQUE);
  if (size < 0.15) return undefined;
  const [x, y] = coronaryCentreMm(zMm);
  const half = 0.6 * Math.sqrt(size);
  return {
    name: 'calcified plaque',
    hu: HU.calcifiedPlaque,
    aroundHu: HU.softPlaque,
    centreMm: [x, y - coronaryRadiusMm(zMm) - 0.1 - half],
    radiiMm: [1.35 * half, half],
    angleDeg: 0,
  };
}

/** The eccentric plaque's thickest place on the left wall: centre and half width of what lies between lumen and fat. */
export function softPlaqueMm(
  zMm: number,
): { readonly centreMm: readonly [number, number]; readonly halfMm: number } | undefined {
  const narrowing = swell(zMm, SOFT_PLAQUE);
  if (narrowing === 0) return undefined;
  const [x, y] = coronaryCentreMm(zMm);
  const radius = coronaryRadiusMm(zMm);
  const lumenRadius = radius * (1 - 0.42 * narrowing);
  const inner = x - (radius - lumenRadius) + lumenRadius;
  const outer = x + 1.4 * narrowing + radius + WALL_MM;
  return { centreMm: [(inner + outer) / 2, y], halfMm: (outer - inner) / 2 };
}

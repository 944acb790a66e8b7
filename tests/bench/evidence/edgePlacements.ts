import type { Kernel as Side } from '../../../core/note/index.js';
import { measureSharpness } from '../../../core/pairing/sharpness.js';
import {
  addQuantumNoise,
  type Kernel,
  projectSlice,
  reconstructPairHu,
  seededUniform,
  type UniformSource,
} from '../../../core/phantom/index.js';
import type { KernelTexture } from '../../../core/quality/index.js';
import type { Ellipse } from '../../../core/region/index.js';
import {
  EDGE_GRID,
  EDGE_SCAN,
  type EdgeScene,
  edgeScene,
  type TrueStructure,
} from './edgeScene.js';
import { type ImageStack, imageStack, readFrom } from './imageStack.js';

/** A phantom with strong edges, as the program sees it. */
export interface EdgeRecipe {
  readonly seed: number;
  readonly photonsPerRay: number;
  readonly kernels: Readonly<Record<Side, Kernel>>;
  /** Rings of struts have this to 800 HU·mm. */
  readonly leastStrutHuMm: number;
}

/** Both reconstructions of a noisy scene, with their measured textures. */
export interface EdgePhantom {
  readonly scene: EdgeScene;
  readonly stacks: Readonly<Record<Side, ImageStack>>;
  readonly textures: Readonly<Record<Side, KernelTexture>>;
}

/** A region at a known distance from the nearest strut or calcium. */
export interface Placement {
  readonly shape: Ellipse;
  readonly distanceMm: number;
  readonly kind: TrueStructure['kind'];
}

/** Five slices of one scene with noise of their own: the textures are measured on all, regions lie on the middle one. */
export async function edgePhantom(recipe: EdgeRecipe): Promise<EdgePhantom> {
  const { seed, kernels, photonsPerRay, leastStrutHuMm } = recipe;
  const scene = edgeScene(seededUniform(seed, 1), leastStrutHuMm);
  const clean = projectSlice(scene.slice, EDGE_SCAN);
  const slices = Array.from({ length: 5 }, (_, index) => {
    const noisy = addQuantumNoise(clean, photonsPerRay, seededUniform(seed, 2, index));
    const pair = [kernels.soft, kernels.sharp] as const;
    const [soft, sharp] = reconstructPairHu(noisy, EDGE_SCAN, pair, EDGE_GRID);
    return { zMm: index * 0.6, soft, sharp };
  });
  const stack = (side: Side): ImageStack =>
    imageStack(
      side,
      EDGE_GRID,
      slices.map((slice) => ({ zMm: slice.zMm, hu: slice[side] })),
    );
  const [soft, sharp] = [stack('soft'), stack('sharp')];
  const { textures, text } = await measureSharpness(soft.stack, sharp.stack, readFrom(soft, sharp));
  if (textures === undefined) throw new RangeError(`nothing measured: ${text}`);
  return {
    scene,
    stacks: { soft, sharp },
    textures: { soft: textures.first, sharp: textures.second },
  };
}

/** Height of the slice that regions are placed on. */
export const PLACED_MM = 1.2;

/**
 * An ellipse of 0.5 to 2.5 mm half axes, somewhere within 6 mm of a strut or calcium of the scene, whose border lies
 * `least` to `most` mm from the nearest of all of them (0 where it crosses one), and 6 mm from any air.
 */
export function placeBeside(
  { structures }: EdgeScene,
  uniform: UniformSource,
  least: number,
  most: number,
): Placement {
  const dense = structures.filter(({ kind }) => kind !== 'air');
  const air = structures.filter(({ kind }) => kind === 'air');
  for (let attempt = 0; attempt < 5000; attempt += 1) {
    const beside = dense[Math.floor(uniform() * dense.length)] as TrueStructure;
    const away = (): number => 9 * (2 * uniform() - 1);
    const [x, y] = [beside.centreMm[0] + away(), beside.centreMm[1] + away()];
    const shape = ellipseAt(uniform, x, y);
    if (!couldBeWithin(shape, beside, most)) continue;
    const distanceMm = trueDistanceMm(shape, beside);
    if (distanceMm < least || distanceMm > most) continue;
    const others = dense.filter((one) => one !== beside && couldBeWithin(shape, one, distanceMm));
    if (others.some((one) => trueDistanceMm(shape, one) < distanceMm)) continue;
    if (air.some((one) => couldBeWithin(shape, one, 6) && trueDistanceMm(shape, one) < 6)) continue;
    return { shape, distanceMm, kind: beside.kind };
  }
  throw new RangeError(`no place ${least} to ${most} mm from a structure`);
}

/** Such an ellipse anywhere, farther than `least` mm from each strut, calcium and air. */
export function placeAway(
  { structures }: EdgeScene,
  uniform: UniformSource,
  least: number,
): Placement {
  for (let attempt = 0; attempt < 5000; attempt += 1) {
    const away = (): number => 42 * (2 * uniform() - 1);
    const shape = ellipseAt(uniform, away(), away());
    const [x, y] = shape.centreMm;
    if (Math.hypot(x, y) > 48) continue;
    const near = structures.filter((one) => couldBeWithin(shape, one, least));
    if (near.some((one) => trueDistanceMm(shape, one) < least)) continue;
    return { shape, distanceMm: least, kind: 'air' };
  }
  throw new RangeError(`no place ${least} mm from all structures`);
}

function ellipseAt(uniform: UniformSource, x: number, y: number): Ellipse {
  const angle = Math.PI * uniform();
  const a = 0.5 + 2 * uniform() ** 2;
  return {
    kind: 'ellipse',
    centreMm: [x, y, PLACED_MM],
    u: [Math.cos(angle), Math.sin(angle), 0],
    v: [-Math.sin(angle), Math.cos(angle), 0],
    radiiMm: [a, a * (0.6 + 0.4 * uniform())],
  };
}

/** False when the circles around both are farther apart than that. */
function couldBeWithin(shape: Ellipse, structure: TrueStructure, withinMm: number): boolean {
  const [x, y] = structure.centreMm;
  const apart = Math.hypot(shape.centreMm[0] - x, shape.centreMm[1] - y);
  return apart - Math.max(...shape.radiiMm) - Math.max(...structure.radiiMm) < withinMm;
}

/**
 * Distance of a region's border from the nearest place of a structure, mm, 0 where they meet: by 120 points on either
 * border, good to 0.01 mm.
 */
export function trueDistanceMm(shape: Ellipse, structure: TrueStructure): number {
  const turn = (structure.angleDeg * Math.PI) / 180;
  const axes = [
    [Math.cos(turn), Math.sin(turn)],
    [-Math.sin(turn), Math.cos(turn)],
  ] as const;
  const own = pointsOf(
    [shape.centreMm[0], shape.centreMm[1]],
    [shape.u ?? [1, 0], shape.v ?? [0, 1]],
    shape.radiiMm,
  );
  const outer = pointsOf(structure.centreMm, axes, structure.radiiMm);
  const holds = ([x, y]: Point, radii: readonly [number, number]): boolean => {
    const [dx, dy] = [x - structure.centreMm[0], y - structure.centreMm[1]];
    const along = (dx * axes[0][0] + dy * axes[0][1]) / radii[0];
    const across = (dx * axes[1][0] + dy * axes[1][1]) / radii[1];
    return along * along + across * across <= 1;
  };
  const { hollowMm } = structure;
  const isInRing = (point: Point): boolean =>
    holds(point, structure.radiiMm) &&
    !(hollowMm !== undefined && holds(point, [hollowMm, hollowMm]));
  if (own.some(isInRing) || outer.some((point) => isInShape(shape, point))) return 0;
  const borders =
    hollowMm === undefined
      ? outer
      : [...outer, ...pointsOf(structure.centreMm, axes, [hollowMm, hollowMm])];
  let nearest = Infinity;
  for (const [x, y] of own)
    for (const [u, v] of borders) nearest = Math.min(nearest, (x - u) ** 2 + (y - v) ** 2);
  return Math.sqrt(nearest);
}

type Point = readonly [number, number];

function isInShape({ centreMm, u = [1, 0, 0], v = [0, 1, 0], radiiMm }: Ellipse, [x, y]: Point) {
  const [dx, dy] = [x - centreMm[0], y - centreMm[1]];
  const along = (dx * u[0] + dy * u[1]) / radiiMm[0];
  const across = (dx * v[0] + dy * v[1]) / radiiMm[1];
  return along * along + across * across <= 1;
}

function pointsOf(
  [x, y]: Point,
  [u, v]: readonly [readonly number[], readonly number[]],
  [a, b]: readonly [number, number],
): readonly Point[] {
  return Array.from({ length: 120 }, (_, index): Point => {
    const angle = (2 * Math.PI * index) / 120;
    const [alongU, alongV] = [a * Math.cos(angle), b * Math.sin(angle)];
    return [
      x + alongU * (u[0] ?? 0) + alongV * (v[0] ?? 0),
      y + alongU * (u[1] ?? 0) + alongV * (v[1] ?? 0),
    ];
  });
}

import type { Inset, SceneSlice, UniformSource } from '../../../core/phantom/index.js';

/** A place of a scene without any stent, and what lies there. */
export interface BarePlace {
  readonly kind: string;
  readonly atMm: readonly [number, number];
}

export interface NoStentScene {
  readonly slice: SceneSlice;
  readonly places: readonly BarePlace[];
}

const TISSUE_HU = 60;
const WALL_HU = 60;
const FAT_HU = -90;

const CHAMBERS = [
  [-24, -24, 13],
  [25, -22, 12],
  [-2, 29, 13],
] as const;

const VESSELS = [
  [0, -5],
  [0, -40],
  [-38, 2],
  [16, 8],
  [-18, 6],
  [26, 27],
  [-29, 30],
] as const;

/** Twenty places of a body with vessels: plain lumens, lumens with calcium beside or around, grains of calcium, edges. */
export function noStentScene(uniform: UniformSource): NoStentScene {
  const between = (low: number, high: number): number => low + (high - low) * uniform();
  const insets: Inset[] = [];
  const places: BarePlace[] = [];
  const disc = (
    name: string,
    hu: number,
    aroundHu: number,
    [x, y]: readonly [number, number],
    [a, b]: readonly [number, number],
    angleDeg = 0,
  ): void => {
    insets.push({ name, hu, aroundHu, centreMm: [x, y], radiiMm: [a, b], angleDeg });
  };
  const blood = between(300, 450);
  for (const [x, y, radius] of CHAMBERS)
    disc('chamber', blood, TISSUE_HU, [x, y], [radius, radius]);
  VESSELS.forEach(([x0, y0], index) => {
    const centre = [x0 + between(-0.5, 0.5), y0 + between(-0.5, 0.5)] as const;
    const lumenHu = blood * between(0.8, 1.05);
    const radius = between(1.1, 2.2);
    disc('fat', FAT_HU, TISSUE_HU, [x0, y0], [6, 6]);
    if (index < 3) {
      const outer = radius + between(0.3, 0.8);
      disc('wall', WALL_HU, FAT_HU, centre, [outer, outer]);
      disc('lumen', lumenHu, WALL_HU, centre, [radius, radius * between(0.8, 1)], between(0, 180));
      places.push({ kind: 'plain lumen', atMm: centre });
      return;
    }
    if (index === 6) {
      const half = [between(0.6, 1.6), between(0.5, 1.2)] as const;
      disc('wall', WALL_HU, FAT_HU, centre, [2.6, 2.6]);
      disc('calcium', between(700, 1500), WALL_HU, centre, half, between(0, 180));
      places.push({ kind: 'grain of calcium', atMm: centre });
      return;
    }
    const half = [between(0.5, 1.4), between(0.4, 1)] as const;
    const angle = between(0, 2 * Math.PI);
    const away = radius + 0.1 + Math.max(...half);
    const grain = [centre[0] + away * Math.cos(angle), centre[1] + away * Math.sin(angle)] as const;
    const outer = Math.min(5.9, Math.max(away + Math.max(...half) + 0.2, radius + 0.5));
    disc('wall', WALL_HU, FAT_HU, [x0, y0], [outer, outer]);
    disc('lumen', lumenHu, WALL_HU, centre, [radius, radius]);
    disc('calcium', between(700, 1500), WALL_HU, grain, half, between(0, 180));
    places.push({ kind: 'lumen beside calcium', atMm: centre }, { kind: 'calcium', atMm: grain });
  });
  for (const [x, y, radius] of CHAMBERS) {
    const angle = between(0, 2 * Math.PI);
    places.push({
      kind: 'edge of a chamber',
      atMm: [x + radius * Math.cos(angle), y + radius * Math.sin(angle)],
    });
  }
  places.push({ kind: 'chamber', atMm: [CHAMBERS[0][0] + 2, CHAMBERS[0][1] + 1] });
  while (places.length < 20)
    places.push({ kind: 'anywhere', atMm: [between(-38, 38), between(-38, 38)] });
  return {
    slice: {
      painted: [{ name: 'body', hu: TISSUE_HU, centreMm: [0, 0], radiiMm: [58, 58], angleDeg: 0 }],
      insets,
    },
    places,
  };
}

import { demonstrationScene, type Inset, type SceneSlice } from '../../../core/phantom/index.js';
import { seededUniform } from '../../../core/phantom/uniformSource.js';

/** Places of chambers inside the heart of a random scene: centre and the largest half width that leaves walls. */
const CHAMBERS = [
  [-30, -12, 18],
  [12, -42, 17],
  [44, -14, 19],
  [6, 8, 17],
] as const;

/**
 * Scene 0 is the demonstration's. The others are chests of their own: another size, another contrast, chambers that
 * lie and lean elsewhere, small dense grains near them.
 */
export function evidenceScene(scene: number, zMm: number): SceneSlice {
  if (scene === 0) return demonstrationScene(zMm);
  const uniform = seededUniform(scene, 77);
  const between = (low: number, high: number): number => low + (high - low) * uniform();
  const size = between(0.9, 1.02);
  const muscle = between(50, 110);
  const blood = between(180, 520);
  const oval = (x: number, y: number, a: number, b: number, angleDeg: number) => ({
    centreMm: [x * size, y * size] as const,
    radiiMm: [a * size, b * size] as const,
    angleDeg,
  });
  const chambers = CHAMBERS.flatMap(([x, y, most], index): readonly Inset[] => {
    const slope = between(-0.08, 0.08);
    const [a, b] = [between(0.75, 1) * most, between(0.6, 1) * most];
    const hu = index % 2 === 0 ? blood : blood * between(0.5, 1);
    const centre = [x + between(-2, 2) + slope * (zMm - 12), y + between(-2, 2)] as const;
    const chamber = {
      name: `chamber ${index}`,
      hu,
      aroundHu: muscle,
      ...oval(centre[0], centre[1], a, b, between(0, 180)),
    };
    const grain = {
      name: `grain ${index}`,
      hu: between(700, 1400),
      aroundHu: hu,
      ...oval(centre[0] + a / 3, centre[1], between(0.6, 1.6), between(0.6, 1.6), 0),
    };
    return index < 2 ? [chamber, grain] : [chamber];
  });
  return {
    painted: [
      { name: 'skin', hu: between(-115, -90), ...oval(0, 0, 160, 112, 0) },
      { name: 'chest wall', hu: between(40, 70), ...oval(0, 0, 147, 98, 0) },
      { name: 'right lung', hu: between(-880, -780), ...oval(-74, 1, 53, 71, 6) },
      { name: 'left lung', hu: between(-880, -780), ...oval(76, 2, 52, 72, -6) },
      { name: 'mediastinum', hu: between(-105, -80), ...oval(0, -6, 33, 79, 0) },
      { name: 'heart', hu: muscle, ...oval(10, -18, 66, 48, -12) },
      { name: 'vertebra', hu: between(250, 700), ...oval(0, 62, 17, 14, 0) },
    ],
    insets: chambers,
  };
}

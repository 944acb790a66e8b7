import type { PhantomEllipse } from '../ellipse.js';
import type { Inset, SceneObject } from '../scene.js';
import { HU } from './tissue.js';

const oval = (x: number, y: number, a: number, b: number, angleDeg = 0): PhantomEllipse => ({
  centreMm: [x, y],
  radiiMm: [a, b],
  angleDeg,
});

/** What lies behind and beside the heart, from the outside in; the heart is painted on it. */
export const THORAX: readonly SceneObject[] = [
  { name: 'skin and fat', hu: HU.skinFat, ...oval(0, 0, 166, 116) },
  { name: 'chest wall', hu: HU.chestWall, ...oval(0, 0, 153, 102) },
  { name: 'right lung', hu: HU.lung, ...oval(-76, 1, 55, 73, 6) },
  { name: 'left lung', hu: HU.lung, ...oval(78, 2, 54, 74, -6) },
  { name: 'mediastinal fat', hu: HU.fat, ...oval(0, -6, 33, 81) },
  { name: 'fat around the heart', hu: HU.fat, ...oval(16, -20, 75, 55, -16) },
  { name: 'muscle of the back', hu: HU.chestWall, ...oval(0, 78, 46, 21) },
  { name: 'spinal arch', hu: HU.corticalBone, ...oval(0, 82, 13, 10.5) },
  { name: 'vertebra', hu: HU.corticalBone, ...oval(0, 61, 18.5, 15) },
  { name: 'oesophagus', hu: 45, ...oval(4, 41, 6, 3.8, 10) },
  { name: 'wall of the descending aorta', hu: HU.vesselWall, ...oval(26, 46, 13.4, 13) },
];

/** Even parts inside the tissues of {@link THORAX}. */
export const THORAX_INSETS: readonly Inset[] = [
  { name: 'spongy bone', hu: HU.spongyBone, aroundHu: HU.corticalBone, ...oval(0, 61, 17, 13.5) },
  { name: 'spinal canal', hu: HU.canal, aroundHu: HU.corticalBone, ...oval(0, 83, 9.5, 6.5) },
  { name: 'sternum', hu: HU.corticalBone, aroundHu: HU.chestWall, ...oval(0, -94, 19, 5.6) },
  { name: 'marrow of the sternum', hu: 110, aroundHu: HU.corticalBone, ...oval(0, -94, 17.4, 4.2) },
  { name: 'descending aorta', hu: HU.aorta, aroundHu: HU.vesselWall, ...oval(26, 46, 12, 11.6) },
  ...[
    oval(44, -90, 11, 3.6, 8),
    oval(-44, -90, 11, 3.6, -8),
    oval(101, -72.5, 9, 2.2, 32),
    oval(-101, -72.5, 9, 2.2, -32),
    oval(140, -24, 3.5, 11, -7),
    oval(-140, -18, 3.5, 11, 6),
    oval(140, 22, 3.5, 10, 7),
    oval(-140, 24, 3.5, 10, -7),
    oval(84, 80.5, 10, 2.2, -24),
    oval(-84, 80.5, 10, 2.2, 24),
  ].map((rib) => ({ name: 'rib', hu: HU.rib, aroundHu: HU.chestWall, ...rib })),
  ...[
    oval(108, 20, 2.2, 1.6, 30),
    oval(98, 42, 1.5, 1.5),
    oval(112, -8, 1.2, 2.4, 10),
    oval(84, 58, 2.6, 1.4, 50),
    oval(102, 5, 1, 1),
    oval(104, -34, 1.4, 1.2),
    oval(-80, -20, 2.2, 1.4, 20),
    oval(-92, 14, 1.6, 2.6, 0),
    oval(-72, 40, 2.4, 1.8, -30),
    oval(-70, -44, 1.5, 1.3),
    oval(-74, 22, 1.2, 1.1),
  ].map((vessel) => ({
    name: 'vessel of the lung',
    hu: HU.lungVessel,
    aroundHu: HU.lung,
    ...vessel,
  })),
];

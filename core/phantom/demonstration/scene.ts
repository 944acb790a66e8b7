import type { SceneSlice } from '../scene.js';
import { coronaryFat, coronaryInsets } from './coronary.js';
import { heartBlood, heartWalls } from './heart.js';
import { THORAX, THORAX_INSETS } from './thorax.js';

/**
 * One slice of the demonstration: an invented chest in diastole with contrast in the left heart, and a coronary
 * along z with a stent, an eccentric soft plaque and a calcified one. Schematic; no patient stands behind it.
 */
export function demonstrationScene(zMm: number): SceneSlice {
  return {
    painted: [...THORAX, ...heartWalls(zMm), coronaryFat(zMm)],
    insets: [...THORAX_INSETS, ...heartBlood(zMm), ...coronaryInsets(zMm)],
  };
}

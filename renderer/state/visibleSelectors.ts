import {
  choiceOf,
  contrastHu,
  type Kernel,
  type NoteContrast,
  type NoteRegion,
  type RoseCriterion,
  type VisibilityChoice,
} from '../../core/note/index.js';
import type { PairTexture } from '../../core/quality/index.js';
import { shapeArea } from '../../core/region/index.js';
import type { AppState } from './appState.js';
import { selectedRegion } from './regionSelectors.js';

/** Rose's classic value. */
export const USUAL_CRITERION: RoseCriterion = 5;

type Read = Pick<AppState, 'assessment' | 'note' | 'selected'>;

/** Noise and blur of both kernels: as the note keeps them, or as measured with the pair; undefined until then. */
export function pairTexture({ assessment, note }: Read): PairTexture | undefined {
  const kept = note?.pair.texture;
  if (kept !== undefined && (kept.soft !== null || kept.sharp !== null)) return kept;
  // A verified note stays as it is, whatever is measured later.
  if (assessment.kind !== 'done') return undefined;
  const { textures, softKey, sharpKey } = assessment.measured;
  return { soft: textures[softKey] ?? null, sharp: textures[sharpKey] ?? null };
}

/** What is asked about visibility: the reader's choice, or k alone and the contrast nearest at hand. */
export interface AskedVisibility {
  readonly k: RoseCriterion;
  readonly contrast: VisibilityChoice['contrast'] | undefined;
}

/** The choice that the note keeps; without one, k = 5 at the contrast of the selected region, or the first of the note. */
export function askedVisibility({ note, selected }: Read): AskedVisibility {
  const chosen = note?.visibility ? choiceOf(note.visibility) : undefined;
  if (chosen !== undefined) return chosen;
  const first = note?.contrasts[0];
  const nearest = note?.contrasts.find((one) => isOf(one, selected)) ?? first;
  return {
    k: USUAL_CRITERION,
    contrast: nearest === undefined ? undefined : { id: nearest.id },
  };
}

/** A region's place in the plot: the diameter of a disc of its area, and its contrast as one kernel shows it. */
export interface OwnPoint {
  readonly kernel: Kernel;
  readonly diameterMm: number;
  readonly contrastHu: number;
}

/** The region whose place is shown, and where it lies on each kernel. */
export interface OwnPlace {
  readonly label: string;
  readonly points: readonly OwnPoint[];
}

/**
 * Where the selected region lies: |lumen − wall| of the contrast that it belongs to, against the diameter of a disc of
 * its area. Without a selected one, that of the lumen of the contrast asked about. Undefined where there is neither.
 */
export function ownPlace(state: Read): OwnPlace | undefined {
  const { note } = state;
  if (note === undefined) return undefined;
  const { contrast: asked } = askedVisibility(state);
  const region = selectedRegion(state);
  const ofRegion = note.contrasts.find((one) => isOf(one, region?.id));
  const ofChoice =
    asked !== undefined && 'id' in asked
      ? note.contrasts.find(({ id }) => id === asked.id)
      : undefined;
  const contrast = ofRegion ?? (region === undefined ? ofChoice : undefined);
  const placed: NoteRegion | undefined =
    ofRegion === undefined ? note.regions.find(({ id }) => id === contrast?.lumen) : region;
  if (contrast === undefined || placed === undefined) return undefined;
  const diameterMm = 2 * Math.sqrt(shapeArea(placed.shape) / Math.PI);
  const points = (['soft', 'sharp'] as const).flatMap((kernel): readonly OwnPoint[] => {
    const hu = contrastHu(note, contrast.id, kernel);
    return hu === undefined ? [] : [{ kernel, diameterMm, contrastHu: hu }];
  });
  return { label: placed.label, points };
}

function isOf({ lumen, wall }: NoteContrast, regionId: string | undefined): boolean {
  return regionId !== undefined && (lumen === regionId || wall === regionId);
}

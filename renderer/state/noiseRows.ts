import { alongNormal, distance, type Vec3 } from '../../core/geometry/index.js';
import type { Kernel } from '../../core/note/index.js';
import type { KernelTexture } from '../../core/quality/index.js';
import { sliceIndexAt } from '../link/slicePosition.js';
import type { AppState } from './appState.js';
import { scrollTo } from './changes/view.js';
import type { Change } from './store.js';

type Read = Pick<AppState, 'pair' | 'assessment' | 'note'>;

/** The noise and blur of both kernels as the plates have them: just measured, or kept in the note. */
export function texturesNow({ pair, assessment, note }: Read): {
  readonly [K in Kernel]: KernelTexture | undefined;
} {
  if (pair?.sharp === undefined) return { soft: undefined, sharp: undefined };
  if (assessment.kind === 'done') {
    const { textures } = assessment.measured;
    return { soft: textures[pair.soft.key], sharp: textures[pair.sharp.key] };
  }
  const kept = note?.pair;
  const isSame = kept?.soft.key === pair.soft.key && kept.sharp?.key === pair.sharp.key;
  return {
    soft: (isSame ? kept.texture.soft : null) ?? undefined,
    sharp: (isSame ? kept.texture.sharp : null) ?? undefined,
  };
}

/** The area that the reader chose in the list, while it is one of these. */
export function chosenArea(
  rows: readonly NoiseAreaRow[],
  { noiseArea }: Pick<AppState, 'noiseArea'>,
): NoiseAreaRow | undefined {
  return rows.find(({ centreMm }) => centreMm === noiseArea);
}

/** One uniform area, with its noise on both kernels. */
export interface NoiseAreaRow {
  /** From 1, in the order of measuring. */
  readonly number: number;
  readonly centreMm: Vec3;
  /** Slice of the soft stack, from 1; undefined where none lies there. */
  readonly slice: number | undefined;
  readonly softSdHu: number | undefined;
  readonly sharpSdHu: number | undefined;
}

const SAME_PLACE_MM = 1e-3;

/** The areas in which noise was measured, each with its SD on both kernels. */
export function noiseAreaRows(state: Read): readonly NoiseAreaRow[] {
  const { pair, assessment } = state;
  const { soft, sharp } = texturesNow(state);
  if (pair === undefined) return [];
  const centres =
    assessment.kind === 'done'
      ? assessment.measured.areas.map(({ centreMm }) => centreMm)
      : (soft?.places ?? []).map(({ centreMm }) => centreMm);
  const sdAt = (texture: KernelTexture | undefined, at: Vec3): number | undefined =>
    texture?.places?.find(({ centreMm }) => distance(centreMm, at) < SAME_PLACE_MM)?.sdHu;
  const { grid } = pair.soft.slices[0].image;
  return centres.map((centreMm, index) => {
    const slice = sliceIndexAt(pair.soft, alongNormal(grid, centreMm));
    return {
      number: index + 1,
      centreMm,
      slice: slice === undefined ? undefined : slice + 1,
      softSdHu: sdAt(soft, centreMm),
      sharpSdHu: sdAt(sharp, centreMm),
    };
  });
}

/** Shows an area: its slice on the plates, the outlines of the areas, and its own brighter. None, and none is chosen. */
export function goToArea(area: Pick<NoiseAreaRow, 'centreMm'> | undefined): Change {
  return (state) => {
    if (area === undefined) return { ...state, noiseArea: undefined };
    const { centreMm } = area;
    if (state.pair === undefined) return state;
    const { grid } = state.pair.soft.slices[0].image;
    const there = scrollTo('soft', alongNormal(grid, centreMm))(state);
    return { ...there, noiseAreas: true, noiseArea: centreMm };
  };
}

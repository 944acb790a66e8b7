import { useMemo } from 'preact/hooks';
import type { Kernel, NoteEdge } from '../../core/note/index.js';
import { isSealed } from '../../core/note/life/index.js';
import type { LineEdge } from '../../core/quality/index.js';
import { type BandLine, edgeProfile, findLineSlice } from '../../core/region/index.js';
import { useEngine } from '../engine.js';
import { EdgePlot } from '../plots/EdgePlot.js';
import { NoiseControls } from '../plots/NoiseControls.js';
import { NoisePlot } from '../plots/NoisePlot.js';
import { NoiseTable } from '../plots/NoiseTable.js';
import { edgeRows, textureRows } from '../plots/noiseTableRows.js';
import type { Bench } from '../services/bench.js';
import type { AppState } from '../state/appState.js';
import { goToRegion } from '../state/changes/goToRegion.js';
import { selectRegion } from '../state/changes/regions.js';
import { selectedEdge } from '../state/lineSelectors.js';
import { chosenArea, goToArea, noiseAreaRows, texturesNow } from '../state/noiseRows.js';
import { takesMarks } from '../state/regionSelectors.js';
import { stackOf } from '../state/selectors.js';
import { useSelected } from './useSelected.js';

/** Noise and sharpness of both kernels: spectra and numbers over all areas, one area, or one edge line. */
export function NoiseView() {
  const { store, bench, run, port } = useEngine();
  const pair = useSelected((state) => state.pair);
  const note = useSelected((state) => state.note);
  const assessment = useSelected((state) => state.assessment);
  const tool = useSelected((state) => state.tool);
  const edge = useSelected(selectedEdge);
  const noiseArea = useSelected((state) => state.noiseArea);
  if (pair === undefined || note === undefined)
    return (
      <div class="plot-area">
        <p class="empty">Open a study to see its noise and sharpness.</p>
      </div>
    );
  const read = { pair, note, assessment };
  const textures = texturesNow(read);
  const areas = noiseAreaRows(read);
  const area = edge === undefined ? chosenArea(areas, { noiseArea }) : undefined;
  const onShow = (shown: string): void => {
    const chosen = areas.find(({ number }) => shown === `area ${number}`);
    const edgeId = note.edges.find(({ id }) => id === shown)?.id;
    store.change('Show edge or areas', selectRegion(edgeId));
    if (edgeId !== undefined) store.change('Go to edge', goToRegion(bench.cuts));
    store.change('Go to area', goToArea(chosen));
  };
  const { soft, sharp } = textures;
  return (
    <div class="noise-panel">
      <NoiseControls
        areas={areas}
        edges={note.edges}
        shown={edge?.id ?? (area === undefined ? 'all' : `area ${area.number}`)}
        onShow={onShow}
        bandMm={edge?.bandMm}
        onBand={(bandMm) => {
          if (edge !== undefined)
            port.reshapeLine('edge', edge.id, { ...edge, bandMm }, `widen:${edge.id}:`);
        }}
        onDelete={() => run('region.delete')}
        isDrawing={tool === 'edge'}
        onDraw={() => run('tool.edge')}
        disabled={isSealed(note)}
      />
      {edge === undefined ? (
        <NoisePlot
          spectra={soft === undefined || sharp === undefined ? undefined : { soft, sharp }}
          about={aboutNoise(pair, assessment, areas.length, soft !== undefined)}
        />
      ) : (
        <EdgeView edge={edge} />
      )}
      <NoiseTable
        rows={edge === undefined ? textureRows(textures, area) : edgeRows(edge)}
        caption={edge === undefined ? 'Noise and sharpness of both kernels' : edge.label}
      />
    </div>
  );
}

/** What the spectra rest on, or why there are none. */
function aboutNoise(
  pair: NonNullable<AppState['pair']>,
  assessment: AppState['assessment'],
  areas: number,
  isMeasured: boolean,
): string {
  if (isMeasured) {
    const edges = assessment.kind === 'done' ? (assessment.measured.edges ?? 0) : 0;
    return edges > 0 ? `${areas} areas, ${edges} edges` : `${areas} areas`;
  }
  if (pair.sharp === undefined) return 'Choose a pair to compare the noise of its two kernels.';
  if (assessment.kind === 'failed') return assessment.text;
  if (assessment.kind !== 'done') return 'The noise of both kernels is being measured…';
  return 'Too few uniform areas were found in both stacks to measure their noise.';
}

/** The profile across an edge line, measured from the pixels that are there now. */
function EdgeView({ edge }: { readonly edge: NoteEdge }) {
  const { store, bench } = useEngine();
  const loading = useSelected((state) => state.loading);
  const { fromMm, toMm, bandMm } = edge;
  const profiles = useMemo(
    () => ({
      soft: profileOn(store.now(), bench, 'soft', { fromMm, toMm, bandMm }),
      sharp: profileOn(store.now(), bench, 'sharp', { fromMm, toMm, bandMm }),
    }),
    [fromMm, toMm, bandMm, loading],
  );
  const flags = [...(edge.soft?.flags ?? []), ...(edge.sharp?.flags ?? [])];
  return (
    <EdgePlot
      label={edge.label}
      soft={profiles.soft}
      sharp={profiles.sharp}
      reason={flags[0]?.text ?? 'The images of this slice are still to come.'}
    />
  );
}

function profileOn(
  state: AppState,
  bench: Pick<Bench, 'shown'>,
  kernel: Kernel,
  line: BandLine,
): LineEdge | undefined {
  const stack = stackOf(state, kernel);
  if (stack === undefined || stack.unit !== 'HU' || !takesMarks(state, kernel)) return undefined;
  const found = findLineSlice(line, stack);
  if (!found.ok) return undefined;
  const slice = stack.slices[found.value.sliceIndex];
  const stored = bench.shown(kernel, found.value.sliceIndex);
  if (slice === undefined || stored === undefined) return undefined;
  const profile = edgeProfile(line, slice, stored);
  return profile.ok ? profile.value : undefined;
}

import { useMemo } from 'preact/hooks';
import type { Kernel } from '../../core/note/index.js';
import { regionValues, type Shape } from '../../core/region/index.js';
import { useEngine } from '../engine.js';
import { Histogram } from '../plots/Histogram.js';
import { PlotFrame } from '../plots/PlotFrame.js';
import type { Bench } from '../services/bench.js';
import type { AppState } from '../state/appState.js';
import { selectedProfile } from '../state/lineSelectors.js';
import { selectedRegion, sliceOf, takesMarks } from '../state/regionSelectors.js';
import { stackOf } from '../state/selectors.js';
import { selectedStent } from '../state/stentSelectors.js';
import { BandsView } from './BandsView.js';
import { NoiseView } from './NoiseView.js';
import { StentView } from './StentView.js';
import { useSelected } from './useSelected.js';
import { VisibleView } from './VisibleView.js';

const NONE = new Float64Array(0);

/** The plots beside the ledger, one at a time. */
export function PlotView() {
  const { store } = useEngine();
  const plot = useSelected((state) => state.plot);
  const label = useSelected((state) => selectedRegion(state)?.label);
  const across = useSelected(
    (state) => selectedProfile(state)?.label ?? selectedStent(state)?.label,
  );
  return (
    <PlotFrame
      title={titleOf(plot, label, across)}
      plot={plot}
      onPlot={(id) => store.change('Choose plot', (state) => ({ ...state, plot: id }))}
    >
      {plot === 'histogram' && <HistogramView />}
      {plot === 'bands' && <BandsView />}
      {plot === 'noise' && <NoiseView />}
      {plot === 'visible' && <VisibleView />}
      {plot === 'stent' && <StentView />}
    </PlotFrame>
  );
}

function titleOf(
  plot: AppState['plot'],
  label: string | undefined,
  across: string | undefined,
): string {
  switch (plot) {
    case 'histogram':
      return label ?? 'Histogram';
    case 'bands':
      return label ?? 'Plaque density';
    case 'noise':
      return 'Noise and sharpness';
    case 'visible':
      return 'What could be seen';
    case 'stent':
      return across ?? 'Across the vessel';
  }
}

/** The histogram of the selected region on both kernels; it stands still while a region is dragged. */
function HistogramView() {
  const { store, bench } = useEngine();
  const region = useSelected(selectedRegion);
  const pair = useSelected((state) => state.pair);
  // Values can come with their slices, so the reading of slices is followed too.
  const loading = useSelected((state) => state.loading);
  const shape = region?.shape;
  const values = useMemo(
    () => ({
      soft: valuesOn(store.now(), bench, 'soft', shape),
      sharp: valuesOn(store.now(), bench, 'sharp', shape),
    }),
    [shape, pair, loading],
  );
  return (
    <Histogram
      label={region?.label}
      soft={values.soft}
      sharp={values.sharp}
      meanSoft={region?.soft?.meanHu ?? null}
      meanSharp={region?.sharp?.meanHu ?? null}
      unit={pair?.soft.unit ?? 'HU'}
    />
  );
}

/** HU of the pixels in a shape on one stack; none where they can't be had. */
function valuesOn(
  state: AppState,
  bench: Pick<Bench, 'shown'>,
  kernel: Kernel,
  shape: Shape | undefined,
): Float64Array {
  const stack = stackOf(state, kernel);
  if (shape === undefined || stack === undefined || stack.unit !== 'HU') return NONE;
  const index = takesMarks(state, kernel) ? sliceOf(shape, stack) : undefined;
  const slice = index === undefined ? undefined : stack.slices[index];
  const stored = index === undefined ? undefined : bench.shown(kernel, index);
  if (slice === undefined || stored === undefined) return NONE;
  return regionValues(shape, slice, stored).values;
}

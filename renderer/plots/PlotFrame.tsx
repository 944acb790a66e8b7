import type { ComponentChildren } from 'preact';
import { useId } from 'preact/hooks';
import type { PlotId } from '../state/appState.js';

export interface PlotFrameProps {
  readonly title: string;
  readonly plot: PlotId;
  readonly onPlot: (plot: PlotId) => void;
  readonly children: ComponentChildren;
}

const PLOTS: readonly { readonly id: PlotId; readonly name: string }[] = [
  { id: 'histogram', name: 'Histogram' },
  { id: 'bands', name: 'Bands' },
  { id: 'noise', name: 'Noise' },
  { id: 'visible', name: 'Visible' },
  { id: 'stent', name: 'Across' },
];

/** The plot's place: its title, and tabs to choose what is plotted (ARIA tabs pattern). */
export function PlotFrame({ title, plot, onPlot, children }: PlotFrameProps) {
  const base = useId();
  const tabId = (id: PlotId): string => `${base}-${id}`;
  const onKeyDown = (event: KeyboardEvent): void => {
    const step = { ArrowRight: 1, ArrowLeft: -1 }[event.key];
    if (step === undefined) return;
    event.preventDefault();
    const at = PLOTS.findIndex(({ id }) => id === plot);
    const next = PLOTS[(at + step + PLOTS.length) % PLOTS.length];
    if (next === undefined) return;
    onPlot(next.id);
    document.getElementById(tabId(next.id))?.focus();
  };
  return (
    <section class="plot" aria-label="Plot">
      <div class="plot-head">
        <h2>{title}</h2>
        <div class="plot-tabs" role="tablist" aria-label="Plots" onKeyDown={onKeyDown}>
          {PLOTS.map(({ id, name }) => (
            <button
              key={id}
              id={tabId(id)}
              type="button"
              role="tab"
              aria-selected={id === plot}
              aria-controls={`${base}-panel`}
              tabIndex={id === plot ? 0 : -1}
              onClick={() => onPlot(id)}
            >
              {name}
            </button>
          ))}
        </div>
      </div>
      <div class="plot-panel" id={`${base}-panel`} role="tabpanel" aria-labelledby={tabId(plot)}>
        {children}
      </div>
    </section>
  );
}

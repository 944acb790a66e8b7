import { useEffect } from 'preact/hooks';
import { type Engine, EngineContext } from '../engine.js';
import { AppFrame } from '../panels/AppFrame.js';
import { isBlind } from '../state/regionSelectors.js';
import { DialogsView } from './DialogsView.js';
import { HeaderView } from './HeaderView.js';
import { HingeView } from './HingeView.js';
import { LedgerView } from './LedgerView.js';
import { LiveRegion } from './LiveRegion.js';
import { PlateView } from './PlateView.js';
import { PlotView } from './PlotView.js';
import { RepeatView } from './RepeatView.js';
import { StatusView } from './StatusView.js';
import { ToolBarView } from './ToolBarView.js';
import { useSelected } from './useSelected.js';

/** The whole page on its engine. */
export function App({ engine }: { readonly engine: Engine }) {
  return (
    <EngineContext.Provider value={engine}>
      <Page />
    </EngineContext.Provider>
  );
}

function Page() {
  const isSingle = useSelected(({ pair }) => pair !== undefined && pair.sharp === undefined);
  const way = useSelected(({ pair, compare }) =>
    pair?.sharp === undefined ? 'open' : compare.way,
  );
  const isReadAgain = useSelected(isBlind);
  const face = way === 'open' ? 'soft' : way;
  const theme = useSelected((state) => state.settings.theme);
  useEffect(() => {
    document.documentElement.dataset.theme = theme;
  }, [theme]);
  return (
    <>
      <AppFrame
        header={<HeaderView />}
        tools={<ToolBarView />}
        soft={<PlateView key={face} face={face} />}
        hinge={<HingeView />}
        sharp={<PlateView face="sharp" />}
        ledger={isReadAgain ? <RepeatView /> : <LedgerView />}
        plot={isReadAgain ? <p class="plot-hidden">Hidden while you read again.</p> : <PlotView />}
        status={<StatusView />}
        plates={isSingle || way !== 'open' ? 'one' : 'two'}
      />
      <LiveRegion />
      <DialogsView />
    </>
  );
}

import { runningRepeat } from '../../core/note/index.js';
import { useEngine } from '../engine.js';
import { RepeatPanel } from '../panels/RepeatPanel.js';
import { dropRepeat, endRepeat, skipNext } from '../state/changes/repeat.js';
import { useSelected } from './useSelected.js';

/** The panel of the repeat that is running, in the ledger's place. */
export function RepeatView() {
  const { store, now } = useEngine();
  const note = useSelected((state) => state.note);
  const running = note && runningRepeat(note);
  if (running === undefined) return null;
  return (
    <RepeatPanel
      running={running}
      finding={note?.findings.find(({ id }) => id === running.next?.findingId)}
      onSkip={() => store.change('Skip region', skipNext(now()))}
      onFinish={() => store.change('Finish repeat', endRepeat(now()))}
      onGiveUp={() => store.change('Give repeat up', dropRepeat(now()))}
    />
  );
}

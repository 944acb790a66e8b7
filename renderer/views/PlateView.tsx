import { useCallback } from 'preact/hooks';
import type { Kernel } from '../../core/note/index.js';
import { ProgressLine } from '../dialogs/ProgressLine.js';
import { useEngine } from '../engine.js';
import { Welcome } from '../panels/Welcome.js';
import { Plate } from '../plates/Plate.js';
import { scrollOrShift } from '../state/changes/cut.js';
import type { PlateFace } from '../state/compareSelectors.js';
import { giveUp, plateKey } from '../tools/plateKeys.js';
import { useSelected } from './useSelected.js';

/** One plate with its keys; before anything is open, the soft plate's place holds the welcome. */
export function PlateView({ face }: { readonly face: PlateFace }) {
  const { store, machine, bench, port, run, folderDialog, now } = useEngine();
  const scroll = useCallback(
    (on: Kernel, steps: number) => scrollOrShift(on, steps, bench.cuts, now()),
    [bench, now],
  );
  const hasPair = useSelected((state) => state.pair !== undefined);
  const job = useSelected((state) => state.job);
  const recent = useSelected((state) => state.recent);
  if (!hasPair) {
    if (face === 'sharp') return null;
    if (job !== undefined) {
      return (
        <div class="plate-job">
          <ProgressLine progress={job} onCancel={bench.cancelJob} />
        </div>
      );
    }
    return (
      <Welcome
        recent={recent}
        onOpenFolder={() => run('folder.open')}
        onDemonstration={() => run('folder.demonstration')}
        onRecent={(id) => {
          void folderDialog.openRecent(id).then((folder) => folder && bench.openFolder(folder));
        }}
      />
    );
  }
  const onKey = (on: Kernel, event: KeyboardEvent): boolean => {
    if (event.ctrlKey || event.metaKey || event.altKey) return false;
    if (event.key === 'Escape') return machine.cancel() || giveUp(port);
    const { letterKeys } = store.now().settings;
    return plateKey(port, on, { key: event.key, shift: event.shiftKey, letterKeys });
  };
  return (
    <Plate
      face={face}
      store={store}
      machine={machine}
      stored={bench.shown}
      cuts={bench.cuts}
      fitOf={bench.fitting.fitOf}
      scroll={scroll}
      onKey={onKey}
    />
  );
}

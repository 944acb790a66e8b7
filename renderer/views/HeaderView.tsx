import { COMMANDS, type CommandId } from '../../core/commands/index.js';
import { useEngine } from '../engine.js';
import { Header, type SaveState as ShownSaveState } from '../panels/Header.js';
import { identityText } from '../panels/identityText.js';
import type { AppState } from '../state/appState.js';
import { keyNames } from './keyNames.js';
import { useSelected } from './useSelected.js';

const EXPORTS = COMMANDS.filter(({ id }) => id.startsWith('export.'));

/** The header, from the state. */
export function HeaderView() {
  const { run } = useEngine();
  const note = useSelected((state) => state.note);
  const save = useSelected((state) => state.save);
  const canPair = useSelected((state) => (state.index?.stacks.length ?? 0) > 0);
  return (
    <Header
      identity={note === undefined ? undefined : identityText(note.study)}
      synthetic={note?.synthetic ?? false}
      save={shownSave(save, note)}
      canPair={canPair}
      exports={EXPORTS}
      canExport={note !== undefined}
      keyNames={keyNames()}
      onOpenFolder={() => run('folder.open')}
      onChoosePair={() => run('pair.choose')}
      onExport={(id) => run(id as CommandId)}
      onSave={() => run('note.save')}
      onCautions={() => run('help.cautions')}
    />
  );
}

function shownSave(save: AppState['save'], note: AppState['note']): ShownSaveState {
  const states =
    note === undefined ? {} : { completion: note.completion, verification: note.verification };
  switch (save.kind) {
    case 'none':
      return { kind: 'none', ...states };
    case 'saving':
      return { kind: 'saving', ...states };
    case 'saved':
      return { kind: 'saved', time: save.at, ...states };
    case 'conflict':
    case 'failed':
      return { kind: 'failed', reason: save.text, ...states };
  }
}

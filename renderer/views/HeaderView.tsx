import { COMMANDS, type Command, type CommandId } from '../../core/commands/index.js';
import { noteStudy, type Study } from '../../core/note/index.js';
import type { Stack } from '../../core/stack/index.js';
import { checkedCommands, enabledCommands } from '../commands/commandState.js';
import { useEngine } from '../engine.js';
import { Header, type SaveState as ShownSaveState } from '../panels/Header.js';
import { identityText } from '../panels/identityText.js';
import { commandKeyText } from '../panels/parts/keyText.js';
import type { MenuItem } from '../panels/parts/MenuButton.js';
import type { AppState } from '../state/appState.js';
import { keyNames } from './keyNames.js';
import { useSelected } from './useSelected.js';

const EXPORTS = COMMANDS.filter(({ id }) => id.startsWith('export.'));

/** Commands that stand nowhere else in the window. */
const MORE: readonly CommandId[] = [
  'folder.contents',
  'folder.demonstration',
  'pair.swap',
  'pair.mask',
  'edit.undo',
  'edit.redo',
  'edit.copyTable',
  'region.delete',
  'slice.region',
  'view.fit',
  'view.smooth',
  'view.noiseAreas',
  'region.keyImage',
  'note.open',
  'note.recheck',
  'repeat.begin',
  'agreement.open',
  'note.save',
  'edit.settings',
  'help.keys',
  'help.numbers',
  'help.cautions',
];

/** The header, from the state. */
export function HeaderView() {
  const { run } = useEngine();
  const note = useSelected((state) => state.note);
  const study = useSelected(shownStudy);
  const save = useSelected((state) => state.save);
  const leftOut = useSelected((state) => state.index?.leftOut.length);
  const enabled = useSelected((state) => enabledCommands(state).join(' '));
  const checked = useSelected((state) => checkedCommands(state).join(' '));
  const canPair = useSelected((state) => (state.index?.stacks.length ?? 0) > 0);
  return (
    <Header
      identity={study === undefined ? undefined : identityText(study)}
      synthetic={note?.synthetic ?? false}
      save={shownSave(save, note)}
      canPair={canPair}
      exports={EXPORTS}
      canExport={note !== undefined}
      leftOut={leftOut}
      more={moreItems(new Set(enabled.split(' ')), new Set(checked.split(' ')))}
      keyNames={keyNames()}
      onOpenFolder={() => run('folder.open')}
      onChoosePair={() => run('pair.choose')}
      onCommand={(id) => run(id as CommandId)}
      onContents={() => run('folder.contents')}
      onSave={() => run('note.save')}
      onCautions={() => run('help.cautions')}
    />
  );
}

function moreItems(
  enabled: ReadonlySet<string>,
  checked: ReadonlySet<string>,
): readonly MenuItem[] {
  return COMMANDS.filter(({ id }) => MORE.includes(id)).map((command: Command) => ({
    id: command.id,
    title: command.title,
    keyText: commandKeyText(command, keyNames(), true),
    disabled: !enabled.has(command.id),
    ...(command.toggle === true && { checked: checked.has(command.id) }),
  }));
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

/** Who is read: as the note has it, or as the reader has the texts read now. */
function shownStudy({ note, pair, characterSet }: AppState): Study | undefined {
  if (characterSet === undefined || pair === undefined) return note?.study;
  return studyReadNow(pair.soft);
}

/** The same object for the same stack: the header is not drawn again with every change of the state. */
const studies = new WeakMap<Stack, Study>();

function studyReadNow(stack: Stack): Study {
  const known = studies.get(stack) ?? noteStudy(stack);
  studies.set(stack, known);
  return known;
}

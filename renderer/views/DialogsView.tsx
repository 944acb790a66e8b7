import { useState } from 'preact/hooks';
import { COMMANDS } from '../../core/commands/index.js';
import { addContrast, type ContrastParts } from '../../core/note/index.js';
import { Cautions } from '../dialogs/Cautions.js';
import { Contents } from '../dialogs/Contents.js';
import { Keys } from '../dialogs/Keys.js';
import { NewContrast } from '../dialogs/NewContrast.js';
import { Numbers } from '../dialogs/Numbers.js';
import { OpenFolder } from '../dialogs/OpenFolder.js';
import { SettingsDialog } from '../dialogs/SettingsDialog.js';
import { useEngine } from '../engine.js';
import { changeSettings } from '../services/start.js';
import { editNote } from '../state/history.js';
import { AgreementView } from './AgreementView.js';
import { ChoosePairView } from './ChoosePairView.js';
import { ExportView } from './ExportView.js';
import { KeyImageView } from './KeyImageView.js';
import { keyNames } from './keyNames.js';
import { NoteDialogView } from './NoteDialogView.js';
import { useSelected } from './useSelected.js';

/** The dialog that is open, if any. */
export function DialogsView() {
  const engine = useEngine();
  const dialog = useSelected((state) => state.dialog);
  const settings = useSelected((state) => state.settings);
  // Before they are accepted the cautions stand before everything else; without a version nothing is known yet.
  const mustAccept = useSelected(
    (state) => state.version !== '' && !state.settings.cautionsAccepted,
  );
  const close = () =>
    engine.store.change('Close dialog', (state) => ({ ...state, dialog: undefined }));
  switch (mustAccept ? 'cautions' : dialog) {
    case undefined:
      return null;
    case 'openFolder':
      return <OpenFolderView />;
    case 'contents':
      return <ContentsView onClose={close} />;
    case 'choosePair':
      return <ChoosePairView onClose={close} />;
    case 'newContrast':
      return <NewContrastView onClose={close} />;
    case 'keyImage':
      return <KeyImageView onClose={close} />;
    case 'export':
      return <ExportView onClose={close} />;
    case 'agreement':
      return <AgreementView onClose={close} />;
    case 'note':
    case 'recheck':
      return <NoteDialogView rechecks={dialog === 'recheck'} onClose={close} />;
    case 'settings':
      return (
        <SettingsDialog
          settings={settings}
          onChange={(change) => void changeSettings(engine, change)}
          onClose={close}
        />
      );
    case 'cautions':
      return (
        <Cautions
          accepted={settings.cautionsAccepted}
          onAccept={() => {
            if (dialog === 'cautions') close();
            void changeSettings(engine, { cautionsAccepted: true });
          }}
          onClose={close}
        />
      );
    case 'keys':
      return (
        <Keys
          commands={COMMANDS}
          keyNames={keyNames()}
          letterKeys={settings.letterKeys}
          onClose={close}
        />
      );
    case 'numbers':
      return <Numbers onClose={close} />;
  }
}

interface ClosableProps {
  readonly onClose: () => void;
}

function OpenFolderView() {
  const { folderDialog, bench } = useEngine();
  const { level, problem } = folderDialog.state.value;
  const recent = useSelected((state) => state.recent);
  const progress = useSelected((state) => state.job);
  return (
    <OpenFolder
      level={level}
      recent={recent}
      progress={progress}
      problem={problem}
      onEnter={folderDialog.enter}
      onChoose={folderDialog.choose}
      onRecent={(id) => {
        void folderDialog.openRecent(id).then((folder) => folder && bench.openFolder(folder));
      }}
      onForget={folderDialog.forget}
      onForgetAll={folderDialog.forgetAll}
      onDemonstration={() => {
        folderDialog.close();
        void bench.openDemonstration();
      }}
      onCancel={bench.cancelJob}
      onClose={folderDialog.close}
    />
  );
}

function ContentsView({ onClose }: ClosableProps) {
  const { store, bench } = useEngine();
  const { index, folder, pair, characterSet } = store.now();
  if (index === undefined || folder === undefined) return null;
  return (
    <Contents
      index={index}
      folderName={folder.name}
      softKey={pair?.soft.key}
      sharpKey={pair?.sharp?.key}
      characterSet={characterSet}
      onCharacterSet={(chosen) => void bench.openFolder(folder, chosen)}
      onChoosePair={() =>
        store.change('Open dialog', (state) => ({ ...state, dialog: 'choosePair' }))
      }
      onClose={onClose}
    />
  );
}

function NewContrastView({ onClose }: ClosableProps) {
  const { store, now } = useEngine();
  const [problem, setProblem] = useState<string>();
  const { note, selected } = store.now();
  if (note === undefined) return null;
  const create = (parts: ContrastParts): void => {
    const added = addContrast(note, parts, now());
    if (!added.ok) {
      setProblem(added.refusal.text);
      return;
    }
    const { note: after } = added.value;
    store.change(
      'New contrast',
      editNote('New contrast', () => after),
    );
    onClose();
  };
  return (
    <NewContrast
      regions={note.regions}
      noise={note.noise}
      selectedId={selected}
      problem={problem}
      onCreate={create}
      onClose={onClose}
    />
  );
}

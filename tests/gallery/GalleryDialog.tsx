import { useState } from 'preact/hooks';
import { COMMANDS } from '../../core/commands/index.js';
import { Cautions } from '../../renderer/dialogs/Cautions.js';
import { ChoosePair, type PairChoice } from '../../renderer/dialogs/ChoosePair.js';
import { Contents } from '../../renderer/dialogs/Contents.js';
import { Keys } from '../../renderer/dialogs/Keys.js';
import { NewContrast } from '../../renderer/dialogs/NewContrast.js';
import { Numbers } from '../../renderer/dialogs/Numbers.js';
import { OpenFolder } from '../../renderer/dialogs/OpenFolder.js';
import { SettingsDialog } from '../../renderer/dialogs/SettingsDialog.js';
import { evidence, index, note } from './inventedData.js';

const nothing = () => {};

/** One of the dialogs by name; none for another name. */
export function GalleryDialog({ name }: { readonly name: string }) {
  const [open, setOpen] = useState(true);
  const [choice, setChoice] = useState<PairChoice | undefined>({
    softKey: '1.2.3.3',
    sharpKey: '1.2.3.4',
  });
  const close = () => setOpen(false);
  if (!open) return null;
  switch (name) {
    case 'cautions':
      return <Cautions accepted={false} onAccept={close} onClose={close} />;
    case 'keys':
      return <Keys commands={COMMANDS} keyNames="other" letterKeys onClose={close} />;
    case 'numbers':
      return <Numbers onClose={close} />;
    case 'settings':
      return (
        <SettingsDialog
          settings={{ cautionsAccepted: true, theme: 'dark', letterKeys: true, reader: 'I. Ashe' }}
          onChange={nothing}
          onClose={close}
        />
      );
    case 'contrast':
      return (
        <NewContrast
          regions={note.regions}
          noise="reference"
          selectedId="L2"
          problem={undefined}
          onCreate={close}
          onClose={close}
        />
      );
    case 'contents':
      return (
        <Contents
          index={index}
          folderName="heart-2026-01"
          softKey="1.2.3.3"
          sharpKey="1.2.3.4"
          characterSet={undefined}
          onCharacterSet={nothing}
          onChoosePair={nothing}
          onClose={close}
        />
      );
    case 'pair':
      return (
        <ChoosePair
          stacks={index.stacks}
          choice={choice}
          preview={{ verdict: 'pair', lines: ['shift 0.02 mm'], evidence }}
          allowed
          proposals={[]}
          needsReason={[]}
          reasons={{}}
          onReason={nothing}
          progress={undefined}
          onCancel={nothing}
          onPropose={nothing}
          onChange={setChoice}
          onConfirm={close}
          onClose={close}
        />
      );
    case 'folder':
    case 'reading':
      return <GalleryFolder reading={name === 'reading'} onClose={close} />;
    default:
      return null;
  }
}

function GalleryFolder({ reading, onClose }: { readonly reading: boolean; onClose: () => void }) {
  return (
    <OpenFolder
      level={{
        id: 'c',
        name: 'studies',
        trail: [
          { id: 'a', name: 'home' },
          { id: 'b', name: 'reader' },
          { id: 'c', name: 'studies' },
        ],
        roots: [{ id: 'a', name: 'Home' }],
        children: ['2026-01 heart', '2026-02 heart', 'phantom', 'teaching'].map((name) => ({
          id: name,
          name,
        })),
      }}
      recent={[
        { id: 'r', name: 'heart-2026-01', missing: false },
        { id: 's', name: 'phantom', missing: true },
      ]}
      progress={reading ? { done: 412, total: 1000, text: 'Reading headers' } : undefined}
      problem={undefined}
      onEnter={nothing}
      onChoose={nothing}
      onRecent={nothing}
      onForget={nothing}
      onForgetAll={nothing}
      onDemonstration={nothing}
      onCancel={nothing}
      onClose={onClose}
    />
  );
}

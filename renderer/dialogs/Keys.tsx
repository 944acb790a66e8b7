import { type Command, MENUS } from '../../core/commands/index.js';
import { type KeyNames, keyText, letterText } from '../panels/parts/keyText.js';
import { Dialog } from './Dialog.js';

export interface KeysProps {
  readonly commands: readonly Command[];
  readonly keyNames: KeyNames;
  readonly letterKeys: boolean;
  readonly onClose: () => void;
}

/** Keys that belong to a panel and not to a command. */
const PANEL_KEYS: readonly { readonly keys: string; readonly what: string }[] = [
  { keys: 'F6', what: 'Next panel' },
  { keys: '↑ ↓', what: 'Slice by slice, on the twin ruler' },
  { keys: 'Shift+↑ ↓', what: 'Ten slices, on the twin ruler' },
  { keys: 'Home End', what: 'First and last slice, on the twin ruler' },
  { keys: '↑ ↓', what: 'Another region, in the reading note' },
  { keys: 'Esc', what: 'Give up what is being drawn, typed or asked' },
];

/** Every command that has a key, by menu, from the same table as menus and tool bar. */
export function Keys({ commands, keyNames, letterKeys, onClose }: KeysProps) {
  const withKeys = commands.filter(({ key, letter }) => key ?? letter);
  return (
    <Dialog
      title="Keys"
      size="wide"
      onClose={onClose}
      foot={
        <>
          <span class="note">
            {letterKeys
              ? 'Single letters work while no text field has the focus.'
              : 'Single letters are switched off in the settings.'}
          </span>
          <button type="button" class="button primary" onClick={onClose}>
            Close
          </button>
        </>
      }
    >
      <div class="keys">
        {MENUS.map((menu) => {
          const lines = withKeys.filter((command) => command.menu === menu);
          return lines.length === 0 ? null : (
            <section key={menu}>
              <h3>{menu}</h3>
              <dl>
                {lines.map((command) => (
                  <div key={command.id}>
                    <dt>{command.title.replace(/…$/, '')}</dt>
                    <dd>
                      <kbd>
                        {command.letter !== undefined
                          ? letterText(command.letter)
                          : keyText(command.key ?? '', keyNames)}
                      </kbd>
                    </dd>
                  </div>
                ))}
              </dl>
            </section>
          );
        })}
        <section>
          <h3>Panels</h3>
          <dl>
            {PANEL_KEYS.map(({ keys, what }) => (
              <div key={what}>
                <dt>{what}</dt>
                <dd>
                  <kbd>{keys}</kbd>
                </dd>
              </div>
            ))}
          </dl>
        </section>
      </div>
    </Dialog>
  );
}

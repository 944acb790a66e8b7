import { useId } from 'preact/hooks';
import type { Settings } from '../../app/host/contract.js';
import { TextField } from '../panels/parts/TextField.js';
import { Dialog } from './Dialog.js';

export interface SettingsDialogProps {
  readonly settings: Settings;
  readonly onChange: (change: Partial<Settings>) => void;
  readonly onClose: () => void;
}

const THEMES: readonly { readonly value: Settings['theme']; readonly text: string }[] = [
  { value: 'system', text: 'As the system' },
  { value: 'dark', text: 'Dark' },
  { value: 'light', text: 'Light' },
];

/** Settings of this machine; each takes effect at once. */
export function SettingsDialog({ settings, onChange, onClose }: SettingsDialogProps) {
  const group = useId();
  return (
    <Dialog
      title="Settings"
      onClose={onClose}
      foot={
        <button type="button" class="button primary" onClick={onClose}>
          Close
        </button>
      }
    >
      <div class="settings setting">
        <h3>Reader</h3>
        <TextField
          label="Your name"
          value={settings.reader}
          onCommit={(reader) => onChange({ reader: reader.trim() })}
        />
        <p class="hint">Stands in new reading notes and their exports.</p>
      </div>
      <fieldset class="settings setting">
        <legend>
          <b>Theme</b>
        </legend>
        <div class="choices">
          {THEMES.map(({ value, text }) => (
            <label key={value} class="choice">
              <input
                type="radio"
                name={group}
                checked={settings.theme === value}
                onChange={() => onChange({ theme: value })}
              />
              {text}
            </label>
          ))}
        </div>
        <p class="hint">The plates stay dark grey: grey levels never follow the theme.</p>
      </fieldset>
      <div class="settings setting">
        <h3>Keys</h3>
        <label class="choice">
          <input
            type="checkbox"
            checked={settings.letterKeys}
            onChange={(event) => onChange({ letterKeys: event.currentTarget.checked })}
          />
          Single letters choose tools and commands
        </label>
        <p class="hint">Switch this off if speech input or a slipping finger sets them off.</p>
      </div>
    </Dialog>
  );
}

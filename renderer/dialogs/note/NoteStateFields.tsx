import { useState } from 'preact/hooks';
import type { Note } from '../../../core/note/index.js';
import { Choice } from '../../panels/parts/Choice.js';
import type { NoteDialogActions } from './noteDialogActions.js';

export interface NoteStateFieldsProps {
  readonly note: Note;
  readonly reader: string;
  readonly isBusy: boolean;
  readonly actions: Pick<NoteDialogActions, 'onCompletion' | 'onVerify' | 'onAmend'>;
}

const COMPLETIONS = [
  { value: 'PARTIAL', text: 'partial' },
  { value: 'COMPLETE', text: 'complete' },
] as const;

/** Partial or complete, unverified or verified; the verified note shows its seal and can be amended. */
export function NoteStateFields({ note, reader, isBusy, actions }: NoteStateFieldsProps) {
  const [name, setName] = useState(reader);
  const [why, setWhy] = useState('');
  const { seal } = note;
  const nameField = (
    <label class="labelled grow">
      <span>Your name</span>
      <input
        class="field"
        type="text"
        autocomplete="off"
        value={name}
        onInput={(event) => setName(event.currentTarget.value)}
      />
    </label>
  );
  if (seal !== null) {
    return (
      <section class="settings" aria-label="State of the note">
        <h3>Verified</h3>
        <p>
          By {seal.by}, {seal.at}. The note is frozen. SHA-256 of its content:{' '}
          <code class="hash">{seal.sha256}</code>
        </p>
        {nameField}
        <label class="labelled grow">
          <span>Why it is amended</span>
          <input
            class="field"
            type="text"
            autocomplete="off"
            value={why}
            onInput={(event) => setWhy(event.currentTarget.value)}
          />
        </label>
        <button
          type="button"
          class="button outlined"
          disabled={isBusy || name.trim() === '' || why.trim() === ''}
          onClick={() => actions.onAmend(name, why)}
        >
          Amend: open it for changes
        </button>
        <p class="hint">What was verified stays inside the note. Verify it again afterwards.</p>
      </section>
    );
  }
  return (
    <section class="settings" aria-label="State of the note">
      <h3>State</h3>
      <Choice
        label="Completion"
        value={note.completion}
        options={COMPLETIONS}
        onChange={actions.onCompletion}
      />
      {nameField}
      <button
        type="button"
        class="button outlined"
        disabled={isBusy || name.trim() === ''}
        onClick={() => actions.onVerify(name)}
      >
        Verify and freeze the note
      </button>
      <p class="hint">
        Verifying says that you checked every value against the source images and answer for the
        note.
      </p>
    </section>
  );
}

import { useId, useState } from 'preact/hooks';
import { type ExportChoice, holdsPictures } from '../services/exporting.js';
import { Dialog } from './Dialog.js';

export interface ExportDialogProps {
  readonly patientId: string | null;
  /** The note's pair has images at hand, for key images. */
  readonly verified: boolean;
  /** What is being made now. */
  readonly progress: string | undefined;
  readonly message: string | undefined;
  readonly onExport: (choice: ExportChoice) => void;
  readonly onCancel: () => void;
  readonly onClose: () => void;
}

const FORMS: readonly {
  readonly value: ExportChoice['form'];
  readonly text: string;
  readonly hint: string;
}[] = [
  { value: 'pdf', text: 'PDF', hint: 'for the report: table, key images, provenance' },
  { value: 'html', text: 'HTML page', hint: 'the same in one file for a browser' },
  { value: 'sr', text: 'DICOM structured report', hint: 'Comprehensive SR, Measurement Report' },
  { value: 'csv', text: 'CSV, long', hint: 'one line a value, with all that belongs to it' },
  { value: 'csv-wide', text: 'CSV, wide', hint: 'one line a region, both kernels side by side' },
  { value: 'tsv', text: 'TSV', hint: 'for spreadsheets, as it is printed' },
  { value: 'json', text: 'The note itself, JSON', hint: 'to measure again, or for a colleague' },
];

/** Which form, with whose identity, and what goes with it. */
export function ExportDialog(props: ExportDialogProps) {
  const group = useId();
  const [form, setForm] = useState<ExportChoice['form']>('pdf');
  const [identity, setIdentity] = useState<ExportChoice['identity']>('with');
  const [pictures, setPictures] = useState(true);
  const [named, setNamed] = useState(false);
  const isBusy = props.progress !== undefined;
  const withIdentity = identity === 'with';
  return (
    <Dialog
      title="Export"
      size="page"
      onClose={props.onClose}
      foot={
        <>
          <span class="note" role="status">
            {props.progress ?? props.message ?? ''}
          </span>
          {isBusy && (
            <button type="button" class="button outlined" onClick={props.onCancel}>
              Cancel
            </button>
          )}
          <button type="button" class="button outlined" onClick={props.onClose}>
            Close
          </button>
          <button
            type="button"
            class="button primary"
            disabled={isBusy}
            onClick={() => props.onExport({ form, identity, pictures, named })}
          >
            Export
          </button>
        </>
      }
    >
      {!props.verified && <p class="hint">This note is not verified; the export says so.</p>}
      <fieldset class="settings setting">
        <legend>
          <b>Form</b>
        </legend>
        {FORMS.map(({ value, text, hint }) => (
          <label key={value} class="choice">
            <input
              type="radio"
              name={`${group}-form`}
              checked={form === value}
              onChange={() => setForm(value)}
            />
            {text} <span class="hint">{hint}</span>
          </label>
        ))}
      </fieldset>
      <fieldset class="settings setting">
        <legend>
          <b>Identity</b>
        </legend>
        <label class="choice">
          <input
            type="radio"
            name={`${group}-identity`}
            checked={withIdentity}
            onChange={() => setIdentity('with')}
          />
          With identity, for the patient’s record
        </label>
        <label class="choice">
          <input
            type="radio"
            name={`${group}-identity`}
            checked={!withIdentity}
            onChange={() => setIdentity('without')}
          />
          Without identity, for research: names, dates, free text and UIDs are taken out or replaced
        </label>
        <p class="hint">The file says which of the two it is.</p>
      </fieldset>
      <fieldset class="settings setting">
        <legend>
          <b>With it</b>
        </legend>
        <label class="choice">
          <input
            type="checkbox"
            checked={pictures && holdsPictures(form)}
            disabled={!holdsPictures(form)}
            onChange={(event) => setPictures(event.currentTarget.checked)}
          />
          A key image of each region
        </label>
        <label class="choice">
          <input
            type="checkbox"
            checked={named && withIdentity && props.patientId !== null}
            disabled={!withIdentity || props.patientId === null}
            onChange={(event) => setNamed(event.currentTarget.checked)}
          />
          The patient ID in the file name
        </label>
      </fieldset>
    </Dialog>
  );
}

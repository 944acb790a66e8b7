import { formatFixed } from '../../../core/format/index.js';
import type { ChangedNumber } from '../../../core/note/life/index.js';
import type { Recheck } from '../../services/noteLife.js';

export interface RecheckResultProps {
  readonly recheck: Recheck | undefined;
  readonly isBusy: boolean;
  readonly onRecheck: () => void;
}

const SEAL_TEXT: Readonly<Record<Recheck['seal'], string>> = {
  intact: 'The content is what was verified.',
  changed: 'The content is not what was verified: do not rely on this note.',
  'not sealed': 'The note is not verified, so there is no seal to check.',
};

/** Measures the note again and lists what no longer holds, both values beside each other. */
export function RecheckResult({ recheck, isBusy, onRecheck }: RecheckResultProps) {
  return (
    <section class="settings" aria-label="Measured again">
      <h3>Measure again</h3>
      <button type="button" class="button outlined" disabled={isBusy} onClick={onRecheck}>
        Compute every value from the images again
      </button>
      {recheck !== undefined && <Found recheck={recheck} />}
    </section>
  );
}

function Found({ recheck: { seal, values, frames } }: { readonly recheck: Recheck }) {
  return (
    <div role="status">
      <p>{SEAL_TEXT[seal]}</p>
      {values.length === 0 && frames.length === 0 && <p>Every value holds.</p>}
      {frames.length > 0 && (
        <ul class="plain-list">
          {frames.map(({ sopInstanceUid, frameNumber, state }) => (
            <li key={`${sopInstanceUid} ${frameNumber}`}>
              {state === 'missing' ? 'Missing image ' : 'Other pixels than when verified: image '}
              {sopInstanceUid}
              {frameNumber !== null && `, frame ${frameNumber}`}
            </li>
          ))}
        </ul>
      )}
      {values.length > 0 && <Values values={values} />}
    </div>
  );
}

function Values({ values }: { readonly values: readonly ChangedNumber[] }) {
  return (
    <table class="data-table">
      <caption>Values that no longer hold</caption>
      <thead>
        <tr>
          <th scope="col">What</th>
          <th scope="col">Kernel</th>
          <th scope="col">Number</th>
          <th scope="col" class="number">
            In the note
          </th>
          <th scope="col" class="number">
            Now
          </th>
        </tr>
      </thead>
      <tbody>
        {values.map(({ id, label, kernel, quantity, before, now }) => (
          <tr key={`${id} ${kernel} ${quantity}`}>
            <th scope="row">{label}</th>
            <td>{kernel}</td>
            <td>{quantity}</td>
            <td class="number">{formatFixed(before, 3)}</td>
            <td class="number">{formatFixed(now, 3)}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

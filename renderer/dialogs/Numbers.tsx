import { Dialog } from './Dialog.js';
import { NUMBERS } from './help/numbers.js';

/** What each number means, with its formula and its source. */
export function Numbers({ onClose }: { readonly onClose: () => void }) {
  return (
    <Dialog
      title="What each number means"
      size="page"
      onClose={onClose}
      foot={
        <button type="button" class="button primary" onClick={onClose}>
          Close
        </button>
      }
    >
      <div class="prose numbers">
        {NUMBERS.map((entry) => (
          <section key={entry.title}>
            <h3>{entry.title}</h3>
            {entry.text.map((text) => (
              <p key={text}>{text}</p>
            ))}
            {entry.formula !== undefined && <p class="formula">{entry.formula}</p>}
            <p class="source">Source: {entry.source}</p>
          </section>
        ))}
      </div>
    </Dialog>
  );
}

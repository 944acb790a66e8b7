import type { Missing } from '../../../core/note/life/index.js';

/** What is still missing for a complete note. It stops nothing. */
export function MissingList({ missing }: { readonly missing: readonly Missing[] }) {
  return (
    <section class="settings" aria-label="Still missing">
      <h3>Still missing</h3>
      {missing.length === 0 ? (
        <p class="hint">Nothing: the note says all that its findings ask for.</p>
      ) : (
        <ul class="plain-list">
          {missing.map(({ findingId, code, text }) => (
            <li key={`${findingId} ${code} ${text}`}>{text}</li>
          ))}
        </ul>
      )}
    </section>
  );
}

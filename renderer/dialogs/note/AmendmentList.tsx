import type { Note } from '../../../core/note/index.js';
import { amendmentText } from '../../../core/note/life/index.js';

/** Earlier verified states: who opened the note again, when, why, and what is otherwise since. */
export function AmendmentList({ note }: { readonly note: Note }) {
  if (note.amendments.length === 0) return null;
  return (
    <section class="settings" aria-label="Amendments">
      <h3>Amendments</h3>
      <ul class="plain-list">
        {note.amendments.map((amendment) => (
          <li key={amendment.at}>
            {amendment.by}, {amendment.at}: {amendment.why}
            <details>
              <summary>What is otherwise now</summary>
              <ul class="plain-list">
                {withNothing(amendmentText(amendment, note)).map((line) => (
                  <li key={line}>{line}</li>
                ))}
              </ul>
            </details>
          </li>
        ))}
      </ul>
    </section>
  );
}

function withNothing(lines: readonly string[]): readonly string[] {
  return lines.length === 0 ? ['Nothing that is reported.'] : lines;
}

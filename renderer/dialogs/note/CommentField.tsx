import { useState } from 'preact/hooks';

export interface CommentFieldProps {
  readonly comment: string;
  readonly frozen: boolean;
  readonly onComment: (comment: string) => void;
}

/** The reader's free comment; kept when the field is left. */
export function CommentField({ comment, frozen, onComment }: CommentFieldProps) {
  const [draft, setDraft] = useState<string>();
  return (
    <section class="settings" aria-label="Comment">
      <h3>Comment</h3>
      <textarea
        class="field comment"
        rows={4}
        aria-label="Comment on the whole reading"
        value={draft ?? comment}
        disabled={frozen}
        onInput={(event) => setDraft(event.currentTarget.value)}
        onBlur={() => {
          if (draft !== undefined && draft !== comment) onComment(draft);
          setDraft(undefined);
        }}
      />
    </section>
  );
}

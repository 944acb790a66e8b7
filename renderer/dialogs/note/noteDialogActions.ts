import type { FindingFields, Note, StatedCondition } from '../../../core/note/index.js';

/** What the dialog of the reading note can do. Fields take effect at once and can be undone. */
export interface NoteDialogActions {
  readonly onCompletion: (completion: Note['completion']) => void;
  readonly onVerify: (by: string) => void;
  readonly onAmend: (by: string, why: string) => void;
  readonly onRecheck: () => void;
  /** A condition in the reader's words; empty takes it back. */
  readonly onCondition: (condition: StatedCondition, text: string) => void;
  readonly onAnatomy: (change: Partial<Note['anatomy']>) => void;
  readonly onFinding: (findingId: string, fields: FindingFields) => void;
  readonly onComment: (comment: string) => void;
}

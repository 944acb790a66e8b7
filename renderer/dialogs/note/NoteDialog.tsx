import type { Note } from '../../../core/note/index.js';
import { completeness } from '../../../core/note/life/index.js';
import type { Recheck } from '../../services/noteLife.js';
import { Dialog } from '../Dialog.js';
import { AmendmentList } from './AmendmentList.js';
import { CommentField } from './CommentField.js';
import { ConditionFields } from './ConditionFields.js';
import { MissingList } from './MissingList.js';
import { NoteStateFields } from './NoteStateFields.js';
import type { NoteDialogActions } from './noteDialogActions.js';
import { RecheckResult } from './RecheckResult.js';
import { StentFields } from './StentFields.js';
import { TreeFields } from './TreeFields.js';

export interface NoteDialogProps {
  readonly note: Note;
  /** Name of the reader, from the settings. */
  readonly reader: string;
  /** What is going on now; the buttons wait for it. */
  readonly busy: string | undefined;
  readonly problem: string | undefined;
  readonly recheck: Recheck | undefined;
  readonly actions: NoteDialogActions;
  readonly onClose: () => void;
}

/** The reading note as a record: what it still lacks, what it says of the whole, its state, and whether it still holds. */
export function NoteDialog(props: NoteDialogProps) {
  const { note, actions } = props;
  const frozen = note.verification === 'VERIFIED';
  return (
    <Dialog
      title="Reading note"
      size="wide"
      onClose={props.onClose}
      foot={
        <>
          <span class="note" role="status">
            {props.problem ?? props.busy ?? ''}
          </span>
          <button type="button" class="button primary" onClick={props.onClose}>
            Close
          </button>
        </>
      }
    >
      <div class="note-dialog">
        <div>
          <MissingList missing={completeness(note)} />
          <NoteStateFields
            note={note}
            reader={props.reader}
            isBusy={props.busy !== undefined}
            actions={actions}
          />
          <RecheckResult
            recheck={props.recheck}
            isBusy={props.busy !== undefined}
            onRecheck={actions.onRecheck}
          />
          <AmendmentList note={note} />
        </div>
        <div>
          <ConditionFields note={note} frozen={frozen} onCondition={actions.onCondition} />
          <TreeFields anatomy={note.anatomy} frozen={frozen} onAnatomy={actions.onAnatomy} />
          <StentFields findings={note.findings} frozen={frozen} onFinding={actions.onFinding} />
          <CommentField comment={note.comment} frozen={frozen} onComment={actions.onComment} />
        </div>
      </div>
    </Dialog>
  );
}

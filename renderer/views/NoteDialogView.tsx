import { useEffect, useState } from 'preact/hooks';
import {
  type Conditions,
  type Note,
  type StatedCondition,
  setAnatomy,
  setComment,
  setFinding,
  stateCondition,
} from '../../core/note/index.js';
import { setCompletion } from '../../core/note/life/index.js';
import type { Result } from '../../core/result.js';
import { NoteDialog } from '../dialogs/note/NoteDialog.js';
import type { NoteDialogActions } from '../dialogs/note/noteDialogActions.js';
import { useEngine } from '../engine.js';
import type { Recheck } from '../services/noteLife.js';
import { editNote } from '../state/history.js';
import { useSelected } from './useSelected.js';

export interface NoteDialogViewProps {
  /** The values are computed again at once. */
  readonly rechecks: boolean;
  readonly onClose: () => void;
}

/** The dialog of the reading note, from the state. */
export function NoteDialogView({ rechecks, onClose }: NoteDialogViewProps) {
  const { store, life, now } = useEngine();
  const note = useSelected((state) => state.note);
  const reader = useSelected((state) => state.settings.reader);
  const [busy, setBusy] = useState<string>();
  const [problem, setProblem] = useState<string>();
  const [recheck, setRecheck] = useState<Recheck>();

  const work = async <T,>(text: string, job: Promise<Result<T>>): Promise<T | undefined> => {
    setBusy(text);
    setProblem(undefined);
    const done = await job;
    setBusy(undefined);
    if (done.ok) return done.value;
    setProblem(done.refusal.text);
    return undefined;
  };
  const runRecheck = async (): Promise<void> => {
    setRecheck(await work('Computing every value again', life.recheck()));
  };
  useEffect(() => {
    if (rechecks) void runRecheck();
  }, []);
  if (note === undefined) return null;

  const edit = (label: string, change: (note: Note) => Note): void =>
    store.change(label, editNote(label, change));
  const refusable = (label: string, changed: Result<Note>): void => {
    if (changed.ok) edit(label, () => changed.value);
    else setProblem(changed.refusal.text);
  };
  const actions: NoteDialogActions = {
    onCompletion: (completion) =>
      refusable('Change completion', setCompletion(note, completion, now())),
    onVerify: (by) => void work('Reading the images that the values rest on', life.verify(by)),
    onAmend: (by, why) => void work('Opening the note', life.amend(by, why)),
    onRecheck: () => void runRecheck(),
    onCondition: (condition, text) => {
      const value = conditionOf(condition, text);
      if (value === undefined) setProblem(`“${text}” is no number.`);
      else edit('State a condition', (before) => stateCondition(before, condition, value, now()));
    },
    onAnatomy: (change) =>
      edit('Change the coronary tree', (before) => setAnatomy(before, change, now())),
    onFinding: (findingId, fields) => {
      const region = note.regions.find((one) => one.findingId === findingId);
      if (region !== undefined) {
        refusable('Change finding', setFinding(note, region.id, fields, now()));
      }
    },
    onComment: (comment) => edit('Comment', (before) => setComment(before, comment, now())),
  };
  return (
    <NoteDialog
      note={note}
      reader={reader}
      busy={busy}
      problem={problem}
      recheck={recheck}
      actions={actions}
      onClose={onClose}
    />
  );
}

/** What was typed for a condition; null for nothing, undefined for what is no value of it. */
function conditionOf<Condition extends StatedCondition>(
  condition: Condition,
  text: string,
): Conditions[Condition] | undefined {
  const trimmed = text.trim();
  const value = Number(trimmed.replace(',', '.'));
  const typed =
    condition === 'contrastAgent'
      ? trimmed
      : Number.isFinite(value) && value >= 0
        ? value
        : undefined;
  return (trimmed === '' ? null : typed) as Conditions[Condition] | undefined;
}

import type { MessageBoxOptions } from 'electron';

/** What the reader decides about a note with unsaved changes. */
export type Decision = 'save' | 'discard' | 'cancel';

const ANSWERS = ['save', 'discard', 'cancel'] as const;

/** The question before unsaved changes are lost. Escape and closing the dialog mean Cancel. */
export const UNSAVED_QUESTION: MessageBoxOptions = {
  type: 'question',
  message: 'The reading note has changes that are not saved yet',
  detail: 'Save them before you leave?',
  buttons: ['Save', 'Don’t save', 'Cancel'],
  defaultId: 0,
  cancelId: 2,
  noLink: true,
};

/** The question after saving did not succeed in time. */
export const NOT_SAVED_QUESTION: MessageBoxOptions = {
  type: 'warning',
  message: 'The reading note could not be saved',
  detail: 'Try again, or go back to the note and see what it says there.',
  buttons: ['Try again', 'Leave without saving', 'Cancel'],
  defaultId: 0,
  cancelId: 2,
  noLink: true,
};

/** What pressing a button means; a number that is no button means Cancel. */
export function decisionOf(response: number): Decision {
  return ANSWERS[response] ?? 'cancel';
}

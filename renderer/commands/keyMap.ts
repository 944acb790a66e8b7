import { COMMANDS, type CommandId } from '../../core/commands/index.js';

/** What of a key event decides about a command. */
export interface KeyPress {
  readonly key: string;
  readonly ctrl: boolean;
  readonly meta: boolean;
  readonly shift: boolean;
  readonly alt: boolean;
}

/** Where a key was pressed, and what the reader allows. */
export interface KeySetting {
  /** On a Mac, Mod is the command key; elsewhere the control key. */
  readonly mac: boolean;
  /** A text field or a choice has the focus: what is typed belongs to it. */
  readonly inTextField: boolean;
  /** The focus is in a part that scrolls by keys of its own. */
  readonly inScroller: boolean;
  readonly letterKeys: boolean;
}

const byKey = new Map<string, CommandId>();
const byLetter = new Map<string, CommandId>();
for (const command of COMMANDS) {
  if ('key' in command) byKey.set(command.key, command.id);
  if ('letter' in command) byLetter.set(command.letter, command.id);
}

/** Commands that a text field has of its own. */
const OF_TEXT: ReadonlySet<CommandId> = new Set(['edit.undo', 'edit.redo']);

/** Keys that move text fields and scrolling parts themselves. */
const SCROLLING = new Set(['PageUp', 'PageDown']);

/** The command of a key press; undefined when it is none, or belongs to what has the focus. */
export function commandForKey(press: KeyPress, setting: KeySetting): CommandId | undefined {
  const { key, ctrl, meta, shift, alt } = press;
  if (alt) return undefined;
  const mod = setting.mac ? meta : ctrl;
  const otherMod = setting.mac ? ctrl : meta;
  if (otherMod) return undefined;
  if (mod) {
    const command = byKey.get(chord(key, shift));
    return setting.inTextField && command !== undefined && OF_TEXT.has(command)
      ? undefined
      : command;
  }
  if (key.length > 1) {
    if (setting.inTextField || (setting.inScroller && SCROLLING.has(key))) return undefined;
    return shift ? undefined : byKey.get(key);
  }
  if (setting.inTextField || !setting.letterKeys) return undefined;
  const letter = key.toLowerCase();
  // Signs such as + and ? need Shift on many keyboards; letters with Shift are other keys.
  const isLetter = letter !== key.toUpperCase();
  return shift && isLetter ? undefined : byLetter.get(letter);
}

function chord(key: string, shift: boolean): string {
  return ['Mod', ...(shift ? ['Shift'] : []), key.length === 1 ? key.toUpperCase() : key].join('+');
}

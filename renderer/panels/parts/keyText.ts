import type { Command } from '../../../core/commands/index.js';

/** Whose names of the modifier keys to show. */
export type KeyNames = 'mac' | 'other';

const MAC: Readonly<Record<string, string>> = { Mod: '⌘', Shift: '⇧', Alt: '⌥', Ctrl: '⌃' };
const NAMES: Readonly<Record<string, string>> = {
  Mod: 'Ctrl',
  PageUp: 'Page up',
  PageDown: 'Page down',
  Escape: 'Esc',
};

/** A key of the table of commands for people: 'Mod+Shift+Z' → 'Ctrl+Shift+Z', or '⇧⌘Z' on a Mac. */
export function keyText(key: string, names: KeyNames): string {
  const parts = key.split('+');
  if (names === 'other') return parts.map((part) => NAMES[part] ?? part).join('+');
  const modifiers = ['Ctrl', 'Alt', 'Shift', 'Mod'].filter((part) => parts.includes(part));
  const rest = parts.filter((part) => !(part in MAC)).map((part) => NAMES[part] ?? part);
  return [...modifiers.map((part) => MAC[part] ?? part), ...rest].join('');
}

/** A command's letter, as it stands on the key. */
export function letterText(letter: string): string {
  return letter === '-' ? '−' : letter.toUpperCase();
}

/** What to press for a command; undefined when it has no key, or only a letter while letters are off. */
export function commandKeyText(
  command: Pick<Command, 'key' | 'letter'>,
  names: KeyNames,
  letterKeys: boolean,
): string | undefined {
  if (command.letter !== undefined && letterKeys) return letterText(command.letter);
  return command.key === undefined ? undefined : keyText(command.key, names);
}

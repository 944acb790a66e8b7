/**
 * A key of the command table as Electron writes it, when the menu may take it away from the page:
 * keys with Mod, and function keys. 'Mod+Shift+Z' → 'CmdOrCtrl+Shift+Z'.
 *
 * Undefined for every other key (a letter, Delete, Page up): those belong to a text field while it
 * has the focus, so the page handles them and the menu only shows them.
 */
export function accelerator(key: string | undefined): string | undefined {
  if (key === undefined) return undefined;
  if (key.startsWith('Mod+')) return `CmdOrCtrl+${key.slice('Mod+'.length)}`;
  return /^F([1-9]|1[0-2])$/.test(key) ? key : undefined;
}

const KEY_NAMES: ReadonlyMap<string, string> = new Map([
  ['PageUp', 'Page up'],
  ['PageDown', 'Page down'],
  ['ArrowUp', 'Arrow up'],
  ['ArrowDown', 'Arrow down'],
  ['ArrowLeft', 'Arrow left'],
  ['ArrowRight', 'Arrow right'],
  ['Escape', 'Esc'],
]);

/**
 * The key to write behind a menu title because the page handles it; undefined when there is none.
 * Letters are left out when the reader has switched them off.
 */
export function keyAsText(
  command: { readonly key?: string; readonly letter?: string },
  letterKeys: boolean,
): string | undefined {
  const { key, letter } = command;
  if (key !== undefined && accelerator(key) === undefined) return KEY_NAMES.get(key) ?? key;
  return letter !== undefined && letterKeys ? letter.toUpperCase() : undefined;
}

import type { KeyNames } from '../panels/parts/keyText.js';

/** Whose names of the modifier keys this machine's reader expects. */
export function keyNames(): KeyNames {
  return /Mac/.test(navigator.platform) ? 'mac' : 'other';
}

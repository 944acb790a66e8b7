import type { Evidence } from '../../../core/note/index.js';

const PATHS: Readonly<Record<Evidence['state'], string>> = {
  agrees: 'M2 6.5 5 9.5 10.5 2.5',
  differs: 'M2 4.5H10M2 8H10M8 1.5 4 11',
  unknown: 'M4 4.2C4 1.4 8.2 1.4 8.2 4.1 8.2 5.9 6.1 5.8 6.1 7.6M6.1 9.6V10.6',
};

/** Names of the three states, as the reader hears them. */
export const STATE_NAMES: Readonly<Record<Evidence['state'], string>> = {
  agrees: 'agrees',
  differs: 'differs',
  unknown: 'unknown',
};

/** Tick, unequal sign or question mark: a state of evidence told by shape as well as by colour. */
export function StateSign({ state }: { readonly state: Evidence['state'] }) {
  return (
    <svg
      class="sign"
      data-state={state}
      width={12}
      height={12}
      viewBox="0 0 12 12"
      role="img"
      aria-label={STATE_NAMES[state]}
    >
      <path
        d={PATHS[state]}
        fill="none"
        stroke="currentColor"
        stroke-width={1.5}
        stroke-linecap="round"
      />
    </svg>
  );
}

/** The triangle of a flag. */
export function FlagSign() {
  return (
    <svg class="flag-sign" width={11} height={14} viewBox="0 0 11 14" aria-hidden="true">
      <path d="M5.5 3.5 10 11.5H1Z" fill="none" stroke="currentColor" stroke-width={1.3} />
    </svg>
  );
}

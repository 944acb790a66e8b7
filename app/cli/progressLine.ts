import type { Progress } from '../host/contract.js';
import type { CliIo } from './io.js';

/** One line on standard error that is written over; nothing when nobody watches. */
export function progressLine({ err, watched }: Pick<CliIo, 'err' | 'watched'>): {
  readonly show: (progress: Progress) => void;
  readonly clear: () => void;
} {
  let width = 0;
  return {
    show({ text }) {
      if (!watched) return;
      const padded = text.padEnd(width);
      width = text.length;
      err(`\r${padded}`);
    },
    clear() {
      if (width === 0) return;
      err(`\r${' '.repeat(width)}\r`);
      width = 0;
    },
  };
}

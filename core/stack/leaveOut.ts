import type { Finding } from '../result.js';
import type { LeftOut } from './stack.js';

/** Gathers files that are left out, each reason of a file once however many of its frames it concerns. */
export interface LeaveOut {
  add(file: string, reason: Finding): void;
  all(): readonly LeftOut[];
}

export function createLeaveOut(): LeaveOut {
  const entries = new Map<string, LeftOut>();
  return {
    add(file, { code, text }) {
      entries.set(JSON.stringify([file, code, text]), { file, code, text });
    },
    all: () => [...entries.values()],
  };
}

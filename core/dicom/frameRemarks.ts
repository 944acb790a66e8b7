import { type Finding, type Result, refuse } from '../result.js';

/** Gathers why frames of one file are left out. */
export interface FrameRemarks {
  /** @param frame from 0 */
  add(frame: number, remark: Finding): void;
  /** One finding a reason, its frames named before it, counted from 1 as DICOM does. */
  findings(): readonly Finding[];
  /** The first reason as a refusal of the whole file; undefined when there is none. */
  refusal(): Result<never> | undefined;
}

export function frameRemarks(): FrameRemarks {
  const reasons = new Map<string, { readonly remark: Finding; readonly frames: number[] }>();
  return {
    add(frame, remark) {
      const reason = reasons.get(remark.text) ?? { remark, frames: [] };
      reason.frames.push(frame + 1);
      reasons.set(remark.text, reason);
    },
    findings: () =>
      [...reasons.values()].map(({ remark, frames }) => ({
        code: remark.code,
        text: `${frames.length === 1 ? 'Frame' : 'Frames'} ${runs(frames)}: ${remark.text}`,
      })),
    refusal() {
      const [first] = reasons.values();
      return first && refuse(first.remark.code, first.remark.text);
    },
  };
}

/** '1 to 3, 7' for ascending numbers. */
function runs(numbers: readonly number[]): string {
  const parts: [number, number][] = [];
  for (const number of numbers) {
    const last = parts[parts.length - 1];
    if (last !== undefined && last[1] === number - 1) last[1] = number;
    else parts.push([number, number]);
  }
  return parts.map(([from, to]) => (from === to ? `${from}` : `${from} to ${to}`)).join(', ');
}

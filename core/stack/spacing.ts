import type { Finding } from '../result.js';

/** A distance that differs from the usual one by more than this part of it is uneven. */
const UNEVEN = 0.02;

/** Distances between neighbours along the normal and what is odd about them. */
export interface SpacingReading {
  /** The median distance, mm, of two middle ones the smaller, so that a gap never passes for it; undefined for one slice. */
  readonly sliceSpacingMm?: number;
  readonly findings: readonly Finding[];
}

/** Spacing from positions alone, never from thickness or numbers (AWKWARD row 86). @param alongMm ascending */
export function readSpacing(alongMm: readonly number[]): SpacingReading {
  const gaps = alongMm.slice(1).map((position, index) => position - (alongMm[index] ?? position));
  if (gaps.length === 0) return { findings: [] };
  const sorted = [...gaps].sort((a, b) => a - b);
  const sliceSpacingMm = sorted[(sorted.length - 1) >> 1] ?? 0;
  const findings: Finding[] = [];
  const wide = gaps.filter((gap) => gap > sliceSpacingMm * 1.5);
  if (wide.length > 0) {
    const missing = wide.reduce((sum, gap) => sum + Math.round(gap / sliceSpacingMm) - 1, 0);
    findings.push({
      code: 'missing-slices',
      text: `${wide.length === 1 ? 'A gap' : `${wide.length} gaps`} where about ${missing} slice(s) are missing.`,
    });
  }
  const uneven = gaps.some(
    (gap) =>
      gap <= sliceSpacingMm * 1.5 && Math.abs(gap - sliceSpacingMm) > UNEVEN * sliceSpacingMm,
  );
  if (uneven) {
    findings.push({
      code: 'uneven-spacing',
      text: `The distance between slices varies around ${sliceSpacingMm.toFixed(3)} mm.`,
    });
  }
  return { sliceSpacingMm, findings };
}

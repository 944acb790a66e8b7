import { gridCases } from '../evidence/stentGrid.js';
import type { Row } from '../row.js';

/** A joint fit of a stent on both kernels, processor time, median over the stents of two acquisitions. */
export async function stentFit(): Promise<Row> {
  await gridCases(50, 0, ['both']);
  const cases = [...(await gridCases(50, 1, ['both'])), ...(await gridCases(50, 2, ['both']))];
  const times = cases.map(({ timeMs }) => timeMs).sort((a, b) => a - b);
  return {
    work: 'joint fit of a stent, processor time',
    measured: times[Math.floor(times.length / 2)] ?? Number.NaN,
    unit: 'ms',
    budget: 150,
  };
}

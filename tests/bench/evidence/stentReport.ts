import {
  type Accuracy,
  bareCases,
  FITTED_ON,
  type GridCase,
  type GridSummary,
  gridCases,
  summaryOf,
} from './stentGrid.js';

/** The weights and limits were made on batch 100; the one that is run by default is another. */
const BATCH = 7;
const ACQUISITIONS = 24;
const WIRED_ACQUISITIONS = 6;
const BARE_ACQUISITIONS = 10;

/** What the fit on both kernels has to keep. */
export const STENT_LIMITS = {
  diameterMm: { median: 0.06, most95: 0.15 },
  lumenHu: { median: 20, most95: 50 },
  covered: [0.9, 0.98],
  timeMs: 150,
} as const;

/** Prints the grid of stents and the places without one. @returns whether the fit on both kernels keeps its limits */
export async function reportStents(print: (line: string) => void): Promise<boolean> {
  print(
    'Fitted stents: rings of 2.25 to 4 mm, 200 to 800 HU·mm, lumen 60 to 450 HU, tilt up to 20°',
  );
  const cases: GridCase[] = [];
  for (let index = 0; index < ACQUISITIONS; index += 1)
    cases.push(...(await gridCases(BATCH, index)));
  const both = printSummaries(cases, print);
  const times = cases.map(({ timeMs }) => timeMs).sort((a, b) => a - b);
  const timeMs = times[Math.floor(times.length / 2)] ?? Number.NaN;
  print(`    ${timeMs.toFixed(0)} ms of processor a fit on both (median)`);
  printJointGain(cases, print);
  print('  struts that are 8 to 16 wires');
  const wired: GridCase[] = [];
  for (let index = 0; index < WIRED_ACQUISITIONS; index += 1)
    wired.push(...(await gridCases(BATCH, 100 + index, FITTED_ON, true)));
  const bothOfWires = printSummaries(wired, print);
  let [places, given] = [0, 0];
  const refused: Record<string, number> = {};
  for (let index = 0; index < BARE_ACQUISITIONS; index += 1)
    for (const { kind, fit } of await bareCases(BATCH, index)) {
      places += 1;
      if (fit.reason !== undefined) {
        refused[fit.reason.code] = (refused[fit.reason.code] ?? 0) + 1;
        continue;
      }
      given += 1;
      print(`    a value was given to: ${kind}`);
    }
  print(`  ${places} places without a stent: ${given} values; refused: ${reasons(refused)}`);
  const isKept =
    keepsLimits(both) &&
    bothOfWires.diameterMm.most95 < STENT_LIMITS.diameterMm.most95 &&
    bothOfWires.lumenHu.most95 < WIRED_LUMEN_HU &&
    timeMs < STENT_LIMITS.timeMs &&
    given === 0;
  print(
    isKept
      ? 'kept: accuracy, coverage, time and refusals'
      : 'MISSED: accuracy, coverage, time or refusals',
  );
  return isKept;
}

/** Lumens inside wires may be wrong by this, HU. */
const WIRED_LUMEN_HU = 60;

/** Prints what the fits on each came to. @returns that of both */
function printSummaries(cases: readonly GridCase[], print: (line: string) => void): GridSummary {
  for (const side of FITTED_ON) {
    const summary = summaryOf(cases, side);
    print(
      `  ${side.padEnd(5)} ${summary.fits} of ${cases.length} fitted, refused: ${reasons(summary.refused)}`,
    );
    print(`    diameter ${line(summary.diameterMm, 'mm', 3)}`);
    print(`    lumen    ${line(summary.lumenHu, 'HU', 1)}`);
  }
  return summaryOf(cases, 'both');
}

/** Whether errors and coverage keep the limits. */
export function keepsLimits({ diameterMm, lumenHu }: GridSummary): boolean {
  const [least, most] = STENT_LIMITS.covered;
  const keeps = (accuracy: Accuracy, limits: { median: number; most95: number }): boolean =>
    accuracy.median < limits.median &&
    accuracy.most95 < limits.most95 &&
    accuracy.covered >= least &&
    accuracy.covered <= most;
  return keeps(diameterMm, STENT_LIMITS.diameterMm) && keeps(lumenHu, STENT_LIMITS.lumenHu);
}

/** Told, not judged: where both were fitted, which has the smaller median error. */
function printJointGain(cases: readonly GridCase[], print: (line: string) => void): void {
  for (const side of ['soft', 'sharp'] as const) {
    const shared = cases.filter(
      ({ fits }) => fits.both?.reason === undefined && fits[side]?.reason === undefined,
    );
    const [joint, single] = [summaryOf(shared, 'both'), summaryOf(shared, side)];
    print(
      `  median error on both and on ${side} alone, ${shared.length} stents that each could fit: ${joint.diameterMm.median.toFixed(4)} and ${single.diameterMm.median.toFixed(4)} mm, ${joint.lumenHu.median.toFixed(1)} and ${single.lumenHu.median.toFixed(1)} HU`,
    );
  }
}

function line(accuracy: Accuracy, unit: string, digits: number): string {
  const { median, most95, covered, coveredByRefits } = accuracy;
  return `median error ${median.toFixed(digits)} ${unit}, 95 % under ${most95.toFixed(digits)} ${unit}; covered ${percent(covered)} (by refits ${percent(coveredByRefits)})`;
}

function percent(part: number): string {
  return `${(100 * part).toFixed(0)} %`;
}

function reasons(refused: Readonly<Record<string, number>>): string {
  const all = Object.entries(refused).map(([code, count]) => `${count} ${code}`);
  return all.length === 0 ? 'none' : all.join(', ');
}

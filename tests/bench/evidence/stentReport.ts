import type { Accuracy, GridSummary } from './stentAccuracy.js';
import { type StentEvidence, type StentPart, stentEvidence } from './stentEvidence.js';
import { gainInWords } from './stentJoint.js';
import { percent, reasonsInWords, rowInMarkdown, STENT_TABLE_HEAD } from './stentTable.js';

/** What the fit on both kernels has to keep. */
export const STENT_LIMITS = {
  diameterMm: { median: 0.06, most95: 0.15 },
  lumenHu: { median: 20, most95: 50 },
  covered: [0.9, 0.98],
  timeMs: 150,
} as const;
/** Lumens inside wires may be wrong by this, HU. */
const WIRED_LUMEN_HU = 60;

type Print = (line: string) => void;

/** Runs and prints all parts. @returns whether the fit on both kernels keeps its limits */
export async function reportStents(print: Print): Promise<boolean> {
  return printEvidence(await stentEvidence(), print);
}

/** Prints tables for Markdown, with what belongs to each below it. @returns whether the fit on both kernels keeps its limits */
export function printEvidence(evidence: StentEvidence, print: Print): boolean {
  print(
    'Stents of 2.25 to 4 mm, 200 to 800 HU·mm, lumen 60 to 450 HU, three pairs of kernels, five-fold dose, starts off the axis',
  );
  const { rings, wires, leaning, cuts, iterative, bare, timeMs, gain } = evidence;
  printPart(rings, print);
  print(
    `  refits cover ${percent(rings.both.diameterMm.coveredByRefits)} and ${percent(rings.both.lumenHu.coveredByRefits)}; ${timeMs.toFixed(0)} ms of processor a fit on both (median)`,
  );
  print(gainInWords('soft', gain.soft));
  print(gainInWords('sharp', gain.sharp));
  print(gainInWords('sharp', evidence.gainWithTrueWindows).replace('both', 'true windows: both'));
  for (const part of [wires, leaning]) printPart(part, print);
  if (cuts === undefined) print('\noblique cuts: not run, numpy and scipy are not installed');
  else printPart(cuts, print);
  printPart(iterative, print);
  print('');
  print(
    `${bare.places} places without a stent: ${bare.given.length} values; refused: ${reasonsInWords(bare.refused)}`,
  );
  for (const kind of bare.given) print(`  a value was given to: ${kind}`);
  const isKept = keepsAll(evidence);
  print(
    isKept
      ? 'kept: accuracy, coverage, time and refusals'
      : 'MISSED: accuracy, coverage, time or refusals',
  );
  return isKept;
}

function printPart({ title, rows, both }: StentPart, print: Print): void {
  print('');
  print(title);
  for (const line of [...STENT_TABLE_HEAD, ...rows.map(rowInMarkdown)]) print(line);
  print(`  refused on both: ${reasonsInWords(both.refused)}`);
}

function keepsAll({ rings, wires, cuts, iterative, bare, timeMs }: StentEvidence): boolean {
  return (
    keepsLimits(rings.both) &&
    wires.both.diameterMm.most95 < STENT_LIMITS.diameterMm.most95 &&
    wires.both.lumenHu.most95 < WIRED_LUMEN_HU &&
    (cuts === undefined ||
      (cuts.both.diameterMm.most95 < STENT_LIMITS.diameterMm.most95 &&
        cuts.both.lumenHu.most95 < STENT_LIMITS.lumenHu.most95)) &&
    isRefusedOrCovered(iterative.both) &&
    bare.given.length === 0 &&
    timeMs < STENT_LIMITS.timeMs
  );
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

/** Images that are not linear: no value, or one whose error is wide enough. */
function isRefusedOrCovered({ fits, diameterMm, lumenHu }: GridSummary): boolean {
  const [least] = STENT_LIMITS.covered;
  return fits === 0 || (diameterMm.covered >= least && lumenHu.covered >= least);
}

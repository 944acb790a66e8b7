import { iterativeCases } from './iterativeCases.js';
import { obliqueFits } from './obliqueFits.js';
import { type GridSummary, summaryOf } from './stentAccuracy.js';
import { bareCases, type FittedOn, type GridCase, type GridScene, gridCases } from './stentGrid.js';
import { gainWithTrueWindows, type JointGain, jointGain } from './stentJoint.js';
import { fittedRow, type StentRow, stentRows } from './stentTable.js';

/** The weights and limits were made on batch 100, the search for windows on 41; what is run by default is another. */
const BATCH = 7;
const ACQUISITIONS = 24;
const WIRED_ACQUISITIONS = 6;
const LEANING_ACQUISITIONS = 6;
const ITERATIVE_ACQUISITIONS = 4;
const BARE_ACQUISITIONS = 10;
const TRUE_WINDOW_ACQUISITIONS = 12;

/** Some stents, read in several ways. */
export interface StentPart {
  readonly title: string;
  readonly rows: readonly StentRow[];
  /** Of the fit on both kernels. */
  readonly both: GridSummary;
}

/** Places without a stent. */
export interface BarePart {
  readonly places: number;
  /** What lay at places that were given a value. */
  readonly given: readonly string[];
  readonly refused: Readonly<Record<string, number>>;
}

/** All that the fitted stent is judged by. */
export interface StentEvidence {
  readonly rings: StentPart;
  readonly wires: StentPart;
  /** Beyond the tilt at which values are promised, fitted on the slices. */
  readonly leaning: StentPart;
  /** On oblique cuts; not there where the programs that make the volumes are not installed. */
  readonly cuts: StentPart | undefined;
  readonly iterative: StentPart;
  readonly bare: BarePart;
  /** Median processor time of a fit on both kernels. */
  readonly timeMs: number;
  readonly gain: Readonly<Record<'soft' | 'sharp', JointGain>>;
  readonly gainWithTrueWindows: JointGain;
}

/** Runs all parts, one after the other: about eight minutes. */
export async function stentEvidence(): Promise<StentEvidence> {
  const rings = await casesFor(ACQUISITIONS, 0);
  const times = rings.map(({ timeMs }) => timeMs).sort((a, b) => a - b);
  const wires = await casesFor(WIRED_ACQUISITIONS, 100, undefined, { areWires: true });
  const leaning = await casesFor(LEANING_ACQUISITIONS, 200, ['both'], { tiltDeg: [20, 45] });
  const cuts = await obliqueFits();
  const iterative: GridCase[] = [];
  for (let index = 0; index < ITERATIVE_ACQUISITIONS; index += 1)
    iterative.push(...(await iterativeCases(BATCH, index)));
  return {
    rings: partOf('rings, tilt up to 20°', rings),
    wires: partOf('struts that are 8 to 16 wires, tilt up to 20°', wires),
    leaning: partOf('rings, tilt 20 to 45°, on the slices', leaning, ['both']),
    cuts: cuts && {
      title: 'tilt 30 to 65°, on oblique cuts of volumes made by numpy',
      rows: [fittedRow('fitted, both', cuts, 'both')],
      both: summaryOf(cuts, 'both'),
    },
    iterative: partOf('algebraic reconstruction with edge-preserving smoothing', iterative, [
      'both',
    ]),
    bare: await barePart(),
    timeMs: times[Math.floor(times.length / 2)] ?? Number.NaN,
    gain: { soft: jointGain(rings, 'soft'), sharp: jointGain(rings, 'sharp') },
    gainWithTrueWindows: await gainWithTrueWindows(BATCH, TRUE_WINDOW_ACQUISITIONS),
  };
}

function partOf(
  title: string,
  cases: readonly GridCase[],
  fittedOn?: readonly FittedOn[],
): StentPart {
  return { title, rows: stentRows(cases, fittedOn), both: summaryOf(cases, 'both') };
}

async function casesFor(
  acquisitions: number,
  first: number,
  fittedOn?: readonly FittedOn[],
  scene?: GridScene,
): Promise<readonly GridCase[]> {
  const cases: GridCase[] = [];
  for (let index = 0; index < acquisitions; index += 1)
    cases.push(...(await gridCases(BATCH, first + index, fittedOn, scene)));
  return cases;
}

async function barePart(): Promise<BarePart> {
  const given: string[] = [];
  const refused: Record<string, number> = {};
  let places = 0;
  for (let index = 0; index < BARE_ACQUISITIONS; index += 1)
    for (const { kind, fit } of await bareCases(BATCH, index)) {
      places += 1;
      if (fit.reason === undefined) given.push(kind);
      else refused[fit.reason.code] = (refused[fit.reason.code] ?? 0) + 1;
    }
  return { places, given, refused };
}

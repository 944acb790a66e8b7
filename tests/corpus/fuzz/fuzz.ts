import fc from 'fast-check';
import type { Codecs } from '../../../core/dicom/index.js';
import { ROWS } from '../rows/index.js';
import { type Damage, damage, wounded } from './damage.js';
import { type Outcome, outcomeOf } from './outcome.js';

/** A run over the whole corpus: how many cases came to what, and the slowest of them. */
export interface FuzzReport {
  readonly cases: number;
  readonly outcomes: Readonly<Record<Outcome, number>>;
  readonly slowestMs: number;
  /** Growth of the process's memory over the run, MB. */
  readonly grownMb: number;
}

/** A case that takes longer hangs; the machine may be busy, so this is far above what any takes. */
const CASE_MS_AT_MOST = 3000;

/** Larger files of the corpus stand for their size alone and would fill the run with copying. */
const FILE_BYTES_AT_MOST = 1 << 20;

/** The corpus's files, each once. */
export function corpusFiles(): readonly { readonly name: string; readonly bytes: Uint8Array }[] {
  return ROWS.flatMap(({ row, cases }) =>
    cases.flatMap((one) =>
      Object.entries(one.build()).map(([path, bytes]) => ({
        name: `row ${row}, ${one.name}, ${path}`,
        bytes,
      })),
    ),
  ).filter(({ bytes }) => bytes.length > 0 && bytes.length <= FILE_BYTES_AT_MOST);
}

/**
 * Wounds files of the corpus and reads them. Throws with the file and the wounds at the first case that comes to
 * anything but READ, SKIP or REFUSE, or that hangs. The same seed gives the same cases.
 */
export async function fuzz(cases: number, seed: number, codecs: Codecs): Promise<FuzzReport> {
  const files = corpusFiles();
  const drawn = fc.sample(
    fc.tuple(fc.nat(files.length - 1), fc.array(damage, { minLength: 1, maxLength: 4 })),
    { seed, numRuns: cases },
  );
  const outcomes: Record<Outcome, number> = { READ: 0, SKIP: 0, REFUSE: 0 };
  const before = process.memoryUsage().rss;
  let slowestMs = 0;
  for (const [index, wounds] of drawn) {
    const file = files[index];
    if (file === undefined) throw new RangeError(`no file: ${index}`);
    const start = performance.now();
    outcomes[await judged(file.name, wounded(file.bytes, wounds), wounds, codecs)]++;
    const took = performance.now() - start;
    slowestMs = Math.max(slowestMs, took);
    if (took > CASE_MS_AT_MOST) {
      throw new Error(`${file.name} took ${took.toFixed(0)} ms with ${describeWounds(wounds)}`);
    }
  }
  const grownMb = (process.memoryUsage().rss - before) / 2 ** 20;
  return { cases, outcomes, slowestMs, grownMb };
}

async function judged(
  name: string,
  bytes: Uint8Array,
  wounds: readonly Damage[],
  codecs: Codecs,
): Promise<Outcome> {
  try {
    return await outcomeOf(bytes, codecs);
  } catch (cause) {
    throw new Error(`${name} with ${describeWounds(wounds)}: ${String(cause)}`, { cause });
  }
}

function describeWounds(wounds: readonly Damage[]): string {
  return JSON.stringify(wounds, (_, value) => (value instanceof Uint8Array ? [...value] : value));
}

/** A run in words. */
export function fuzzInWords({ cases, outcomes, slowestMs, grownMb }: FuzzReport): string {
  const { READ, SKIP, REFUSE } = outcomes;
  return `${cases} damaged files: ${READ} read, ${SKIP} skipped, ${REFUSE} refused, 0 otherwise; slowest ${slowestMs.toFixed(0)} ms, memory grown by ${grownMb.toFixed(0)} MB`;
}

import { availableParallelism } from 'node:os';
import { fileURLToPath } from 'node:url';
import { isMainThread, parentPort, Worker, workerData } from 'node:worker_threads';
import { evidenceCases } from './evidence/cases.js';
import { reportEdges } from './evidence/edgeReport.js';
import { type JudgedCase, judgeCase } from './evidence/judge.js';
import { reportObserver } from './evidence/observerReport.js';
import type { ProjectionCache } from './evidence/phantomPair.js';
import { SHARPNESS_BUDGET_MS, sharpnessTimeMs } from './evidence/sharpnessTime.js';
import { reportStandardError } from './evidence/standardErrorReport.js';
import { reportStents } from './evidence/stentReport.js';

const SCENES = 4;

/** What one thread is asked for: the cases of one scene, each or some of them. */
interface Task {
  readonly scene: number;
  readonly batch: number;
  readonly every: number;
}

/** All cases of one scene, so that its projections are made once and only they are kept. */
async function judgeScene(
  { scene, batch, every }: Task,
  tell: (one: JudgedCase) => void,
): Promise<void> {
  const cases = evidenceCases(batch)
    .filter(({ recipe }) => recipe.scene === scene)
    .filter((_, index) => index % every === 0);
  for (const blur of new Set(cases.map(({ recipe }) => recipe.blurSigmaMm))) {
    const cache: ProjectionCache = new Map();
    for (const one of cases) if (one.recipe.blurSigmaMm === blur) tell(await judgeCase(one, cache));
  }
}

/** Scenes shared among as many threads as the machine has. */
async function judgeAll(
  batch: number,
  every: number,
  tell: (one: JudgedCase) => void,
): Promise<void> {
  const waiting = Array.from({ length: SCENES }, (_, scene): Task => ({ scene, batch, every }));
  const thread = async (): Promise<void> => {
    for (let task = waiting.shift(); task !== undefined; task = waiting.shift()) {
      const worker = new Worker(fileURLToPath(import.meta.url), { workerData: task });
      worker.on('message', tell);
      await new Promise<void>((resolve, reject) => {
        worker.once('error', reject);
        worker.once('exit', (code) =>
          code === 0 ? resolve() : reject(new Error(`a thread ended with ${code}`)),
        );
      });
    }
  };
  await Promise.all(Array.from({ length: Math.min(SCENES, availableParallelism()) }, thread));
}

function report(all: readonly JudgedCase[]): void {
  const count = (group: string, judgement: JudgedCase['judgement']): number =>
    all.filter((one) => one.group === group && one.judgement === judgement).length;
  process.stdout.write('Sharpness order of synthetic pairs: right, undecided, wrong\n');
  for (const group of [...new Set(all.map((one) => one.group))].sort()) {
    const counts = (['right', 'undecided', 'wrong'] as const).map((one) => count(group, one));
    process.stdout.write(
      `  ${group.padEnd(20)} ${counts.map((n) => `${n}`.padStart(4)).join('')}\n`,
    );
  }
  const wrong = all.filter((one) => one.judgement === 'wrong');
  for (const { line } of wrong) process.stdout.write(`${line}\n`);
  process.stdout.write(wrong.length === 0 ? 'kept: none is wrong\n' : 'MISSED: some are wrong\n');
  process.exitCode = wrong.length === 0 ? 0 : 1;
}

/** A whole number after its name on the command line: --batch 3. */
function option(name: string, otherwise: number): number {
  const at = process.argv.indexOf(name);
  const value = at < 0 ? otherwise : Number(process.argv[at + 1]);
  if (!Number.isInteger(value)) throw new RangeError(`invalid ${name}: ${process.argv[at + 1]}`);
  return value;
}

// npm run evidence -- --each prints every case; --batch 3 makes others; --every 5 takes a fifth of them.
if (isMainThread) {
  const all: JudgedCase[] = [];
  const wordy = process.argv.includes('--each');
  await judgeAll(option('--batch', 1), option('--every', 1), (one) => {
    all.push(one);
    if (wordy) process.stdout.write(`${one.line}\n`);
  });
  report(all);
  // When the threads are done: they would be measured with it.
  const time = await sharpnessTimeMs();
  process.stdout.write(
    `${time <= SHARPNESS_BUDGET_MS ? 'kept' : 'MISSED'}: ${time.toFixed(0)} ms a pair at 512², five heights, budget ${SHARPNESS_BUDGET_MS} ms\n`,
  );
  const isCovered = await reportStandardError((line) => process.stdout.write(`${line}\n`));
  if (!isCovered) process.exitCode = 1;
  const isSeen = await reportObserver((line) => process.stdout.write(`${line}\n`));
  if (!isSeen) process.exitCode = 1;
  const isFlagged = await reportEdges((line) => process.stdout.write(`${line}\n`));
  if (!isFlagged) process.exitCode = 1;
  const isFitted = await reportStents((line) => process.stdout.write(`${line}\n`));
  if (!isFitted) process.exitCode = 1;
} else {
  await judgeScene(workerData as Task, (one) => parentPort?.postMessage(one));
}

import { spawnSync } from 'node:child_process';
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

function report(all: readonly JudgedCase[]): boolean {
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
  return wrong.length === 0;
}

/** A whole number after its name on the command line: --batch 3. */
function option(name: string, otherwise: number): number {
  const at = process.argv.indexOf(name);
  const value = at < 0 ? otherwise : Number(process.argv[at + 1]);
  if (!Number.isInteger(value)) throw new RangeError(`invalid ${name}: ${process.argv[at + 1]}`);
  return value;
}

const print = (line: string): void => {
  process.stdout.write(`${line}\n`);
};

/** All parts by their names. Each says whether it keeps what it has to keep. */
const PARTS: Readonly<Record<string, () => Promise<boolean>>> = {
  sharpness: async () => {
    const all: JudgedCase[] = [];
    const wordy = process.argv.includes('--each');
    await judgeAll(option('--batch', 1), option('--every', 1), (one) => {
      all.push(one);
      if (wordy) print(one.line);
    });
    const isRight = report(all);
    // When the threads are done: they would be measured with it.
    const time = await sharpnessTimeMs();
    const isQuick = time <= SHARPNESS_BUDGET_MS;
    print(
      `${isQuick ? 'kept' : 'MISSED'}: ${time.toFixed(0)} ms a pair at 512², five heights, budget ${SHARPNESS_BUDGET_MS} ms`,
    );
    return isRight && isQuick;
  },
  standardError: () => reportStandardError(print),
  observer: () => reportObserver(print),
  edges: () => reportEdges(print),
  stents: () => reportStents(print),
  kills: async () => {
    const test = 'tests/unit/app/host/notes/killedWriter.test.ts';
    const run = spawnSync(
      process.execPath,
      ['node_modules/vitest/vitest.mjs', 'run', '--config', 'tests/vitest.config.ts', test],
      { env: { ...process.env, DIPTYCH_KILLS: '500' }, stdio: 'inherit' },
    );
    return run.status === 0;
  },
};

// npm run evidence -- stents runs a part alone; --each prints every case of the sharpness order, --batch 3 makes others, --every 5
// takes a fifth of them.
if (isMainThread) {
  const named = process.argv.slice(2).filter((word) => word in PARTS);
  for (const [name, part] of Object.entries(PARTS))
    if ((named.length === 0 || named.includes(name)) && !(await part())) process.exitCode = 1;
} else {
  await judgeScene(workerData as Task, (one) => parentPort?.postMessage(one));
}

// npm test: installs what it needs, then types, lint, build, unit, reference and browser tests.
// npm run quick: types, lint and unit tests only. Closes with one line "N passed, N failed".
import { mkdirSync, readFileSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { ensureBuilt } from '../app/launch/builder.mjs';
import { ensurePackages } from '../app/launch/packages.mjs';
import { ROOT, runPackage, say } from '../app/launch/project.mjs';
import { ensureReferenceTools } from '../app/launch/systemTools.mjs';

const quick = process.argv.includes('--quick');
const results = join(ROOT, 'test-results');
let passed = 0;
let failed = 0;

await ensurePackages();
if (!quick) await ensureReferenceTools();
rmSync(results, { recursive: true, force: true });
mkdirSync(results, { recursive: true });

await step('types', () => runPackage('typescript/bin/tsc', ['-b']));
await step('lint', () => runPackage('@biomejs/biome/bin/biome', ['check', '.']));
await step('build', async () => ((await ensureBuilt()) ? 0 : 1));
await suite(
  'unit and reference tests',
  () =>
    runPackage('vitest/vitest.mjs', [
      'run',
      '--config',
      'tests/vitest.config.ts',
      '--reporter=default',
      '--reporter=json',
      `--outputFile.json=${join(results, 'vitest.json')}`,
      ...(quick ? ['tests/unit'] : []),
    ]),
  () => {
    const report = readReport('vitest.json');
    return { passed: report.numPassedTests, failed: report.numFailedTests };
  },
);
if (!quick) {
  await suite(
    'browser tests',
    () => runPackage('@playwright/test/cli.js', ['test', '--config', 'tests/playwright.config.ts']),
    () => {
      const { stats } = readReport('playwright.json');
      return { passed: stats.expected, failed: stats.unexpected + stats.flaky };
    },
  );
}

process.stdout.write(`${passed} passed, ${failed} failed\n`);
process.exit(failed > 0 ? 1 : 0);

async function step(name, work) {
  say(`— ${name}`);
  const code = await work().catch((error) => {
    say(String(error));
    return 1;
  });
  if (code === 0) passed++;
  else failed++;
}

/** Runs a test runner and counts its tests; a runner that fails with no failed test counts as one. */
async function suite(name, work, count) {
  say(`— ${name}`);
  const code = await work();
  let counted;
  try {
    counted = count();
  } catch (error) {
    say(`${name}: no report: ${error.message}`);
    counted = { passed: 0, failed: 1 };
  }
  passed += counted.passed;
  failed += code !== 0 && counted.failed === 0 ? 1 : counted.failed;
}

function readReport(name) {
  return JSON.parse(readFileSync(join(results, name), 'utf8'));
}

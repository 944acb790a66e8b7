// npm run bench: the rows of the budget table. npm run evidence: the larger grids of cases.
import { ensureBuilt } from '../../app/launch/builder.mjs';
import { ensurePackages } from '../../app/launch/packages.mjs';
import { runPackage } from '../../app/launch/project.mjs';
import { ensureReferenceTools } from '../../app/launch/systemTools.mjs';

await ensurePackages();
await ensureReferenceTools();
if (!(await ensureBuilt())) process.exit(2);
const built = await runPackage('vite/bin/vite.js', [
  'build',
  '--config',
  'tests/bench/vite.config.ts',
  '--logLevel',
  'warn',
]);
if (built !== 0) process.exit(2);
const program = process.argv.includes('--evidence') ? 'evidence' : 'bench';
await import(new URL(`../../dist/bench/${program}.js`, import.meta.url).href);

// The command line: npm run -s diptych -- VERB …
import { ensureBuilt } from './builder.mjs';
import { ensurePackages } from './packages.mjs';

await ensurePackages();
if (!(await ensureBuilt())) process.exit(2);
await import(new URL('../../dist/app/cli.js', import.meta.url).href);

import { ensureBuilt } from './builder.mjs';
import { ensurePackages } from './packages.mjs';

await ensurePackages();
if (!(await ensureBuilt())) process.exit(2);

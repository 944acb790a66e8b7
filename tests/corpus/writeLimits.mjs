// Writes the table of limits into README.md from the rows in tests/corpus. Run after a change there:
// node tests/corpus/writeLimits.mjs
import { readFile, writeFile } from 'node:fs/promises';
import { runnerImport } from 'vite';

const at = (path) => new URL(path, import.meta.url);
const { module: table } = await runnerImport(at('limitsTable.ts').pathname);
const { module: registry } = await runnerImport(at('rows/index.ts').pathname);
const readme = at('../../README.md');
await writeFile(readme, table.withLimitsTable(await readFile(readme, 'utf8'), registry.ROWS));

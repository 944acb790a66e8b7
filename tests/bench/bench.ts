import { type Row, rowInWords } from './row.js';
import { backProjection } from './rows/backProjection.js';
import { decode } from './rows/decode.js';
import { firstImage } from './rows/firstImage.js';
import { folderIndex } from './rows/folderIndex.js';
import { linkedScroll } from './rows/linkedScroll.js';
import { memory } from './rows/memory.js';
import { obliqueCut } from './rows/obliqueCut.js';
import { regionStatistics } from './rows/regionStatistics.js';
import { stentFit } from './rows/stentFit.js';
import { windowMapping } from './rows/windowMapping.js';

const BENCHMARKS: readonly (() => Promise<Row | readonly Row[]>)[] = [
  windowMapping,
  regionStatistics,
  obliqueCut,
  stentFit,
  backProjection,
  folderIndex,
  firstImage,
  memory,
  decode,
  linkedScroll,
];

// Named ones alone: npm run bench -- linkedScroll
const named = process.argv.slice(2).filter((argument) => !argument.startsWith('-'));
const chosen = BENCHMARKS.filter(({ name }) => named.length === 0 || named.includes(name));

// One after the other: two at once would measure each other.
for (const benchmark of chosen) {
  const rows = await benchmark();
  for (const row of [rows].flat()) process.stdout.write(`${rowInWords(row)}\n`);
}

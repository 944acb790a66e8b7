import type { CorpusRow } from '../row.js';
import { CHARACTER_SET_ROWS } from './characterSets.js';
import { CONTAINER_ROWS } from './container.js';
import { ENCODING_ROWS } from './encoding.js';
import { FOLDER_ROWS } from './folder.js';
import { FRAMES_AND_FRAGMENTS } from './framesAndFragments.js';
import { LENGTH_ROWS } from './lengths.js';
import { NUMBER_ROWS } from './numbers.js';
import { REPRESENTATION_ROWS } from './representations.js';
import { SEQUENCE_ROWS } from './sequences.js';
import { SERIES } from './series.js';
import { STORED_PIXELS } from './storedPixels.js';
import { TEXT_ROWS } from './text.js';

/** Every awkward input that the reader knows, ascending by row. Sections A to C, then D and E. */
export const ROWS: readonly CorpusRow[] = [
  ...FOLDER_ROWS,
  ...CONTAINER_ROWS,
  ...ENCODING_ROWS,
  ...REPRESENTATION_ROWS,
  ...LENGTH_ROWS,
  ...SEQUENCE_ROWS,
  ...CHARACTER_SET_ROWS,
  ...TEXT_ROWS,
  ...NUMBER_ROWS,
  ...STORED_PIXELS,
  ...FRAMES_AND_FRAGMENTS,
  ...SERIES,
].sort((a, b) => a.row - b.row);

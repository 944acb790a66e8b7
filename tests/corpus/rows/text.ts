import { concat, hex, latin1 } from '../rawBytes.js';
import type { CorpusRow } from '../row.js';
import { nameCase } from './nameCase.js';

/** A name that would do harm if it were markup, hidden characters and all. */
export const HARMFUL_NAME = '<script>alert(1)</script>^\u202eevil\u202c';

/** Section C, texts: rows 44 and 45. */
export const TEXT_ROWS: readonly CorpusRow[] = [
  {
    // Electron's security guide (script in a page is privilege)
    row: 44,
    section: 'C',
    title: 'Name with HTML, control, bidi or NUL characters',
    outcome: 'read and shown as text; hidden characters are made visible; exports escape it',
    cases: [
      nameCase('markup and bidirectional marks', {
        set: 'ISO_IR 192',
        bytes: new TextEncoder().encode(HARMFUL_NAME),
        name: HARMFUL_NAME,
      }),
      nameCase('NUL and control characters inside', {
        bytes: latin1('A\0B\x07^C\x7f'),
        name: 'A\0B\x07^C\x7f',
      }),
      nameCase('a formula', { bytes: latin1('=1+1'), name: '=1+1' }),
    ],
  },
  {
    // dcmjs-org/dcmjs 130; fo-dicom/fo-dicom 457
    row: 45,
    section: 'C',
    title: 'NUL-padded strings',
    outcome: 'read, trimmed',
    cases: [
      nameCase('NUL', { bytes: latin1('Corpus^Nul\0\0\0'), name: 'Corpus^Nul' }),
      nameCase('blanks and NUL mixed', {
        bytes: latin1('Corpus^Nul \0 '),
        name: 'Corpus^Nul',
      }),
      nameCase('NUL behind another set', {
        set: '\\ISO 2022 IR 87',
        bytes: concat(hex('1b 24 42 3b 33 45 44 1b 28 42'), [0, 0]),
        name: '山田',
      }),
    ],
  },
];

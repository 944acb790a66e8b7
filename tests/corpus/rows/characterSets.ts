import { hex, latin1 } from '../rawBytes.js';
import type { CorpusRow } from '../row.js';
import { EXTENDED_NAMES } from './extendedNames.js';
import { nameCase } from './nameCase.js';
import { nestedKernel } from './nestedKernel.js';

const MUELLER = latin1('M\u00fcller^Synthetic');
const MUELLER_UTF8 = hex('4d c3 bc 6c 6c 65 72');

/** Section C, character sets: rows 38 to 43. */
export const CHARACTER_SET_ROWS: readonly CorpusRow[] = [
  {
    // pydicom/pydicom 279, 716; dcm4che/dcm4che 1503; fo-dicom/fo-dicom 1805; PS3.5 6.1.2.5.3
    row: 38,
    section: 'C',
    title: 'ISO 2022 multi-valued sets, escapes, reset at ^ and =',
    outcome: 'read',
    cases: [
      ...EXTENDED_NAMES.map(({ title, set, bytes, name }) =>
        nameCase(title, { set, bytes: hex(bytes), name }),
      ),
      nameCase('a set is forgotten at ^', {
        verdict: 'READ+',
        code: 'text-unreadable',
        set: '\\ISO 2022 IR 149',
        bytes: hex('1b 24 29 43 fb f3 5e d1 ce'),
        name: '洪^\ufffd\ufffd',
      }),
    ] as unknown as CorpusRow['cases'],
  },
  {
    // pydicom/pydicom 736, 850; pydicom/pynetdicom 201
    row: 39,
    section: 'C',
    title: 'Misspelt set ("ISO IR 192", "ISO_2022_IR_6")',
    outcome: 'read with a finding, as the term that it must mean',
    cases: [
      ...['ISO IR 192', 'ISO_IR_192', 'ISO-IR 192', 'iso_ir 192', 'UTF-8'].map((set) =>
        nameCase(set, {
          verdict: 'READ+',
          code: 'character-set-misspelt',
          set,
          bytes: MUELLER_UTF8,
          name: 'Müller',
        }),
      ),
      nameCase('ISO IR 100', {
        verdict: 'READ+',
        code: 'character-set-misspelt',
        set: 'ISO IR 100',
        bytes: MUELLER,
        name: 'Müller^Synthetic',
      }),
      nameCase('ISO_2022_IR_6 with ISO 2022 IR 87', {
        verdict: 'READ+',
        code: 'character-set-misspelt',
        set: 'ISO_2022_IR_6\\ISO 2022 IR 87',
        bytes: hex('59 3d 1b 24 42 3b 33 45 44 1b 28 42'),
        name: 'Y=山田',
      }),
      nameCase('ISO_IR 100 among several', {
        verdict: 'READ+',
        code: 'character-set-misspelt',
        set: 'ISO_IR 100\\ISO_IR 144',
        bytes: hex('4d fc 5e 1b 2d 4c bc'),
        name: 'Mü^М',
      }),
    ] as unknown as CorpusRow['cases'],
  },
  {
    // pydicom/pydicom 716; PS3.3 C.12.1.1.2
    row: 40,
    section: 'C',
    title: 'UTF-8/GB18030/GBK listed with others (not allowed)',
    outcome: 'read with a finding; of those that may not stand together the first is used',
    cases: [
      nameCase('UTF-8 first', {
        verdict: 'READ+',
        code: 'character-set-not-alone',
        set: 'ISO_IR 192\\ISO 2022 IR 100',
        bytes: MUELLER_UTF8,
        name: 'Müller',
      }),
      nameCase('GB18030 first', {
        verdict: 'READ+',
        code: 'character-set-not-alone',
        set: 'GB18030\\ISO 2022 IR 58',
        bytes: hex('cd f5 5e d0 a1 b6 ab'),
        name: '王^小东',
      }),
      nameCase('GBK first', {
        verdict: 'READ+',
        code: 'character-set-not-alone',
        set: 'GBK\\ISO_IR 192',
        bytes: hex('cd f5 5e d0 a1 b6 ab'),
        name: '王^小东',
      }),
      nameCase('UTF-8 second', {
        verdict: 'READ+',
        code: 'character-set-not-alone',
        set: 'ISO 2022 IR 100\\ISO_IR 192',
        bytes: MUELLER,
        name: 'Müller^Synthetic',
      }),
    ],
  },
  {
    // cornerstonejs/dicomParser 89
    row: 41,
    section: 'C',
    title: 'Mislabelled (GBK bytes, ISO_IR 100)',
    outcome:
      'read as labelled; nothing is guessed from the text. The reader can have texts read in another set, and a finding says so',
    cases: [
      nameCase('GBK as ISO_IR 100', {
        set: 'ISO_IR 100',
        bytes: hex('cd f5 5e d0 a1 b6 ab'),
        name: 'Íõ^Ð¡¶«',
      }),
      nameCase('UTF-8 as ISO_IR 100, each byte a character of its own', {
        set: 'ISO_IR 100',
        bytes: hex('4d c3 bc c3 9f'),
        name: 'MÃ¼Ã\u009f',
      }),
      nameCase('ISO 8859-1 without a label', {
        verdict: 'READ+',
        code: 'text-unreadable',
        bytes: MUELLER,
        name: 'M\ufffdller^Synthetic',
      }),
      nameCase('ISO 8859-1 as UTF-8', {
        verdict: 'READ+',
        code: 'text-unreadable',
        set: 'ISO_IR 192',
        bytes: MUELLER,
        name: 'M\ufffdller^Synthetic',
      }),
    ],
  },
  {
    // dcmjs-org/dcmjs 454
    row: 42,
    section: 'C',
    title: 'Character set changes in a nested item',
    outcome: 'read; an item has the set around it unless it has its own',
    cases: [
      nestedKernel('inherited', 'ISO_IR 100', undefined, latin1('Sch\u00e4rf')),
      nestedKernel('its own', 'ISO_IR 100', 'ISO_IR 192', hex('53 63 68 c3 a4 72 66')),
      nestedKernel('its own, of one byte', 'ISO_IR 192', 'ISO_IR 100', latin1('Sch\u00e4rf')),
    ],
  },
  {
    // dcmjs-org/dcmjs PR 298
    row: 43,
    section: 'C',
    title: 'Unknown character set',
    outcome: 'read with a finding: ASCII, and � for all else; the image is not affected',
    cases: [
      nameCase('a set of nobody’s', {
        verdict: 'READ+',
        code: 'character-set-unknown',
        set: 'ISO_IR 999',
        bytes: MUELLER,
        name: 'M\ufffdller^Synthetic',
      }),
      nameCase('no term at all', {
        verdict: 'READ+',
        code: 'character-set-unknown',
        set: 'LATIN',
        bytes: latin1('Plain^Ascii'),
        name: 'Plain^Ascii',
      }),
      nameCase('an unknown one besides a known one', {
        verdict: 'READ+',
        code: 'character-set-unknown',
        set: 'ISO 2022 IR 100\\ISO 2022 IR 999',
        bytes: MUELLER,
        name: 'Müller^Synthetic',
      }),
      nameCase('a set that is called and not listed', {
        verdict: 'READ+',
        code: 'character-set-not-listed',
        set: 'ISO 2022 IR 100',
        bytes: hex('59 3d 1b 24 42 3b 33 45 44 1b 28 42'),
        name: 'Y=山田',
      }),
      nameCase('an escape that calls nothing', {
        verdict: 'READ+',
        code: 'text-unreadable',
        set: 'ISO 2022 IR 100',
        bytes: hex('59 1b 7a 5a'),
        name: 'Y\ufffdzZ',
      }),
    ],
  },
];

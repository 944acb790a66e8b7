/** A person name with code extensions, as bytes in hexadecimal, and what it says. */
export interface ExtendedName {
  readonly title: string;
  readonly set: string;
  readonly bytes: string;
  readonly name: string;
}

/**
 * The worked examples of PS3.5, annexes H (Japanese), I (Korean), J (Unicode and GB18030) and K (GB 2312), and of
 * single-byte sets. The bytes of the annexes are quoted from memory; tests/reference checks them with pydicom.
 */
export const EXTENDED_NAMES: readonly ExtendedName[] = [
  {
    title: 'PS3.5 H.3.1, ideographic and phonetic Japanese',
    set: '\\ISO 2022 IR 87',
    bytes:
      '59 61 6d 61 64 61 5e 54 61 72 6f 75 3d 1b 24 42 3b 33 45 44 1b 28 42 5e 1b 24 42 42 40 4f 3a 1b 28 42 ' +
      '3d 1b 24 42 24 64 24 5e 24 40 1b 28 42 5e 1b 24 42 24 3f 24 6d 24 26 1b 28 42',
    name: 'Yamada^Tarou=山田^太郎=やまだ^たろう',
  },
  {
    title: 'PS3.5 H.3.2, half-width katakana first',
    set: 'ISO 2022 IR 13\\ISO 2022 IR 87',
    bytes:
      'd4 cf c0 de 5e c0 db b3 3d 1b 24 42 3b 33 45 44 1b 28 4a 5e 1b 24 42 42 40 4f 3a 1b 28 4a ' +
      '3d 1b 24 42 24 64 24 5e 24 40 1b 28 4a 5e 1b 24 42 24 3f 24 6d 24 26 1b 28 4a',
    name: 'ﾔﾏﾀﾞ^ﾀﾛｳ=山田^太郎=やまだ^たろう',
  },
  {
    title: 'PS3.5 I.2, Korean',
    set: '\\ISO 2022 IR 149',
    bytes:
      '48 6f 6e 67 5e 47 69 6c 64 6f 6e 67 3d 1b 24 29 43 fb f3 5e 1b 24 29 43 d1 ce d4 d7 ' +
      '3d 1b 24 29 43 c8 ab 5e 1b 24 29 43 b1 e6 b5 bf',
    name: 'Hong^Gildong=洪^吉洞=홍^길동',
  },
  {
    title: 'PS3.5 J.1, Chinese in UTF-8',
    set: 'ISO_IR 192',
    bytes: '57 61 6e 67 5e 58 69 61 6f 44 6f 6e 67 3d e7 8e 8b 5e e5 b0 8f e6 9d b1 3d',
    name: 'Wang^XiaoDong=王^小東=',
  },
  {
    title: 'PS3.5 J.3, Chinese in GB18030',
    set: 'GB18030',
    bytes: '57 61 6e 67 5e 58 69 61 6f 44 6f 6e 67 3d cd f5 5e d0 a1 b6 ab 3d',
    name: 'Wang^XiaoDong=王^小东=',
  },
  {
    title: 'PS3.5 K.2, Chinese in GB 2312',
    set: '\\ISO 2022 IR 58',
    bytes:
      '5a 68 61 6e 67 5e 58 69 61 6f 44 6f 6e 67 3d 1b 24 29 41 d5 c5 5e 1b 24 29 41 d0 a1 b6 ab 3d',
    name: 'Zhang^XiaoDong=张^小东=',
  },
  {
    title: 'a supplementary Japanese character, ISO 2022 IR 159',
    set: '\\ISO 2022 IR 87\\ISO 2022 IR 159',
    bytes: '41 5e 1b 24 28 44 30 21 1b 28 42 3d 1b 24 42 3b 33 1b 28 42',
    name: 'A^丂=山',
  },
  {
    title: 'Greek after French, ISO 2022 IR 100 and 126',
    set: 'ISO 2022 IR 100\\ISO 2022 IR 126',
    bytes: '42 e9 61 5e 1b 2d 46 c4 e9 ef 5e e9',
    name: 'Béa^Διο^é',
  },
  {
    title: 'Russian and Latin 2, ISO 2022 IR 144 and 101',
    set: '\\ISO 2022 IR 144\\ISO 2022 IR 101',
    bytes: '1b 2d 4c bb ee da 5e 1b 2d 42 a3 f3 64 bc',
    name: 'Люк^Łódź',
  },
  {
    title: 'ISO_IR 100',
    set: 'ISO_IR 100',
    bytes: '42 75 63 5e 4a e9 72 f4 6d 65',
    name: 'Buc^Jérôme',
  },
  { title: 'ISO_IR 101', set: 'ISO_IR 101', bytes: '57 61 b3 ea 73 61', name: 'Wałęsa' },
  { title: 'ISO_IR 109', set: 'ISO_IR 109', bytes: 'c6 ac 61', name: 'ĈĴa' },
  { title: 'ISO_IR 110', set: 'ISO_IR 110', bytes: 'aa e0 be', name: 'Ēāž' },
  { title: 'ISO_IR 144', set: 'ISO_IR 144', bytes: 'bb ee da', name: 'Люк' },
  {
    title: 'ISO_IR 127',
    set: 'ISO_IR 127',
    bytes: 'e2 c8 c7 e6 ea 5e e4 e6 d2 c7 d1',
    name: 'قباني^لنزار',
  },
  { title: 'ISO_IR 126', set: 'ISO_IR 126', bytes: 'c4 e9 ef ed', name: 'Διον' },
  {
    title: 'ISO_IR 138',
    set: 'ISO_IR 138',
    bytes: 'f9 f8 e5 ef 5e e3 e1 e5 f8 e4',
    name: 'שרון^דבורה',
  },
  {
    title: 'ISO_IR 148',
    set: 'ISO_IR 148',
    bytes: 'c7 61 76 75 fe 6f f0 6c 75',
    name: 'Çavuşoğlu',
  },
  { title: 'ISO_IR 166', set: 'ISO_IR 166', bytes: 'b9 d2 c1 ca a1 d8 c5', name: 'นามสกุล' },
  { title: 'ISO_IR 13', set: 'ISO_IR 13', bytes: 'd4 cf c0 de 5e c0 db b3', name: 'ﾔﾏﾀﾞ^ﾀﾛｳ' },
  { title: 'GBK', set: 'GBK', bytes: 'cd f5 5e d0 a1 b6 ab', name: '王^小东' },
];

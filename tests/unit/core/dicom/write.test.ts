import { describe, expect, it } from 'vitest';
import {
  decimalText,
  TRANSFER_SYNTAX,
  utf8,
  type WriteElement,
  writeDataSet,
  writeFile,
} from '../../../../core/dicom/write/index.js';

const hex = (bytes: Uint8Array): string => Buffer.from(bytes).toString('hex');
const explicitLittle = { explicitVr: true, littleEndian: true };
const explicitBig = { explicitVr: true, littleEndian: false };
const implicitLittle = { explicitVr: false, littleEndian: true };

// The layouts are those of PS3.5 tables 7.1-1, 7.1-2, 7.1-3 and 7.5-1 to 7.5-3, written out by hand.
describe('writeDataSet', () => {
  it('writes a short explicit header with a 16-bit length', () => {
    // tag 0028,0010 | VR US | length 2 | 512
    const rows: WriteElement = { tag: 0x00280010, vr: 'US', value: 512 };
    expect(hex(writeDataSet([rows], explicitLittle))).toBe('280010005553' + '0200' + '0002');
    expect(hex(writeDataSet([rows], explicitBig))).toBe('002800105553' + '0002' + '0200');
  });

  it('writes an implicit header with a 32-bit length', () => {
    const rows: WriteElement = { tag: 0x00280010, vr: 'US', value: 512 };
    expect(hex(writeDataSet([rows], implicitLittle))).toBe('28001000' + '02000000' + '0002');
  });

  it('writes two spare bytes and a 32-bit length for a long explicit header', () => {
    const pixels: WriteElement = {
      tag: 0x7fe00010,
      vr: 'OW',
      value: Uint16Array.of(0x1234, 0xabcd),
    };
    expect(hex(writeDataSet([pixels], explicitLittle))).toBe(
      'e07f10004f57' + '0000' + '04000000' + '3412cdab',
    );
    expect(hex(writeDataSet([pixels], explicitBig))).toBe(
      '7fe000104f57' + '0000' + '00000004' + '1234abcd',
    );
  });

  it('writes signed words as two’s complement', () => {
    const value = Int16Array.of(-2000);
    expect(
      hex(writeDataSet([{ tag: 0x7fe00010, vr: 'OW', value }], implicitLittle)).slice(16),
    ).toBe('30f8');
    expect(
      hex(writeDataSet([{ tag: 0x00280120, vr: 'SS', value: -2000 }], implicitLittle)).slice(16),
    ).toBe('30f8');
  });

  it('pads a UID with NUL and other text with a blank', () => {
    const elements: readonly WriteElement[] = [
      { tag: 0x00080018, vr: 'UI', value: '1.2' },
      { tag: 0x00080060, vr: 'CS', value: 'CTX' },
      { tag: 0x00081111, vr: 'OB', value: Uint8Array.of(7) },
    ];
    expect(hex(writeDataSet(elements, implicitLittle))).toBe(
      '08001800' +
        '04000000' +
        '312e3200' +
        '08006000' +
        '04000000' +
        '43545820' +
        '08001111' +
        '02000000' +
        '0700',
    );
  });

  it('joins several values with a backslash and numbers with binary VRs end to end', () => {
    const elements: readonly WriteElement[] = [
      { tag: 0x00080008, vr: 'CS', value: ['A', 'B'] },
      { tag: 0x00280009, vr: 'AT', value: 0x00181063 },
      { tag: 0x00280030, vr: 'DS', value: [0.5, 0.25] },
      { tag: 0x00209241, vr: 'FL', value: 75 },
      { tag: 0x00189345, vr: 'FD', value: -1.5 },
    ];
    expect(hex(writeDataSet(elements, implicitLittle))).toBe(
      '08000800' +
        '04000000' +
        '415c4220' +
        '18004593' +
        '08000000' +
        '000000000000f8bf' +
        '20004192' +
        '04000000' +
        '00009642' +
        '28000900' +
        '04000000' +
        '18006310' +
        '28003000' +
        '08000000' +
        '302e355c302e3235',
    );
  });

  it('writes elements in ascending order and refuses a tag that comes twice', () => {
    const late: WriteElement = { tag: 0x7fe00010, vr: 'OB', value: Uint8Array.of() };
    const early: WriteElement = { tag: 0x00080060, vr: 'CS', value: 'CT' };
    expect(hex(writeDataSet([late, early], explicitLittle))).toBe(
      hex(writeDataSet([early, late], explicitLittle)),
    );
    expect(() => writeDataSet([early, early], explicitLittle)).toThrow(
      'tag comes twice: (0008,0060)',
    );
  });

  it('writes a sequence with lengths, and with delimiters when asked for', () => {
    const items = [[{ tag: 0x00080100, vr: 'SH', value: 'AB' } as const], []];
    const sequence: WriteElement = { tag: 0x00081140, vr: 'SQ', items };
    const item = '08000001' + '5348' + '0200' + '4142';
    expect(hex(writeDataSet([sequence], explicitLittle))).toBe(
      '080040115351' +
        '0000' +
        '1a000000' +
        'feff00e0' +
        '0a000000' +
        item +
        'feff00e0' +
        '00000000',
    );
    expect(hex(writeDataSet([{ ...sequence, undefinedLength: true }], explicitLittle))).toBe(
      '080040115351' +
        '0000' +
        'ffffffff' +
        'feff00e0' +
        'ffffffff' +
        item +
        'feff0de0' +
        '00000000' +
        'feff00e0' +
        'ffffffff' +
        'feff0de0' +
        '00000000' +
        'feffdde0' +
        '00000000',
    );
  });

  it('writes fragments after an empty offset table, each of even length (PS3.5 A.4)', () => {
    const pixels: WriteElement = {
      tag: 0x7fe00010,
      vr: 'OB',
      fragments: [Uint8Array.of(1, 2, 3)],
    };
    expect(hex(writeDataSet([pixels], explicitLittle))).toBe(
      'e07f10004f42' +
        '0000' +
        'ffffffff' +
        'feff00e0' +
        '00000000' +
        'feff00e0' +
        '04000000' +
        '01020300' +
        'feffdde0' +
        '00000000',
    );
  });

  it('throws for numbers that a VR cannot hold, and for text too long for a short header', () => {
    const write = (element: WriteElement) => () => writeDataSet([element], explicitLittle);
    expect(write({ tag: 0x00280010, vr: 'US', value: 65536 })).toThrow('invalid US value: 65536');
    expect(write({ tag: 0x00280010, vr: 'US', value: -1 })).toThrow('invalid US value: -1');
    expect(write({ tag: 0x00280120, vr: 'SS', value: 32768 })).toThrow('invalid SS value: 32768');
    expect(write({ tag: 0x00200013, vr: 'IS', value: 1.5 })).toThrow('invalid integer string: 1.5');
    expect(write({ tag: 0x00204000, vr: 'LT', value: 'x'.repeat(65535) })).toThrow(
      'value too long for LT in (0020,4000): 65536 bytes',
    );
  });
});

describe('writeFile', () => {
  const elements: readonly WriteElement[] = [
    { tag: 0x00080016, vr: 'UI', value: '1.2.840.10008.5.1.4.1.1.2' },
    { tag: 0x00080018, vr: 'UI', value: '2.25.1' },
  ];

  it('begins with 128 empty bytes, DICM, and a group length that ends where the data set begins', () => {
    const file = writeFile(elements);
    expect(file.subarray(0, 128).every((byte) => byte === 0)).toBe(true);
    // DICM | 0002,0000 UL 4
    expect(hex(file.subarray(128, 140))).toBe('4449434d' + '02000000' + '554c0400');
    const length = new DataView(file.buffer).getUint32(140, true);
    expect(hex(file.subarray(144 + length, 144 + length + 6))).toBe('080016005549');
  });

  it('keeps the meta group explicit little endian for every transfer syntax', () => {
    const big = writeFile(elements, { transferSyntaxUid: TRANSFER_SYNTAX.explicitBig });
    const length = new DataView(big.buffer).getUint32(140, true);
    expect(hex(big.subarray(132, 140))).toBe('02000000554c0400');
    expect(hex(big.subarray(144 + length, 144 + length + 6))).toBe('000800165549');
  });

  it('applies the given deflate to the data set only, and does not write deflated without one', () => {
    const transferSyntaxUid = TRANSFER_SYNTAX.deflatedExplicitLittle;
    const file = writeFile(elements, { transferSyntaxUid, deflate: () => Uint8Array.of(9, 9) });
    const length = new DataView(file.buffer).getUint32(140, true);
    expect(hex(file.subarray(144 + length))).toBe('0909');
    expect(() => writeFile(elements, { transferSyntaxUid })).toThrow('no deflate given');
  });
});

describe('decimalText', () => {
  // PS3.5 table 6.2-1: a DS value has at most 16 characters.
  it('never needs more than 16 characters and keeps as many digits as fit', () => {
    expect(
      [0.390625, -161.8046875, 1 / 3, -1 / 3, 1e-9 / 3, -123456.7890123456, 1e22 / 3].map(
        decimalText,
      ),
    ).toEqual([
      '0.390625',
      '-161.8046875',
      '0.33333333333333',
      '-0.3333333333333',
      '3.3333333333e-10',
      '-123456.78901235',
      '3.3333333333e+21',
    ]);
  });

  it('throws for a number that is not finite', () => {
    expect(() => decimalText(Number.NaN)).toThrow('invalid decimal string: NaN');
  });
});

describe('utf8', () => {
  it('gives the bytes of the platform’s encoder for one to four bytes and lone surrogates', () => {
    for (const text of ['Alder', 'Ålder µ', '語', '😀', 'a\ud800b'])
      expect(utf8(text)).toEqual(new TextEncoder().encode(text));
  });
});

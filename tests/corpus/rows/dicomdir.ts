import { writeFile } from '../../../core/dicom/write/index.js';

/** A DICOMDIR (PS3.3 F.3) with records of these types, each naming a file that is not there. */
export function dicomdir(types: readonly string[]): Uint8Array {
  return writeFile([
    { tag: 0x00020002, vr: 'UI', value: '1.2.840.10008.1.3.10' },
    { tag: 0x00020003, vr: 'UI', value: '2.25.77001.50' },
    { tag: 0x00041130, vr: 'CS', value: 'CORPUS' },
    { tag: 0x00041200, vr: 'UL', value: 0 },
    { tag: 0x00041202, vr: 'UL', value: 0 },
    { tag: 0x00041212, vr: 'US', value: 0 },
    {
      tag: 0x00041220,
      vr: 'SQ',
      items: types.map((type, index) => [
        { tag: 0x00041400, vr: 'UL', value: 0 },
        { tag: 0x00041410, vr: 'US', value: 0xffff },
        { tag: 0x00041420, vr: 'UL', value: 0 },
        { tag: 0x00041430, vr: 'CS', value: type },
        { tag: 0x00041500, vr: 'CS', value: ['GONE', `F${index}`] },
        { tag: 0x00200013, vr: 'IS', value: index },
      ]),
    },
  ]);
}

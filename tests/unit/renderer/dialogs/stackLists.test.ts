import { describe, expect, it } from 'vitest';
import {
  leftOutGroups,
  stackDetails,
  stackName,
  studiesOf,
} from '../../../../renderer/dialogs/stackLists.js';
import { index } from '../../../gallery/inventedData.js';

const [first] = index.stacks;
if (first === undefined) throw new Error('the invented folder has no stack');

describe('studiesOf', () => {
  it('gathers the stacks of a study by series number', () => {
    const studies = studiesOf({ stacks: index.stacks.toReversed() });
    expect(studies).toHaveLength(1);
    expect(studies[0]?.stacks.map(({ key }) => key)).toEqual(['1.2.3.3', '1.2.3.4', '1.2.3.5']);
  });
  it('keeps two patients apart even under one study identifier', () => {
    const [slice] = first.slices;
    const identity = { ...slice.image.identity, patientId: 'other' };
    const other = {
      ...first,
      key: 'other',
      slices: [{ ...slice, image: { ...slice.image, identity } }] as const,
    };
    expect(studiesOf({ stacks: [first, other] }).map(({ stacks }) => stacks.length)).toEqual([
      1, 1,
    ]);
  });
});

describe('leftOutGroups', () => {
  it('gathers files by reason, the most frequent first, and loses none', () => {
    const groups = leftOutGroups(index.leftOut);
    expect(groups[0]).toEqual({
      code: 'not-dicom',
      text: 'Not a DICOM file.',
      files: ['readme.txt', 'a/notes.txt'],
    });
    expect(groups.flatMap(({ files }) => files)).toHaveLength(index.leftOut.length);
  });
});

describe('words for a stack', () => {
  it('shows the kernel label as the file has it', () => {
    expect(stackName(first)).toBe('Series 3 · “Bs-1”');
    expect(stackName({ ...first, key: '1.2.3.3#2' })).toBe('Series 3 #2 · “Bs-1”');
  });
  it('says what is unknown and guesses nothing', () => {
    const [slice] = first.slices;
    const { phasePercent: _, kvp: __, ...acquisition } = slice.image.acquisition;
    const silent = { ...slice, image: { ...slice.image, acquisition } };
    expect(stackDetails({ ...first, slices: [silent] })).toEqual([
      'Heart 75 % soft',
      '1 slice of 512 × 512',
      'every 0.50 mm',
      '0.60 mm thick',
      'pixels 0.390 mm',
      'phase unknown',
      'kVp unknown',
    ]);
  });
});

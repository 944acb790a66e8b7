import { mkdir, symlink } from 'node:fs/promises';
import { join } from 'node:path';
import { ctSlice } from '../ctSlice.js';
import { PLAIN_IMAGE, PLAIN_STORED } from '../plainSlice.js';
import { latin1 } from '../rawBytes.js';
import type { CorpusFiles, CorpusRow, RowCase } from '../row.js';
import { dicomdir } from './dicomdir.js';

/** Beside the odd file stands a good slice, which has to be read all the same. */
function besides(name: string, code: string, says: string, odd: CorpusFiles): RowCase {
  return {
    name,
    verdict: 'SKIP',
    code,
    says,
    build: () => ({ ...odd, slice: ctSlice() }),
    image: PLAIN_IMAGE,
    stored: PLAIN_STORED,
  };
}

function notDicom(name: string, file: string, bytes: Uint8Array): RowCase {
  return besides(name, 'not-dicom', 'Not a DICOM file', { [file]: bytes });
}

const DEEP = `${Array.from({ length: 40 }, (_, depth) => `d${depth}`).join('/')}/slice`;

/** Names that the test's system denies, loses or keeps closed. */
export const DENIED = 'a-denied';
export const VANISHING = 'a-vanishing';
export const CLOSED = 'a-closed';

/** Section A, what stands in a folder: rows 1 to 5 and 12 to 16. */
export const FOLDER_ROWS: readonly CorpusRow[] = [
  {
    // pydicom/pydicom 810
    row: 1,
    section: 'A',
    title: 'Zero-length file',
    outcome: 'left out as empty',
    cases: [besides('no bytes', 'empty-file', 'Empty file', { nothing: new Uint8Array(0) })],
  },
  {
    // pydicom/pydicom 810, 1642
    row: 2,
    section: 'A',
    title: 'Non-DICOM in folder (text, .DS_Store, ._x, Thumbs.db, zip)',
    outcome: 'left out by its first bytes',
    cases: [
      notDicom('a text', 'notes.txt', latin1('Notes of nobody in particular.\n'.repeat(40))),
      notDicom('a text of one line', 'readme', latin1('hi')),
      notDicom('a desktop file', '.DS_Store', latin1(`\0\0\0\x01Bud1${'\0'.repeat(600)}`)),
      notDicom('a resource fork', '._slice', latin1(`\0\x05\x16\x07\0\x02\0\0${'\0'.repeat(80)}`)),
      notDicom(
        'a thumbnail store',
        'Thumbs.db',
        latin1(`\xd0\xcf\x11\xe0\xa1\xb1\x1a\xe1${'\0'.repeat(500)}`),
      ),
      notDicom('a zip', 'images.zip', latin1(`PK\x03\x04\x14\0\0\0\x08\0${'z'.repeat(300)}`)),
      notDicom('zeros', 'zeros', new Uint8Array(20_000)),
    ],
  },
  {
    // PS3.10 section 8 (file IDs are a matter of media; recalled from memory)
    row: 3,
    section: 'A',
    title: 'No / odd file extension',
    outcome: 'read; content decides, never the name',
    cases: ['IM000001', 'slice.jpg', 'slice.txt', 'a b.dcm.bak', '.hidden'].map(
      (file): RowCase => ({
        name: file,
        verdict: 'READ',
        build: () => ({ [file]: ctSlice() }),
        image: PLAIN_IMAGE,
        stored: PLAIN_STORED,
      }),
    ) as [RowCase, ...RowCase[]],
  },
  {
    // dgobbi/vtk-dicom 119; pydicom/pydicom 981, 1597
    row: 4,
    section: 'A',
    title: 'DICOMDIR present',
    outcome: 'left out and not trusted as an index; the folder itself is read',
    cases: [
      besides('beside a slice that it does not name', 'dicomdir', 'A DICOMDIR', {
        DICOMDIR: dicomdir(['IMAGE']),
      }),
    ],
  },
  {
    // pydicom/pydicom 1189, 1895
    row: 5,
    section: 'A',
    title: 'DICOMDIR naming missing files / PRIVATE records',
    outcome: 'left out; its records are not looked at',
    cases: [
      besides('missing files, private records', 'dicomdir', 'A DICOMDIR', {
        DICOMDIR: dicomdir(['IMAGE', 'PRIVATE', 'IMAGE']),
      }),
      besides('cut in its records', 'dicomdir', 'A DICOMDIR', {
        DICOMDIR: dicomdir(['PRIVATE', 'IMAGE']).subarray(0, 420),
      }),
      besides('thousands of records', 'dicomdir', 'A DICOMDIR', {
        DICOMDIR: dicomdir(Array.from({ length: 2000 }, () => 'IMAGE')),
      }),
    ],
  },
  {
    // paulmillr/readdirp 173; nodejs/node PR 52553
    row: 12,
    section: 'A',
    title: 'Symlink loop, dangling link',
    outcome: 'left out; no folder is entered twice',
    cases: [
      {
        ...besides('a loop', 'link-loop', 'in a circle', {}),
        arrange: (folder) => symlink('loop', join(folder, 'loop')),
      },
      {
        ...besides('a dangling link', 'dangling-link', 'not there', {}),
        arrange: (folder) => symlink('nowhere', join(folder, 'dangling')),
      },
      {
        ...besides('a link to the folder above', 'link', 'same folder', {}),
        arrange: async (folder) => {
          await mkdir(join(folder, 'inner'));
          await symlink('..', join(folder, 'inner', 'up'));
        },
      },
    ],
  },
  {
    // jergason/recursive-readdir PR 35; oven-sh/bun PR 33432. The test plays a system that denies these names.
    row: 13,
    section: 'A',
    title: 'Unreadable file/folder, or gone mid-scan',
    outcome: 'left out with the reason; the rest is read',
    cases: [
      besides('a file without permission', 'no-permission', 'No permission', {
        [DENIED]: ctSlice({ z: 9 }),
      }),
      besides('a file that vanishes', 'vanished', 'gone', { [VANISHING]: ctSlice({ z: 9 }) }),
      besides('a folder without permission', 'unreadable-folder', 'folder can’t be read', {
        [`${CLOSED}/inside`]: ctSlice({ z: 9 }),
      }),
    ],
  },
  {
    // design; the rest of this row (permission, vanishing, cancel) needs a system and stands in the test
    row: 14,
    section: 'A',
    title: '10⁵ files, deep tree, network share stalls',
    outcome: 'depth and open files are bounded; progress is told; can be cancelled',
    cases: [
      besides('a tree of 40 folders', 'too-deep', 'folders deep', { [DEEP]: ctSlice({ z: 9 }) }),
    ],
  },
  {
    // icometrix/dicom2nifti 21
    row: 15,
    section: 'A',
    title: 'Same SOP Instance twice, same pixels',
    outcome: 'the second is left out as a duplicate',
    cases: [
      besides('copies byte for byte', 'duplicate', 'same image', { zcopy: ctSlice() }),
      besides('the copy in another encoding', 'duplicate', 'same image', {
        zcopy: ctSlice({ transferSyntaxUid: '1.2.840.10008.1.2.2' }),
      }),
    ],
  },
  {
    // PS3.5 section 9 (a UID names one thing; recalled from memory); dicom2nifti 21
    row: 16,
    section: 'A',
    title: 'Same SOP Instance UID, different pixels',
    outcome: 'none is stacked; both are named',
    cases: [
      {
        name: 'one pixel differs',
        verdict: 'REFUSE',
        code: 'same-uid-other-pixels',
        says: 'under the same SOP Instance UID',
        build: () => ({
          a: ctSlice(),
          b: ctSlice({
            stored: Int16Array.from(PLAIN_STORED, (value, at) => (at === 19 ? 7 : value)),
          }),
        }),
      },
    ],
  },
];

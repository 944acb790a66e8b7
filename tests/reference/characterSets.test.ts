import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { attributesOf } from '../../core/dicom/attributes.js';
import { characterSetOf } from '../../core/dicom/characterSet.js';
import { openDataSet } from '../../core/dicom/openDataSet.js';
import { dictionaryVr } from '../../core/dicom/recover/vr.js';
import { hex } from '../corpus/rawBytes.js';
import { EXTENDED_NAMES } from '../corpus/rows/extendedNames.js';
import { pythonHas, pythonJson } from '../support/python.js';

/** Person names as pydicom reads them: a general-purpose DICOM library, written by others. */
const DECODE = `
import json, sys, warnings
from pydicom.charset import convert_encodings
from pydicom.valuerep import PersonName
warnings.simplefilter('ignore')
names = []
for one in json.loads(sys.argv[1]):
    encodings = convert_encodings(one['set'].split('\\\\'))
    names.append(str(PersonName(bytes.fromhex(one['bytes']), encodings).decode()))
print(json.dumps(names))
`;

const FILES = `
import json, glob, os, pydicom
folder = os.path.join(os.path.dirname(pydicom.__file__), 'data', 'charset_files')
names = {}
for path in sorted(glob.glob(os.path.join(folder, 'chr*.dcm'))):
    d = pydicom.dcmread(path, force=True)
    d.decode()
    if 'PatientName' in d:
        names[path] = str(d.PatientName)
print(json.dumps(names))
`;

const VRS = `
import json
from pydicom.datadict import DicomDictionary
print(json.dumps([[tag, entry[0]] for tag, entry in DicomDictionary.items()]))
`;

const missing = !pythonHas('pydicom');

function decoded(set: string, bytes: string): string {
  return characterSetOf(set).decode(hex(bytes), true).text;
}

describe('Character sets', () => {
  it('reads the worked examples of PS3.5 annexes H to K as they are printed there', () => {
    for (const { set, bytes, name } of EXTENDED_NAMES) expect(decoded(set, bytes)).toBe(name);
  });

  it.skipIf(missing)('reads names as pydicom does', () => {
    const asked = EXTENDED_NAMES.map(({ set, bytes }) => ({ set, bytes }));
    const names = pythonJson(DECODE, [JSON.stringify(asked)]) as readonly string[];
    // pydicom 2.3.1 leaves the escape of ISO 2022 IR 58 in the text, and drops an empty last group of a name.
    const theirs = names.map((name) => name.replaceAll('\u001b$)A', ''));
    expect(theirs).toEqual(EXTENDED_NAMES.map(({ name }) => name.replace(/=$/, '')));
  });

  it.skipIf(missing)('reads every character of the single-byte sets as Python does', () => {
    // Where ISO and the Encoding standard have no character Python has none or a control; those are left out.
    const sets = [100, 101, 109, 110, 144, 127, 126, 138, 148].map((ir) => `ISO_IR ${ir}`);
    const asked = sets.flatMap((set) =>
      Array.from({ length: 0x60 }, (_, index) => ({ set, bytes: (0xa0 + index).toString(16) })),
    );
    const theirs = pythonJson(DECODE, [JSON.stringify(asked)]) as readonly string[];
    const differing = asked.filter(({ set, bytes }, index) => {
      const ours = decoded(set, bytes);
      return ours !== '\ufffd' && ours !== theirs[index];
    });
    expect(differing).toEqual([]);
    const unread = asked.filter(({ set, bytes }) => decoded(set, bytes) === '\ufffd');
    // Holes of ISO 8859-3 (7), -6 (49), -7 (3) and -8 (38 of 96), from the code tables.
    expect(unread.length).toBeLessThan(110);
  });
});

describe('Files in many character sets', () => {
  it.skipIf(missing)('gives the names of pydicom’s own test files, H.3.1 to J.2 among them', () => {
    const names = pythonJson(FILES) as Readonly<Record<string, string>>;
    const ours = Object.keys(names).map((path) => {
      const opened = openDataSet(new Uint8Array(readFileSync(path)));
      return opened.ok ? (attributesOf(opened.value).text('x00100010') ?? '') : opened.refusal.text;
    });
    const theirs = Object.values(names);
    expect(theirs.length).toBeGreaterThan(10);
    expect(ours.map((name) => name.replace(/=$/, ''))).toEqual(theirs);
  });
});

describe('The dictionary', () => {
  it.skipIf(missing)('has the value representations that pydicom has from PS3.6', () => {
    const pairs = pythonJson(VRS) as readonly (readonly [number, string])[];
    const theirs = new Map(pairs);
    let known = 0;
    for (const [tag, vr] of theirs) {
      const ours = dictionaryVr(tag);
      if (ours === undefined || (tag & 0xffff) === 0) continue;
      known += 1;
      expect(vr.split(' or '), tag.toString(16)).toContain(ours);
    }
    expect(known).toBeGreaterThan(70);
  });
});

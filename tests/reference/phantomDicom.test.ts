import { execFileSync, spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { deflateRawSync } from 'node:zlib';
import { afterAll, describe, expect, it } from 'vitest';
import { TRANSFER_SYNTAX, writeFile } from '../../core/dicom/write/index.js';
import { identifiersOf, makeSlice, sliceElements } from '../../core/phantom/index.js';

const PYTHON = '/usr/bin/python3';
const hasPydicom = spawnSync(PYTHON, ['-c', 'import pydicom, numpy']).status === 0;
const hasDciodvfy = spawnSync('dciodvfy', ['-version']).error === undefined;

const folder = mkdtempSync(join(tmpdir(), 'diptych-phantom-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const options = { seed: 3, slices: 2, matrix: 64 };
const pixels = Uint16Array.from({ length: 64 * 64 }, (_, index) => (index * 37) % 65536);

const write = (name: string, bytes: Uint8Array): string => {
  const path = join(folder, name);
  writeFileSync(path, bytes);
  return path;
};

describe.skipIf(!hasDciodvfy)(
  `files of the demonstration under dciodvfy${hasDciodvfy ? '' : ' (skipped: dciodvfy is not installed)'}`,
  () => {
    it('are CT images without an error, on both kernels', () => {
      for (const [index, { bytes }] of makeSlice(options, 1).entries()) {
        const checked = spawnSync('dciodvfy', [write(`slice-${index}`, bytes)], {
          encoding: 'utf8',
        });
        const said = `${checked.stdout}${checked.stderr}`;
        expect(said).toContain('CTImage');
        expect(said.split('\n').filter((line) => line.startsWith('Error'))).toEqual([]);
        expect(checked.status).toBe(0);
      }
    });

    it('are found wrong by it when an element that must be there is missing', () => {
      // Shows that the check above can fail.
      const elements = sliceElements(options, 'soft', 0, pixels).filter(
        ({ tag }) => tag !== 0x00281053,
      );
      const checked = spawnSync('dciodvfy', [write('broken', writeFile(elements))], {
        encoding: 'utf8',
      });
      expect(`${checked.stdout}${checked.stderr}`).toContain('Error');
    });
  },
);

const SCRIPT = `
import sys, json, pydicom
out = []
for path in sys.argv[1:]:
    d = pydicom.dcmread(path)
    a = d.pixel_array.astype(int)
    out.append(dict(syntax=str(d.file_meta.TransferSyntaxUID), sop=str(d.SOPInstanceUID), same=d.file_meta.MediaStorageSOPInstanceUID == d.SOPInstanceUID,
        name=str(d.PatientName), kernel=d.ConvolutionKernel, type=list(d.ImageType), phase=d[0x0020, 0x9241].value, kvp=float(d.KVP),
        position=[float(v) for v in d.ImagePositionPatient], spacing=[float(v) for v in d.PixelSpacing], thickness=float(d.SliceThickness),
        slope=float(d.RescaleSlope), intercept=float(d.RescaleIntercept), windows=[[float(v) for v in d.WindowCenter], [float(v) for v in d.WindowWidth]],
        derivation=d.DerivationDescription, shape=list(a.shape), first=a[0, :4].tolist(), last=int(a[-1, -1]), sum=int(a.sum())))
print(json.dumps(out))
`;

describe.skipIf(!hasPydicom)(
  `files of the demonstration read by pydicom${hasPydicom ? '' : ' (skipped: /usr/bin/python3 has no pydicom)'}`,
  () => {
    it('have the same values in each transfer syntax', () => {
      const elements = sliceElements(options, 'sharp', 1, pixels);
      const paths = Object.entries(TRANSFER_SYNTAX).map(([name, transferSyntaxUid]) =>
        write(
          name,
          writeFile(elements, {
            transferSyntaxUid,
            ...(name === 'deflatedExplicitLittle'
              ? { deflate: (bytes) => deflateRawSync(bytes) }
              : {}),
          }),
        ),
      );
      const read: unknown = JSON.parse(
        execFileSync(PYTHON, ['-c', SCRIPT, ...paths], { encoding: 'utf8' }),
      );
      const expected = {
        sop: identifiersOf(options).sopInstanceUid('sharp', 1),
        same: true,
        name: 'Synthetic^Rowan Alder',
        kernel: 'Crisp 5',
        type: ['DERIVED', 'SECONDARY', 'AXIAL'],
        phase: 75,
        kvp: 100,
        // Centre (24, −14), 200 mm in 64 pixels: 24 − 31.5 · 3.125. Two slices begin half a millimetre below z = 10.
        position: [-74.4375, -112.4375, 10],
        spacing: [3.125, 3.125],
        thickness: 0.6,
        slope: 1,
        intercept: -1024,
        windows: [
          [300, 300],
          [1200, 700],
        ],
        derivation:
          'SYNTHETIC: computed from geometric shapes, not a patient, not clinical evidence. Filtered back projection, cosine to 1.26 per mm',
        shape: [64, 64],
        first: [0, 37, 74, 111],
        last: (4095 * 37) % 65536,
        sum: pixels.reduce((sum, value) => sum + value, 0),
      };
      expect(read).toEqual(
        Object.values(TRANSFER_SYNTAX).map((syntax) => ({ syntax, ...expected })),
      );
    });
  },
);

import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { nodeCodecs } from '../../app/host/codecs/nodeCodecs.js';
import { type IndexedFolder, indexFolder } from '../../app/host/library/indexFolder.js';
import { decodeImage } from '../../core/dicom/index.js';
import { pythonHas, pythonJson } from '../support/python.js';

const DATA = '/usr/lib/python3/dist-packages/pydicom/data/test_files';

/** What pydicom reads of every file that it takes for a CT image. */
const PROGRAM = `
import json, os, sys, warnings, pydicom
warnings.simplefilter('ignore')
root = sys.argv[1]; found = {}
def numbers(value): return None if value is None else [float(v) for v in value]
for folder, _, names in os.walk(root):
    for name in names:
        path = os.path.join(folder, name)
        try: ds = pydicom.dcmread(path, stop_before_pixels=True)
        except Exception: continue
        try:
            if ds.get('SOPClassUID') != '1.2.840.10008.5.1.4.1.1.2': continue
            slope = ds.get('RescaleSlope')
            found[os.path.relpath(path, root)] = dict(
                sop=str(ds.SOPInstanceUID), study=str(ds.StudyInstanceUID), series=str(ds.SeriesInstanceUID),
                syntax=str(ds.file_meta.TransferSyntaxUID), patient=str(ds.get('PatientID') or ''),
                name=str(ds.get('PatientName') or ''),
                position=numbers(ds.get('ImagePositionPatient')), orientation=numbers(ds.get('ImageOrientationPatient')),
                spacing=numbers(ds.get('PixelSpacing')), rows=ds.Rows, columns=ds.Columns,
                rescale=None if slope is None else [float(slope), float(ds.RescaleIntercept)],
                kernel=None if not ds.get('ConvolutionKernel') else str(ds.ConvolutionKernel),
                kvp=None if ds.get('KVP') is None else float(ds.KVP),
                thickness=None if ds.get('SliceThickness') is None else float(ds.SliceThickness),
                number=None if ds.get('InstanceNumber') is None else int(ds.InstanceNumber),
                acquisition=None if ds.get('AcquisitionNumber') is None else int(ds.AcquisitionNumber),
                phase=None, signed=ds.PixelRepresentation == 1, bits=ds.BitsStored,
                type=[str(v).strip() for v in ds.get('ImageType', [])], padding=ds.get('PixelPaddingValue'))
        except Exception as error:
            found[os.path.relpath(path, root)] = dict(error=str(error))
print(json.dumps(found))
`;

type Header = Readonly<Record<string, unknown>>;

/** Code stream and tags of this file disagree on sign and bits; the code stream counts. */
const CORRECTED = 'J2K_pixelrep_mismatch.dcm';

describe.skipIf(!existsSync(DATA) || !pythonHas('pydicom'))(
  'the test files of pydicom (skipped without Debian’s python3-pydicom)',
  () => {
    let index: IndexedFolder;
    let pydicom: Readonly<Record<string, Header>>;
    const home = mkdtempSync(join(tmpdir(), 'diptych-pydicom-'));
    afterAll(() => rmSync(home, { recursive: true, force: true }));

    beforeAll(async () => {
      const found = await indexFolder(DATA, { threads: 0 });
      if (!found.ok) throw new Error(found.refusal.text);
      index = found.value;
      pydicom = pythonJson(PROGRAM, [DATA]) as Readonly<Record<string, Header>>;
    });

    const slices = () => index.stacks.flatMap((stack) => stack.slices);

    it('are all read or left out, each with a reason, and none makes the reader fail', () => {
      const read = new Set(slices().map(({ file }) => file));
      const left = new Set(index.leftOut.map(({ file }) => file));
      expect(read.size + left.size).toBe(index.files);
      for (const { code, text } of index.leftOut) {
        expect(code).not.toBe('reader-failed');
        expect(text).toMatch(/\.$/);
      }
    });

    it('have, where they are CT slices, the header values that pydicom reads', () => {
      expect(slices().length).toBeGreaterThan(10);
      for (const { file, image } of slices()) {
        const header = pydicom[file];
        expect(header, file).toBeDefined();
        const { grid, pixels, acquisition, identity } = image;
        const got: Header = {
          sop: image.sopInstanceUid,
          study: identity.studyInstanceUid,
          series: acquisition.seriesInstanceUid,
          syntax: image.transferSyntaxUid,
          patient: identity.patientId ?? '',
          name: identity.patientName ?? '',
          position: grid.positionMm,
          spacing: grid.pixelSpacingMm,
          rows: grid.rows,
          columns: grid.columns,
          rescale: pixels.rescale ? [pixels.rescale.slope, pixels.rescale.intercept] : null,
          kernel: acquisition.kernelLabel ?? null,
          kvp: acquisition.kvp ?? null,
          thickness: acquisition.thicknessMm ?? null,
          number: image.instanceNumber ?? null,
          acquisition: acquisition.acquisitionNumber ?? null,
          phase: acquisition.phasePercent ?? null,
          signed: pixels.signed,
          bits: pixels.bitsStored,
          type: image.imageType,
          padding: pixels.padding?.low ?? null,
        };
        const { orientation, ...expected } = header ?? {};
        expect({ file, ...got }).toEqual({
          file,
          ...expected,
          ...(file === CORRECTED && { signed: pixels.signed, bits: pixels.bitsStored }),
        });
        for (const [i, value] of (orientation as readonly number[]).entries()) {
          const cosine = [...grid.rowDirection, ...grid.columnDirection][i];
          expect(cosine, file).toBeCloseTo(value, 4);
        }
      }
    });

    it('of CT images leave out only localizers and what is named here', () => {
      const left = Object.keys(pydicom).filter(
        (path) => !slices().some(({ file }) => file === path),
      );
      const reasons = left.map((path) => {
        const entry = index.leftOut.find(({ file }) => file === path);
        return [path, entry?.code];
      });
      // Where pydicom finds no Rows either, there is no image.
      const odd = reasons.filter(
        ([path = '', code]) => code !== (pydicom[path]?.error ? 'no-image' : 'localizer'),
      );
      expect(odd.sort()).toEqual(LEFT_OUT_CT);
    });

    it.each([
      ['liver_1frame.dcm', 'not-a-ct-image'],
      ['test-SR.dcm', 'not-a-ct-image'],
      ['reportsi.dcm', 'not-a-ct-image'],
      ['rtplan.dcm', 'not-a-ct-image'],
      ['rtdose.dcm', 'not-a-ct-image'],
      ['MR_small.dcm', 'not-a-ct-image'],
      ['MR_truncated.dcm', 'not-a-ct-image'],
      ['SC_rgb_rle.dcm', 'not-a-ct-image'],
      ['dicomdirtests/DICOMDIR', 'dicomdir'],
    ])('%s is left out: %s', (path, code) => {
      expect(index.leftOut.find(({ file }) => file === path)?.code).toBe(code);
    });

    it('CT_small.dcm has the sums of its pixels', async () => {
      // Σ and Σ² by numpy over pydicom's pixel array.
      const decoded = await decodeImage(new Uint8Array(readFileSync(`${DATA}/CT_small.dcm`)));
      if (!decoded.ok) throw new Error(decoded.refusal.text);
      const values = Array.from(decoded.value.stored);
      expect(values.reduce((sum, value) => sum + value, 0)).toBe(14826310);
      expect(values.reduce((sum, value) => sum + value * value, 0)).toBe(15779540364);
    });

    it('of every CT slice give pixels, or a sentence', async () => {
      for (const { file } of slices()) {
        const bytes = new Uint8Array(readFileSync(join(DATA, file)));
        const decoded = await decodeImage(bytes, { codecs: nodeCodecs });
        expect(decoded.ok ? 'pixels' : decoded.refusal.text, file).toMatch(/^pixels$|\.$/);
      }
    });
  },
);

/** CT images that are no localizer and are left out all the same. */
const LEFT_OUT_CT: readonly (readonly [string, string])[] = [];

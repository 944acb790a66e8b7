import { execFileSync, spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { readSlices } from '../../app/cli/readSlices.js';
import { nodeCodecs } from '../../app/host/codecs/nodeCodecs.js';
import { type IndexedFolder, indexFolder } from '../../app/host/library/indexFolder.js';
import { decodeImage } from '../../core/dicom/index.js';
import { enhancedCt, frameValues } from '../corpus/enhancedCt.js';
import { pythonHas, pythonJson } from '../support/python.js';

const has = (...tools: readonly string[]): boolean =>
  tools.every((tool) => existsSync(`/usr/bin/${tool}`));

const SIDE = 32;
const FRAMES = [3, 0, 2, 1].map((z, index) => ({
  z,
  slope: index % 2 === 0 ? 1 : 0.5,
  intercept: -1024 + index,
  phasePercent: 75,
  delayMs: 620,
}));

const folder = mkdtempSync(join(tmpdir(), 'diptych-frames-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

function folderWith(name: string, files: Readonly<Record<string, Uint8Array>>): string {
  const path = join(folder, name);
  mkdirSync(path);
  for (const [file, bytes] of Object.entries(files)) writeFileSync(join(path, file), bytes);
  return path;
}

async function indexed(path: string): Promise<IndexedFolder> {
  const index = await indexFolder(path, { threads: 0 });
  if (!index.ok) throw new Error(index.refusal.text);
  return index.value;
}

/** Frame number, position, rescale and first stored values of each slice of the only stack. */
async function slicesOf(path: string) {
  const index = await indexed(path);
  expect(index.leftOut).toEqual([]);
  const [stack] = index.stacks;
  if (stack === undefined || index.stacks.length > 1) throw new Error('not one stack');
  const all = stack.slices.map((_, slice) => slice);
  const read = await readSlices(index, stack, all, {});
  if (!read.ok) throw new Error(read.refusal.text);
  expect(read.value.problems).toEqual([]);
  return stack.slices.map(({ image, alongMm }, slice) => ({
    frame: image.frame,
    alongMm,
    rescale: image.pixels.rescale,
    kernel: image.acquisition.kernelLabel,
    phase: image.acquisition.phasePercent,
    stored: read.value.stored.get(slice),
  }));
}

const EXPECTED = [1, 3, 2, 0].map((frame) => ({
  frame,
  alongMm: FRAMES[frame]?.z,
  rescale: { slope: FRAMES[frame]?.slope, intercept: FRAMES[frame]?.intercept },
  kernel: 'Plain',
  phase: 75,
  stored: frameValues(frame, SIDE * SIDE),
}));

describe('enhanced multi-frame CT', () => {
  const bytes = enhancedCt({ frames: FRAMES, rows: SIDE, columns: SIDE });

  it.skipIf(!has('dciodvfy'))(
    'is a valid Enhanced CT Image to dicom3tools (skipped without dciodvfy)',
    () => {
      const file = join(folder, 'valid.dcm');
      writeFileSync(file, bytes);
      const { stderr } = spawnSync('/usr/bin/dciodvfy', [file], { encoding: 'utf8' });
      expect(stderr).toContain('EnhancedCTImage');
      expect(stderr).not.toContain('Error');
    },
  );

  it('makes slices of its frames, ordered by position, each read alone', async () => {
    expect(await slicesOf(folderWith('native', { 'a.dcm': bytes }))).toEqual(EXPECTED);
  });

  const ENCODERS = [
    ['RLE by dcmtk', 'dcmcrle', []],
    ['JPEG lossless by dcmtk', 'dcmcjpeg', ['+e1']],
    ['JPEG lossless in small fragments by dcmtk', 'dcmcjpeg', ['+e1', '+fs', '1', '-ot']],
    ['JPEG-LS by dcmtk', 'dcmcjpls', []],
    ['JPEG 2000 by gdcm', 'gdcmconv', ['--j2k']],
    ['RLE by gdcm', 'gdcmconv', ['--rle']],
    ['deflated by dcmtk', 'dcmconv', ['+td']],
    ['big endian by dcmtk', 'dcmconv', ['+tb']],
    ['implicit by dcmtk', 'dcmconv', ['+ti']],
  ] as const;

  it.skipIf(!has('dcmcrle', 'dcmcjpeg', 'dcmcjpls', 'dcmconv', 'gdcmconv')).each(ENCODERS)(
    'has the same slices in %s (skipped without dcmtk and gdcm)',
    async (name, tool, flags) => {
      const path = folderWith(name, {});
      const plain = join(folder, `${name} from`);
      writeFileSync(plain, bytes);
      execFileSync(`/usr/bin/${tool}`, [...flags, plain, join(path, 'a.dcm')]);
      expect(await slicesOf(path)).toEqual(EXPECTED);
      // Whole, as the page reads a deflated one.
      const whole = new Uint8Array(readFileSync(join(path, 'a.dcm')));
      const third = await decodeImage(whole, { frame: 2, codecs: nodeCodecs });
      expect(third.ok && third.value.stored).toEqual(frameValues(2, SIDE * SIDE));
    },
  );

  it.skipIf(!has('dcmcjpls'))(
    'gives the frames before a cut, and the others are told (skipped without dcmtk)',
    async () => {
      const plain = join(folder, 'to cut');
      const coded = join(folder, 'to cut coded');
      writeFileSync(plain, bytes);
      execFileSync('/usr/bin/dcmcjpls', [plain, coded]);
      const whole = readFileSync(coded);
      const path = folderWith('cut', { 'a.dcm': whole.subarray(0, whole.length - 40) });
      const index = await indexed(path);
      const [stack] = index.stacks;
      if (stack === undefined) throw new Error('no stack');
      const read = await readSlices(index, stack, [0, 1, 2, 3], {});
      if (!read.ok) throw new Error(read.refusal.text);
      expect([...read.value.stored.keys()]).toEqual([0, 2, 3]);
      // Slice 1 is the last frame of the file.
      expect(read.value.problems).toHaveLength(1);
    },
  );
});

/** Builds an enhanced file with pydicom alone: two phases, two kernels' worth of frames, shuffled. */
const PYDICOM = `
import json, sys, numpy as np, pydicom
from pydicom.dataset import Dataset, FileMetaDataset
from pydicom.sequence import Sequence
from pydicom.uid import ExplicitVRLittleEndian
rng = np.random.default_rng(7)
frames = [dict(z=z, phase=p, slope=s, intercept=i) for p in (40.0, 75.0) for z, s, i in ((0.0, 1, -1024), (0.5, 2, -2048), (1.0, 1, -1000))]
rng.shuffle(frames)
pixels = rng.integers(900, 1100, (len(frames), 8, 6), dtype=np.int16)
def seq(**kw):
    d = Dataset()
    for k, v in kw.items(): setattr(d, k, v)
    return Sequence([d])
ds = Dataset(); meta = FileMetaDataset()
meta.MediaStorageSOPClassUID = ds.SOPClassUID = '1.2.840.10008.5.1.4.1.1.2.1'
meta.MediaStorageSOPInstanceUID = ds.SOPInstanceUID = '2.25.991'
meta.TransferSyntaxUID = ExplicitVRLittleEndian
ds.StudyInstanceUID = '2.25.992'; ds.SeriesInstanceUID = '2.25.993'; ds.FrameOfReferenceUID = '2.25.994'
ds.Modality = 'CT'; ds.PatientID = 'P'; ds.PatientName = 'Made^ByPydicom'; ds.StudyDescription = 'synthetic'
ds.ImageType = ['DERIVED', 'PRIMARY', 'VOLUME', 'NONE']
ds.Rows, ds.Columns, ds.NumberOfFrames = 8, 6, len(frames)
ds.SamplesPerPixel = 1; ds.PhotometricInterpretation = 'MONOCHROME2'
ds.BitsAllocated = ds.BitsStored = 16; ds.HighBit = 15; ds.PixelRepresentation = 1
shared = Dataset()
shared.PixelMeasuresSequence = seq(PixelSpacing=[0.4, 0.3], SliceThickness=0.5)
shared.PlaneOrientationSequence = seq(ImageOrientationPatient=[1, 0, 0, 0, 1, 0])
shared.CTReconstructionSequence = seq(ConvolutionKernel='Crisp')
shared.CTXRayDetailsSequence = seq(KVP=80)
ds.SharedFunctionalGroupsSequence = Sequence([shared])
groups = []
for n, f in enumerate(frames):
    g = Dataset()
    g.PlanePositionSequence = seq(ImagePositionPatient=[-1, -2, f['z']])
    g.PixelValueTransformationSequence = seq(RescaleIntercept=f['intercept'], RescaleSlope=f['slope'], RescaleType='HU')
    g.CardiacSynchronizationSequence = seq(NominalPercentageOfCardiacPhase=f['phase'], NominalCardiacTriggerDelayTime=f['phase'] * 8)
    g.FrameContentSequence = seq(FrameAcquisitionNumber=1, FrameAcquisitionDateTime='20260102030405.25')
    groups.append(g)
ds.PerFrameFunctionalGroupsSequence = Sequence(groups)
ds.PixelData = pixels.tobytes()
ds.file_meta = meta; ds.is_little_endian = True; ds.is_implicit_VR = False
pydicom.dcmwrite(sys.argv[1], ds, write_like_original=False)
back = pydicom.dcmread(sys.argv[1]); hu = []
for n, f in enumerate(frames):
    t = back.PerFrameFunctionalGroupsSequence[n].PixelValueTransformationSequence[0]
    hu.append(dict(phase=f['phase'], z=f['z'], frame=n, mean=float((back.pixel_array[n] * float(t.RescaleSlope) + float(t.RescaleIntercept)).mean())))
print(json.dumps(sorted(hu, key=lambda h: (h['phase'], h['z']))))
`;

interface PydicomFrame {
  readonly phase: number;
  readonly z: number;
  readonly frame: number;
  readonly mean: number;
}

describe.skipIf(!pythonHas('pydicom', 'numpy'))(
  'an enhanced file that pydicom made (skipped without it)',
  () => {
    it('gives two stacks, one a phase, with the HU that pydicom computes', async () => {
      const path = folderWith('pydicom', {});
      const expected = pythonJson(PYDICOM, [join(path, 'a.dcm')]) as readonly PydicomFrame[];
      const index = await indexed(path);
      expect(index.leftOut).toEqual([]);
      const got: PydicomFrame[] = [];
      for (const stack of index.stacks) {
        const read = await readSlices(index, stack, [...stack.slices.keys()], {});
        if (!read.ok) throw new Error(read.refusal.text);
        for (const [slice, { image, alongMm }] of stack.slices.entries()) {
          const stored = read.value.stored.get(slice) ?? [];
          const { slope, intercept } = image.pixels.rescale ?? { slope: 0, intercept: 0 };
          const sum = Array.from(stored).reduce((total, value) => total + value, 0);
          got.push({
            phase: image.acquisition.phasePercent ?? 0,
            z: alongMm,
            frame: image.frame ?? -1,
            mean: Number(((sum / stored.length) * slope + intercept).toFixed(9)),
          });
        }
        expect(stack.slices[0].image.acquisition).toMatchObject({
          kernelLabel: 'Crisp',
          kvp: 80,
          thicknessMm: 0.5,
          acquisitionDate: '20260102',
          acquisitionTime: '030405.25',
          acquisitionNumber: 1,
        });
        expect(stack.slices[0].image.grid.pixelSpacingMm).toEqual([0.4, 0.3]);
      }
      expect(index.stacks).toHaveLength(2);
      expect(got).toEqual(expected.map((one) => ({ ...one, mean: Number(one.mean.toFixed(9)) })));
    });
  },
);

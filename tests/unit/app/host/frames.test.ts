import { mkdir, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { nodeCodecs } from '../../../../app/host/codecs/nodeCodecs.js';
import { decodeFrameBytes } from '../../../../core/dicom/index.js';
import { enhancedCt, frameValues } from '../../../corpus/enhancedCt.js';
import { rleFrame } from '../../../corpus/packBits.js';
import { hostForTest } from './hostForTest.js';

const PIXELS = 4 * 5;
const FRAMES = [{ z: 1 }, { z: 0 }];

/** A host with a folder of two multi-frame files open, one native and one in RLE. */
async function hostWithFrames() {
  const host = await hostForTest();
  const folder = join(host.home, 'study');
  await mkdir(folder);
  await writeFile(join(folder, 'native.dcm'), enhancedCt({ frames: FRAMES }));
  const fragments = [0, 1].map((frame) => rleFrame(frameValues(frame, PIXELS)));
  await writeFile(
    join(folder, 'rle.dcm'),
    enhancedCt({
      frames: FRAMES,
      series: '2.25.5',
      transferSyntaxUid: '1.2.840.10008.1.2.5',
      pixelData: { tag: 0x7fe00010, vr: 'OB', fragments },
    }),
  );
  const opened = await host.services.grants.open(folder);
  if (!opened.ok) throw new Error(opened.refusal.text);
  const { grant } = opened.value;
  const index = await host.services.library.index(grant);
  if (!index.ok) throw new Error(index.refusal.text);
  const slices = index.value.stacks.flatMap((stack) => stack.slices);
  const slice = (file: string, frame: number) => {
    const one = slices.find((each) => each.file === file && each.image.frame === frame);
    if (one === undefined) throw new Error(`no slice: ${file} ${frame}`);
    return one;
  };
  const ask = (fileId: number, query: string) =>
    host.ask(`/api/folders/${grant}/frames/${fileId}${query}`);
  return { host, slice, ask };
}

describe('GET /api/folders/:grant/frames/:fileId?frame=k', () => {
  it.each(['native.dcm', 'rle.dcm'])('answers one frame of %s alone', async (file) => {
    const { slice, ask } = await hostWithFrames();
    for (const frame of [1, 0]) {
      const { fileId, image } = slice(file, frame);
      const response = await ask(fileId, `?frame=${frame}`);
      expect(response.status).toBe(200);
      const bytes = new Uint8Array(await response.arrayBuffer());
      expect(response.headers.get('Content-Length')).toBe(String(bytes.length));
      expect(bytes.length).toBeLessThan(120);
      const stored = await decodeFrameBytes(bytes, image, nodeCodecs);
      expect(stored.ok && stored.value).toEqual(frameValues(frame, PIXELS));
    }
  });

  it.each(['2', '99', '-1', 'x', '1.5', ''])('knows no frame “%s”', async (frame) => {
    const { host, slice, ask } = await hostWithFrames();
    const response = await ask(slice('rle.dcm', 0).fileId, `?frame=${frame}`);
    expect(response.status).toBe(404);
    expect(await response.json()).toMatchObject({ code: 'no-such-frame' });
    expect(host.reported).toEqual([]);
  });

  it('answers the whole file where no frame is asked for', async () => {
    const { slice, ask } = await hostWithFrames();
    const response = await ask(slice('native.dcm', 0).fileId, '');
    const bytes = new Uint8Array(await response.arrayBuffer());
    expect([...bytes.subarray(128, 132)]).toEqual([0x44, 0x49, 0x43, 0x4d]);
  });
});

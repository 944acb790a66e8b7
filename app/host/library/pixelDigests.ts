import { createHash } from 'node:crypto';
import { decodeImage } from '../../../core/dicom/index.js';
import { byInstance, type IndexedImage } from '../../../core/stack/index.js';
import { nodeCodecs } from '../codecs/nodeCodecs.js';
import type { FileStamp } from './readFileHeader.js';
import { readFrameBytes } from './readFrameBytes.js';

/**
 * Adds to slices that share a SOP Instance UID what tells their pixels apart: files that are the same byte for byte
 * have the same pixels; else the stored values are compared, so that a compressed copy is known for one. All other
 * files are left alone. What can't be read gets no digest and so counts as different.
 */
export async function withPixelDigests(
  root: string,
  images: readonly IndexedImage[],
  stamps: readonly (FileStamp | undefined)[],
  signal?: AbortSignal,
): Promise<readonly IndexedImage[]> {
  const groups = [...byInstance(images).entries()].filter(
    ([instance, group]) => group.length > 1 && !instance.startsWith(' '),
  );
  if (groups.length === 0) return images;
  const digests = new Map<IndexedImage, string>();
  const bytesOf = ({ fileId, file }: IndexedImage) =>
    readFrameBytes(root, file, { stamp: stamps[fileId] });
  const fileDigests = new Map<string, string | undefined>();
  const fileDigest = async (one: IndexedImage): Promise<string | undefined> => {
    if (!fileDigests.has(one.file)) {
      const bytes = await bytesOf(one);
      fileDigests.set(one.file, bytes.ok ? digestOf(bytes.value) : undefined);
    }
    return fileDigests.get(one.file);
  };
  for (const [, group] of groups) {
    const whole: (string | undefined)[] = [];
    for (const one of group) {
      if (signal?.aborted === true) return images;
      whole.push(await fileDigest(one));
    }
    const isSame = whole.every((digest) => digest !== undefined && digest === whole[0]);
    for (const [index, one] of group.entries()) {
      const digest = isSame ? whole[index] : await valuesDigest(one, await bytesOf(one));
      if (digest !== undefined) digests.set(one, digest);
    }
  }
  return images.map((one) => {
    const pixelDigest = digests.get(one);
    return pixelDigest === undefined ? one : { ...one, pixelDigest };
  });
}

async function valuesDigest(
  { image }: IndexedImage,
  bytes: Awaited<ReturnType<typeof readFrameBytes>>,
): Promise<string | undefined> {
  if (!bytes.ok) return undefined;
  const decoded = await decodeImage(bytes.value, { frame: image.frame, codecs: nodeCodecs });
  if (!decoded.ok) return undefined;
  const { buffer, byteOffset, byteLength } = decoded.value.stored;
  return digestOf(new Uint8Array(buffer, byteOffset, byteLength));
}

function digestOf(bytes: Uint8Array): string {
  return createHash('sha256').update(bytes).digest('hex');
}

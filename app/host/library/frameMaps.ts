import type { FileHandle } from 'node:fs/promises';
import { type FramePlaces, frameWalkOf } from '../../../core/dicom/index.js';
import { type Result, refuse } from '../../../core/result.js';
import type { OpenFrame } from './openFrame.js';

/** How much of a file is read for its header, bytes; multi-frame headers are long. The last step is the whole file. */
const STEPS = [64 << 10, 1 << 20, 16 << 20] as const;

/** A header that does not end in this many bytes is none. */
const MOST_BYTES = 512 << 20;

/** Frame maps of so many files are kept; a pair needs two. */
const KEPT = 8;

/** Where the frames of multi-frame files stand, found once a file with positional reads. */
export interface FrameMaps {
  /** @param key tells files apart; a file that changed is another one */
  places(opened: OpenFrame, key: string, frame: number): Promise<Result<FramePlaces>>;
}

type FrameMap = Result<readonly Result<FramePlaces>[]>;

export function createFrameMaps(): FrameMaps {
  const maps = new Map<string, Promise<FrameMap>>();
  return {
    async places({ file, size }, key, frame) {
      const { mtimeMs } = await file.stat();
      const state = `${key} ${size} ${mtimeMs}`;
      const kept = maps.get(state);
      const reading = kept ?? readFrameMap(file, size);
      // The one used last stands last; the first is the one to go.
      maps.delete(state);
      maps.set(state, reading);
      const [oldest] = maps.keys();
      if (maps.size > KEPT && oldest !== undefined) maps.delete(oldest);
      const map = await forgetFailed(reading, () => maps.delete(state));
      if (!map.ok) return map;
      return map.value[frame] ?? refuse('frame-missing', `The file has no frame ${frame + 1}.`);
    },
  };
}

/** A read that failed is not kept: the next one may do better. */
async function forgetFailed(reading: Promise<FrameMap>, forget: () => void): Promise<FrameMap> {
  try {
    return await reading;
  } catch (error) {
    forget();
    throw error;
  }
}

async function readFrameMap(file: FileHandle, size: number): Promise<FrameMap> {
  const read = async (offset: number, length: number): Promise<Uint8Array> => {
    const bytes = new Uint8Array(length);
    let filled = 0;
    while (filled < length) {
      const { bytesRead } = await file.read(bytes, filled, length - filled, offset + filled);
      if (bytesRead === 0) throw new Error(`file became shorter: byte ${offset + filled}`);
      filled += bytesRead;
    }
    return bytes;
  };
  for (const step of [...STEPS, MOST_BYTES]) {
    const walk = frameWalkOf(await read(0, Math.min(step, size)), size);
    if (walk === undefined) continue;
    if (!walk.ok) return walk;
    let next = walk.value.next();
    while (!next.done) {
      next = walk.value.next(await read(next.value.offset, next.value.length));
    }
    return next.value;
  }
  return refuse('no-header', `No image header in its ${Math.min(size, MOST_BYTES)} bytes.`);
}

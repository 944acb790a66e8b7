import { type Result, refuse, success } from '../result.js';
import { type FrameWalk, isDeflated, locateFrames } from './locateFrames.js';
import { openDataSet } from './openDataSet.js';
import { readImages } from './readImage.js';

/**
 * The walk that finds the frames of a file, from its first bytes.
 *
 * @param bytes the beginning of the file
 * @param fileSize the size of the whole file, bytes
 * @returns undefined when more of the file is needed
 */
export function frameWalkOf(bytes: Uint8Array, fileSize: number): Result<FrameWalk> | undefined {
  const whole = bytes.length >= fileSize;
  const dataSet = openDataSet(bytes);
  if (!dataSet.ok) return whole ? dataSet : undefined;
  if (dataSet.value.pixelData === undefined && !whole) return undefined;
  const file = readImages(dataSet.value);
  if (!file.ok) return file;
  if (isDeflated(file.value)) {
    return refuse('deflated', 'The file is deflated: its frames can’t be read one by one.');
  }
  return success(locateFrames(dataSet.value, file.value, fileSize));
}

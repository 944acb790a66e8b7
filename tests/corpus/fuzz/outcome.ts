import type { Codecs } from '../../../core/dicom/index.js';
import { decodeImage, readHeader } from '../../../core/dicom/index.js';
import { buildStacks } from '../../../core/stack/index.js';

/** What came of a file: read, left out by its header, or refused when its pixels were to be decoded. */
export type Outcome = 'READ' | 'SKIP' | 'REFUSE';

/** How much of a file is given at a time, as the index gives it. */
const STEPS = [8192, 65536, 1 << 20] as const;

/** No file of the corpus is near this size; a decoded slice that is has been made from nothing. */
const PIXELS_AT_MOST = 1 << 24;

/**
 * Reads a file as the bench does: its header step by step, its stack, its first frame. Throws when anything but the
 * three outcomes comes of it: an exception, a reading without an end, values without their pixels.
 */
export async function outcomeOf(file: Uint8Array, codecs: Codecs): Promise<Outcome> {
  const reading = readInSteps(file);
  if (reading.kind === 'leftOut') {
    if (reading.code === '' || reading.text === '') throw new Error('left out without a reason');
    return 'SKIP';
  }
  buildStacks(reading.images.map((image) => ({ fileId: 0, file: 'fuzzed', image })));
  const decoded = await decodeImage(file, { codecs });
  if (!decoded.ok) {
    if (decoded.refusal.text === '') throw new Error('refused without a reason');
    return 'REFUSE';
  }
  const { image, stored } = decoded.value;
  const pixels = image.grid.rows * image.grid.columns;
  if (stored.length !== pixels || pixels > PIXELS_AT_MOST) {
    throw new Error(`pixels: ${stored.length} of ${pixels}`);
  }
  return 'READ';
}

function readInSteps(
  file: Uint8Array,
): Exclude<ReturnType<typeof readHeader>, { kind: 'needMore' }> {
  for (const step of [...STEPS, file.length]) {
    const reading = readHeader(file.subarray(0, Math.min(step, file.length)), file.length);
    if (reading.kind !== 'needMore') return reading;
  }
  throw new Error('the whole file was given and more is asked for');
}

import type { CtImage, ReadOptions } from '../../../core/dicom/index.js';
import { type FileReading, readFileHeader } from './readFileHeader.js';
import { shareEqual } from './shareEqual.js';

/** Files to be read, given by their paths, and how. */
export interface Batch {
  readonly paths: readonly string[];
  readonly options: ReadOptions;
}

/**
 * Reads the headers of a batch of files, given by their paths; the answers keep their order. What a slice has
 * in common with the one before is one and the same object in both, which a message between threads carries once.
 */
export function readBatch({ paths, options }: Batch): readonly FileReading[] {
  const share = createSharing();
  return paths.map((path) => share(readFileHeader(path, options)));
}

/** Makes the images of readings share what they have in common, each with the image before it. */
export function createSharing(): (found: FileReading) => FileReading {
  let before: CtImage | undefined;
  const next = (image: CtImage): CtImage => {
    before = shareEqual(before, image);
    return before;
  };
  return (found) => {
    const { reading } = found;
    if (reading.kind !== 'image') return found;
    const [first, ...rest] = reading.images;
    return { ...found, reading: { ...reading, images: [next(first), ...rest.map(next)] } };
  };
}

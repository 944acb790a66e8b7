import { type FileReading, readFileHeader } from './readFileHeader.js';

/** Reads the headers of a batch of files, given by their paths, in a worker thread; the answers keep their order. */
export function readBatch(paths: readonly string[]): readonly FileReading[] {
  return paths.map(readFileHeader);
}

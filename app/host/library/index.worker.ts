// The worker thread that reads the headers of a folder.
export { readBatch } from './readBatch.js';

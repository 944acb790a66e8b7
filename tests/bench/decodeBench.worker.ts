import { parentPort, workerData } from 'node:worker_threads';
import { nodeCodecs } from '../../app/host/codecs/nodeCodecs.js';
import { decodeImage } from '../../core/dicom/index.js';

const TIMES = 25;

// Decodes the bytes that it was started with again and again, and tells the median time, seconds.
const times: number[] = [];
for (let run = 0; run < TIMES; run++) {
  const start = performance.now();
  const decoded = await decodeImage(workerData as Uint8Array, { codecs: nodeCodecs });
  times.push((performance.now() - start) / 1000);
  if (!decoded.ok) throw new Error(decoded.refusal.text);
}
parentPort?.postMessage(times.sort((a, b) => a - b)[TIMES >> 1]);

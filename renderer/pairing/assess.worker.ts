import { expose } from 'comlink';
import { isReadWhole } from '../../core/dicom/index.js';
import {
  assessPair,
  keptSlices,
  type MeasuredSharpness,
  measureSharpness,
  proposePairs,
  type ReadSlice,
} from '../../core/pairing/index.js';
import { readFrame } from '../volumes/readFrame.js';
import type { AssessWorker, FrameOf } from './assessRequest.js';
import { measuredPair } from './measuredPair.js';
import { proposalOf } from './proposal.js';

/** Reads the slices that are asked for, from where the page says that they are. A slice that can't be read is none. */
function reader(frameOf: FrameOf, onRead: (slicesRead: number) => void = () => {}): ReadSlice {
  let read = 0;
  return async (stack, sliceIndex) => {
    const slice = stack.slices[sliceIndex];
    if (slice === undefined) return undefined;
    const { image, fileId } = slice;
    const frame = await frameOf(fileId, isReadWhole(image) ? undefined : image.frame);
    const stored = await readFrame(frame, image);
    read += 1;
    onRead(read);
    return stored.ok ? stored.value : undefined;
  };
}

const worker: AssessWorker = {
  assess: async (soft, sharp, overrides, frameOf, onProgress) => {
    const read = reader(frameOf, (done) => onProgress({ done, text: 'Measuring the pair' }));
    let detail: MeasuredSharpness | undefined;
    const assessment = await assessPair(soft, sharp, keptSlices(read), {
      overrides,
      measureSharpness: async (first, second, readSlice) => {
        detail = await measureSharpness(first, second, readSlice);
        return detail;
      },
    });
    return measuredPair(soft, sharp, assessment, detail);
  },
  propose: async (stacks, frameOf, onProgress) => {
    const proposals = await proposePairs(stacks, reader(frameOf), { onProgress });
    return proposals.map(proposalOf);
  },
};

expose(worker);

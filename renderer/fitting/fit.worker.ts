import { expose } from 'comlink';
import { type StentStacks, stentOnCutValue, stentValue } from '../../core/note/index.js';
import type { Stack } from '../../core/stack/index.js';
import { fitStent } from '../../core/stent/index.js';
import type { FitWorker } from './fitRequest.js';

/** Fits stents beside the page, so that no frame waits for it. */
const worker: FitWorker = {
  fit: ({ place, plane, soft, sharp, texture }) => {
    const storedOf = (stack: Stack, index: number) =>
      (stack === soft.stack ? soft : sharp).stored[index];
    const stacks: StentStacks = { soft: soft.stack, sharp: sharp.stack, storedOf };
    if (plane !== undefined) return stentOnCutValue(place, plane, stacks, texture);
    const fit = fitStent(place, soft.stack, sharp.stack, storedOf, texture);
    return { fit, value: stentValue(fit, stacks) };
  },
};

expose(worker);

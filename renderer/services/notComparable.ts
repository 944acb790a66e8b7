import { type RegionValue, type Shape, shapeArea } from '../../core/region/index.js';

/** What a region has on a stack whose positions can't be compared with those of the stack it was drawn on. */
export function positionsNotComparable(shape: Shape): RegionValue {
  return {
    n: 0,
    meanHu: null,
    sdHu: null,
    minHu: null,
    maxHu: null,
    medianHu: null,
    areaMm2: shapeArea(shape),
    sampledAreaMm2: 0,
    snr: null,
    sliceIndex: null,
    sliceOffsetMm: null,
    sopInstanceUid: null,
    standardErrorHu: null,
    placementHu: null,
    flags: [
      {
        code: 'positions-not-comparable',
        text: 'Not measured here: positions of the two stacks can’t be compared.',
      },
    ],
  };
}

export * from './latticeMap.js';
export * from './sliceDifference.js';

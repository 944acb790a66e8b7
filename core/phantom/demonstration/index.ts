export * from './acquisition.js';
export * from './identifiers.js';
export * from './makeSlice.js';
export * from './scene.js';
export * from './sliceElements.js';
export * from './trueRegions.js';
export * from './truth.js';

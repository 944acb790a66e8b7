export * from './buildStacks.js';
export type { IndexedImage } from './indexedImage.js';
export * from './stack.js';
export { tiltDegrees } from './tilt.js';
export { byInstance } from './withoutCopies.js';

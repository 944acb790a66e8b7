export * from './buildStacks.js';
export type { IndexedImage } from './indexedImage.js';
export { isUnscaled } from './isUnscaled.js';
export * from './stack.js';
export { tiltDegrees } from './tilt.js';
export { withMaskedPadding } from './withMaskedPadding.js';
export { byInstance } from './withoutCopies.js';

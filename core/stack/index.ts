export * from './buildStacks.js';
export * from './stack.js';
export { tiltDegrees } from './tilt.js';

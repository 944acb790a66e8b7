export * from './grid.js';
export * from './orientationLetters.js';
export * from './scaleBar.js';
export * from './vec3.js';

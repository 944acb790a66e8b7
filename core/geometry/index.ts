export * from './grid.js';
export * from './vec3.js';

export * from './roles.js';
export * from './shape.js';
export * from './value.js';

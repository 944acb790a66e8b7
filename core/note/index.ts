export * from './plan.js';
export * from './schema.js';

export * from './stack.js';

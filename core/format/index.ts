export * from './dicomText.js';
export * from './number.js';
export * from './position.js';
export * from './visibleText.js';

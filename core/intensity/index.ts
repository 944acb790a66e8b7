export * from './displayTable.js';
export * from './hounsfield.js';
export * from './presets.js';
export * from './unmarkedPadding.js';
export * from './window.js';

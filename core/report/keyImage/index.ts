export * from './drawSlice.js';
export * from './keyImage.js';
export * from './keyWindow.js';
export * from './plateField.js';
export * from './readoutLines.js';

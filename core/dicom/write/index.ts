export * from './decimalText.js';
export * from './element.js';
export * from './encoding.js';
export * from './utf8.js';
export * from './writeDataSet.js';
export * from './writeFile.js';

export * from './drawLine.js';
export * from './drawText.js';
export * from './encodePng.js';
export * from './raster.js';

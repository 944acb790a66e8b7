export * from './detrend.js';
export * from './edgeSpread.js';
export * from './fft.js';
export * from './fitEdge.js';
export * from './jackknife.js';
export * from './noisePower.js';
export * from './normalCdf.js';
export * from './radialSpectrum.js';

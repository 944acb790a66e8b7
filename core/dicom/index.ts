export * from './ctImage.js';

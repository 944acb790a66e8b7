export * from './agreement.js';
export * from './blandAltman.js';
export * from './intraclass.js';
export * from './studentT.js';

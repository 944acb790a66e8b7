export * from './bandCautions.js';
export * from './bandShares.js';
export * from './bandTable.js';
export * from './bandTables.js';
export * from './spillShare.js';

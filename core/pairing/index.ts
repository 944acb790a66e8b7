export * from './contract.js';
export * from './headerEvidence.js';

export * from './headerEvidence.js';

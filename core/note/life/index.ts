export * from './amend.js';
export * from './amendmentText.js';
export * from './canonicalJson.js';
export * from './completeness.js';
export * from './frameDigests.js';
export * from './recheck.js';
export * from './seal.js';
export * from './verify.js';

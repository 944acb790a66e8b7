export type { ReportOptions } from './context.js';
export { type ImageLookup, imageLookup, renamedLookup } from './imageLookup.js';
export { OWN, OWN_SCHEME } from './ownCodes.js';
export * from './toStructuredReport.js';

export * from './asSlice.js';
export { cutApodisation, type SampledStack } from './cutApodisation.js';
export {
  type CutOptions,
  cutStack,
  type StackCut,
  slicesOfCut,
  THICKEST_SLAB_MM,
} from './cutStack.js';
export * from './fitStentOnCut.js';
export { keysResponse } from './keysResponse.js';
export * from './measureOnCut.js';
export * from './obliquePlane.js';
export * from './resampling.js';
export { type StoredCut, storedOfCut } from './storedOfCut.js';
export * from './thicknessInPlane.js';

export * from './asSlice.js';
export {
  type CutOptions,
  cutStack,
  type StackCut,
  slicesOfCut,
  THICKEST_SLAB_MM,
} from './cutStack.js';
export * from './measureOnCut.js';
export * from './obliquePlane.js';
export * from './resampling.js';
export { type StoredCut, storedOfCut } from './storedOfCut.js';
export * from './thicknessInPlane.js';

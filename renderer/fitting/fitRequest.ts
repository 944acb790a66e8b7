import type { SliceGrid } from '../../core/geometry/index.js';
import type { StentValue } from '../../core/note/index.js';
import type { PairTexture } from '../../core/quality/index.js';
import type { Stack } from '../../core/stack/index.js';
import type { FittedStent, StentPlace } from '../../core/stent/index.js';
import type { StoredSlice } from '../volumes/volume.js';

/** A part of a stack around a stent: its slices, and their pixels in the same order; undefined for a gap. */
export interface StackPart {
  readonly stack: Stack;
  readonly stored: readonly (StoredSlice | undefined)[];
}

/** What a fit needs, fit for a message to a worker. */
export interface FitRequest {
  readonly place: StentPlace;
  /** The oblique plane to fit on; on the slices where there is none. */
  readonly plane: SliceGrid | undefined;
  readonly soft: StackPart;
  readonly sharp: StackPart;
  readonly texture: PairTexture;
}

/** A fit with what the note keeps of it. Indices of slices are those of the parts. */
export interface FitAnswer {
  readonly fit: FittedStent;
  readonly value: StentValue;
}

/** What the worker does. */
export interface FitWorker {
  fit(request: FitRequest): FitAnswer;
}

import type { Vec3 } from '../../core/geometry/index.js';
import type { Kernel } from '../../core/note/index.js';
import type { BandLine, Role, Shape } from '../../core/region/index.js';
import type { PlatePoint } from '../plates/platePoint.js';
import type { AppState, LinePurpose } from '../state/appState.js';
import type { Change } from '../state/store.js';

/** A line with what its purpose needs beside: a profile has a nominal inner diameter. */
export interface PurposedLine extends BandLine {
  readonly nominalMm?: number | undefined;
}

/** The finding that a stent belongs to, with its nominal inner diameter. */
export interface StentBelonging {
  readonly findingId: string;
  readonly nominalMm: number | null;
}

/** Where the pointer is and what is held with it. */
export interface ToolPointer {
  readonly kernel: Kernel;
  readonly point: PlatePoint;
  readonly shift: boolean;
  readonly alt: boolean;
}

/** What tools can do to the world: read the state and make named changes. */
export interface ToolPort {
  now(): AppState;
  change(name: string, change: Change): void;
  /** Measures a finished shape on both stacks and puts it into the note as a new region. */
  placeRegion(role: Role, shape: Shape): void;
  /** Measures a region's new shape and puts it into the note. Changes of one key in a row are undone as one. */
  reshapeRegion(id: string, shape: Shape, key?: string): void;
  /** Measures a finished line on both stacks and puts it into the note. */
  placeLine(purpose: LinePurpose, line: BandLine): void;
  /** Measures a line at its new place and puts it into the note; keys as for regions. */
  reshapeLine(purpose: LinePurpose, id: string, line: PurposedLine, key?: string): void;
  /** Finds the middle of the vessel next to a point, puts a stent there into the note, and has it fitted. */
  placeStent(pointMm: Vec3, of?: StentBelonging): void;
  /** Has a stent fitted from another place. */
  moveStent(id: string, centreMm: Vec3, key?: string): void;
  /** Puts the oblique plane across the line between two points into the note, and shows it. */
  placePlane(courseMm: readonly [Vec3, Vec3]): void;
  /** Gives an oblique plane another course; refused, and told, where something is measured on it. */
  movePlane(id: string, courseMm: readonly [Vec3, Vec3]): void;
  showPlane(id: string): void;
}

/**
 * A drag that is going on. It was made from a snapshot of the state, and each move is computed from that
 * snapshot and the present pointer, so that rounding never adds up.
 */
export interface Gesture {
  move(pointer: ToolPointer): void;
  /** The pointer was released: what was shown becomes final. */
  complete(pointer: ToolPointer): void;
  /** Esc, or something came between: all is as it was before the pointer went down. */
  cancel(): void;
}

/** A tool: what a press that becomes a drag does, and what a press that stays a click does. */
export interface Tool {
  readonly id: string;
  /** Begins a drag at the place where the pointer went down; undefined when nothing can be dragged there. */
  drag(port: ToolPort, start: ToolPointer): Gesture | undefined;
  click(port: ToolPort, start: ToolPointer): void;
}

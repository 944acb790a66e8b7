import type {
  FolderIndex,
  OpenFolder,
  Progress,
  RecentFolder,
  Settings,
} from '../../app/host/contract.js';
import type { VoiWindow } from '../../core/dicom/index.js';
import type { Vec3 } from '../../core/geometry/index.js';
import type { Evidence, Kernel, Link, Note, PairOverride } from '../../core/note/index.js';
import type { BandLine, Role, Shape } from '../../core/region/index.js';
import type { Stack } from '../../core/stack/index.js';
import type { MeasuredPair } from '../pairing/measuredPair.js';
import type { Proposal } from '../pairing/proposal.js';
import type { PlatePoint } from '../plates/platePoint.js';

export type ToolId =
  | 'window'
  | 'move'
  | 'zoom'
  | 'ellipse'
  | 'outline'
  | 'stent'
  | 'cut'
  | LinePurpose;

/** What a line is drawn for. */
export type LinePurpose = 'edge' | 'profile';

export type DialogId =
  | 'openFolder'
  | 'contents'
  | 'choosePair'
  | 'settings'
  | 'cautions'
  | 'keys'
  | 'numbers'
  | 'newContrast'
  | 'note'
  | 'recheck'
  | 'keyImage'
  | 'agreement'
  | 'export';

/** The two stacks on the plates; without a sharp one a single stack is read. */
export interface PairState {
  readonly soft: Stack;
  readonly sharp: Stack | undefined;
  readonly link: Link;
  readonly evidence: readonly Evidence[];
  /** What the reader answers for although the files differ in it. */
  readonly overrides: readonly PairOverride[];
  /** 'order' was chosen by series order and waits for the measure or the reader's look; 'measure' was put in order by it. */
  readonly chosenBy: 'order' | 'measure' | 'reader' | 'note';
}

/** How far the measuring of the pair is. Its evidence goes into the note when it is done. */
export type Assessment =
  | { readonly kind: 'none' }
  | { readonly kind: 'running'; readonly progress: Progress }
  | { readonly kind: 'done'; readonly measured: MeasuredPair }
  | { readonly kind: 'failed'; readonly text: string };

/** The four ways to compare; all but 'open' take one plate over the width of both. */
export type CompareWay = 'open' | 'fold' | 'alternate' | 'difference';

/** An oblique plane on the plates: each stack is shown as its cut, a stack of one slice. */
export interface ShownCut {
  readonly planeId: string;
  readonly soft: Stack;
  readonly sharp: Stack | undefined;
  /** The plates as they were on the slices. */
  readonly before: { readonly [K in Kernel]: PlateState };
}

/** The first of two points on the course of a vessel; the second one makes the cut. */
export interface CourseStart {
  readonly kernel: Kernel;
  readonly pointMm: Vec3;
}

/** How the plates are compared. */
export interface CompareState {
  readonly way: CompareWay;
  /** Where the edge of the fold stands, part of the plate's width; soft lies left of it. */
  readonly foldAt: number;
  /** The kernel that Alternate shows while no key is held. */
  readonly resting: Kernel;
  /** The key is held: the other kernel is shown. */
  readonly held: boolean;
  /** The difference's scale goes from −range to +range, HU. */
  readonly rangeHu: number;
}

export type PlotId = 'histogram' | 'bands' | 'noise' | 'visible' | 'stent';

export interface PlateSize {
  readonly widthPx: number;
  readonly heightPx: number;
}

/** What one plate shows. */
export interface PlateState {
  /** Position along the plate's stack, mm; the slice shown is the nearest one within half a spacing. */
  readonly alongMm: number;
  readonly window: VoiWindow;
  /** The patient-space place in the middle of the plate. */
  readonly centreMm: Vec3;
  /** CSS pixels per mm; 'fit' shows the whole slice, whatever the size of the plate. */
  readonly scalePxPerMm: number | 'fit';
  /** Zero until the plate has been laid out. */
  readonly size: PlateSize;
}

/** How far one stack has been read. */
export interface LoadingState {
  readonly done: number;
  readonly total: number;
  /** Slices that can't be shown, each with its sentence. */
  readonly gaps: ReadonlyMap<number, string>;
}

/** A shape that is being drawn or dragged and is no part of the note yet. */
export interface Draft {
  readonly kernel: Kernel;
  readonly role: Role;
  readonly shape: Shape;
  /** The region that is being changed; undefined for a new one. */
  readonly regionId: string | undefined;
}

/** A line that is being drawn or dragged and is no part of the note yet. */
export interface LineDraft extends BandLine {
  readonly kernel: Kernel;
  readonly purpose: LinePurpose;
  /** The line that is being changed; undefined for a new one. */
  readonly lineId: string | undefined;
}

/** An outline whose points are still being set. */
export interface OpenOutline {
  readonly kernel: Kernel;
  readonly role: Role;
  readonly pointsMm: readonly Vec3[];
}

/** Where the pointer is over a plate, CSS pixels; kept so, because the image can move under it. */
export interface Hover {
  readonly kernel: Kernel;
  readonly point: PlatePoint;
}

/** The crosshair that the arrow keys move. */
export interface Caret {
  readonly kernel: Kernel;
  readonly pointMm: Vec3;
}

export interface HistoryEntry {
  readonly label: string;
  /** The note before the change: putting it back is the inverse. */
  readonly note: Note;
  /** Changes that follow each other with the same key count as one. */
  readonly key: string | undefined;
}

export interface History {
  readonly undo: readonly HistoryEntry[];
  readonly redo: readonly HistoryEntry[];
}

export type SaveState =
  | { readonly kind: 'none' }
  | { readonly kind: 'saved'; readonly at: string }
  | { readonly kind: 'saving' }
  | { readonly kind: 'conflict'; readonly text: string }
  | { readonly kind: 'failed'; readonly text: string };

export interface Message {
  readonly tone: 'plain' | 'warning';
  readonly text: string;
}

/** Everything the page knows, as plain data. Pixels are in the volumes, beside it. */
export interface AppState {
  readonly version: string;
  readonly settings: Settings;
  readonly recent: readonly RecentFolder[];
  readonly folder: OpenFolder | undefined;
  /** What the reader has the texts of the folder's files read in; undefined for what the files state. */
  readonly characterSet?: string | undefined;
  readonly index: FolderIndex | undefined;
  /** Long work of the host that is running. */
  readonly job: Progress | undefined;
  readonly pair: PairState | undefined;
  /** Pairs that were found in the folder, best first; undefined until they were looked for. */
  readonly proposals: readonly Proposal[] | undefined;
  readonly assessment: Assessment;
  readonly compare: CompareState;
  /** The areas in which noise was measured are outlined on the plates. */
  readonly noiseAreas: boolean;
  /** Middle of the one among them that the reader chose in the list. */
  readonly noiseArea?: Vec3 | undefined;
  readonly plot: PlotId;
  readonly plates: { readonly [K in Kernel]: PlateState };
  readonly active: Kernel;
  readonly loading: { readonly [K in Kernel]: LoadingState };
  readonly note: Note | undefined;
  readonly history: History;
  readonly save: SaveState;
  readonly selected: string | undefined;
  readonly draft: Draft | undefined;
  readonly openOutline: OpenOutline | undefined;
  readonly lineDraft: LineDraft | undefined;
  /** The end of the selected line that the arrow keys move; undefined for all of it. */
  readonly lineEnd: 'from' | 'to' | undefined;
  /** The oblique plane on the plates; undefined while they show slices. */
  readonly cut: ShownCut | undefined;
  readonly courseStart: CourseStart | undefined;
  /** What a fitted stent leaves over is drawn over the plates while it is selected. */
  readonly residuals: boolean;
  /** Fits of stents that have come: with each there are curves to draw that there were not before. */
  readonly fitsAnswered: number;
  readonly caret: Caret | undefined;
  readonly hover: Hover | undefined;
  readonly tool: ToolId;
  readonly role: Role;
  readonly links: { readonly scroll: boolean; readonly window: boolean; readonly view: boolean };
  readonly smooth: boolean;
  readonly dialog: DialogId | undefined;
  readonly message: Message | undefined;
}

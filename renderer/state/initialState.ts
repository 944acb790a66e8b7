import type { AppState, LoadingState, PlateState } from './appState.js';

const plate: PlateState = {
  alongMm: 0,
  window: { centre: 300, width: 1200, function: 'LINEAR' },
  centreMm: [0, 0, 0],
  scalePxPerMm: 'fit',
  size: { widthPx: 0, heightPx: 0 },
};

export const NOTHING_LOADED: LoadingState = { done: 0, total: 0, gaps: new Map() };

/** No region chosen, drawn or pointed at, and nothing to undo. */
export const NOTHING_MARKED = {
  history: { undo: [], redo: [] },
  selected: undefined,
  draft: undefined,
  openOutline: undefined,
  lineDraft: undefined,
  lineEnd: undefined,
  cut: undefined,
  courseStart: undefined,
  caret: undefined,
  hover: undefined,
} as const satisfies Partial<AppState>;

/** The state before anything was opened. */
export const INITIAL_STATE: AppState = {
  ...NOTHING_MARKED,
  version: '',
  settings: { cautionsAccepted: false, theme: 'dark', letterKeys: true, reader: '' },
  recent: [],
  folder: undefined,
  index: undefined,
  job: undefined,
  pair: undefined,
  proposals: undefined,
  assessment: { kind: 'none' },
  compare: { way: 'open', foldAt: 0.5, resting: 'soft', held: false, rangeHu: 200 },
  noiseAreas: false,
  residuals: false,
  fitsAnswered: 0,
  plot: 'histogram',
  plates: { soft: plate, sharp: plate },
  active: 'soft',
  loading: { soft: NOTHING_LOADED, sharp: NOTHING_LOADED },
  note: undefined,
  save: { kind: 'none' },
  tool: 'window',
  role: 'lumen',
  links: { scroll: true, window: true, view: true },
  smooth: true,
  dialog: undefined,
  message: undefined,
};

import type { CtImage } from '../../../core/dicom/index.js';
import { alongNormal, type Vec3 } from '../../../core/geometry/index.js';
import { createNote, noteConditions, notePair, noteStudy } from '../../../core/note/index.js';
import type { Stack, StackSlice } from '../../../core/stack/index.js';
import type { AppState, PairState } from '../../../renderer/state/appState.js';
import { scrollTo } from '../../../renderer/state/changes/view.js';
import { INITIAL_STATE } from '../../../renderer/state/initialState.js';

export interface SampleStack {
  readonly series?: string;
  readonly seriesNumber?: number;
  readonly study?: string;
  /** Image Position (Patient) of each slice. */
  readonly positionsMm?: readonly Vec3[];
  readonly rowDirection?: Vec3;
  readonly columnDirection?: Vec3;
  readonly pixelSpacingMm?: readonly [number, number];
  readonly rows?: number;
  readonly columns?: number;
  readonly sliceSpacingMm?: number;
  readonly unit?: string;
}

/** Positions of an axial stack: count slices from z on, spacingMm apart. */
export function axial(count: number, spacingMm: number, z = 0): readonly Vec3[] {
  return Array.from({ length: count }, (_, index): Vec3 => [-10, -20, z + index * spacingMm]);
}

/** An invented stack of 40 × 40 pixels of 0.5 mm, in HU as stored. */
export function sampleStack(options: SampleStack = {}): Stack {
  const series = options.series ?? '2.25.88001.2';
  const positions = options.positionsMm ?? axial(5, 1);
  const slices = positions.map((positionMm, index): StackSlice => {
    const image = sampleImage(options, series, positionMm, index);
    return {
      fileId: index,
      file: `${series}/${index}`,
      image,
      alongMm: alongNormal(image.grid, positionMm),
    };
  });
  const [first, ...rest] = slices;
  if (first === undefined) throw new Error('invalid sample: no slices');
  return {
    key: series,
    slices: [first, ...rest],
    sliceSpacingMm: options.sliceSpacingMm ?? (slices[1]?.alongMm ?? 1) - first.alongMm,
    unit: options.unit ?? 'HU',
    findings: [],
  };
}

function sampleImage(
  options: SampleStack,
  series: string,
  positionMm: Vec3,
  index: number,
): CtImage {
  return {
    sopClassUid: '1.2.840.10008.5.1.4.1.1.2',
    sopInstanceUid: `${series}.${index + 1}`,
    transferSyntaxUid: '1.2.840.10008.1.2.1',
    imageType: ['DERIVED', 'SECONDARY', 'AXIAL'],
    synthetic: true,
    identity: { studyInstanceUid: options.study ?? '2.25.88001.1' },
    acquisition: {
      seriesInstanceUid: series,
      ...(options.seriesNumber === undefined ? {} : { seriesNumber: options.seriesNumber }),
      lossy: false,
    },
    grid: {
      positionMm,
      rowDirection: options.rowDirection ?? [1, 0, 0],
      columnDirection: options.columnDirection ?? [0, 1, 0],
      pixelSpacingMm: options.pixelSpacingMm ?? [0.5, 0.5],
      rows: options.rows ?? 40,
      columns: options.columns ?? 40,
    },
    pixels: {
      bitsAllocated: 16,
      bitsStored: 16,
      highBit: 15,
      signed: true,
      photometric: 'MONOCHROME2',
      rescale: { slope: 1, intercept: 0 },
      unit: options.unit ?? 'HU',
    },
    windows: [],
    findings: [],
  };
}

/** A state with both stacks on plates of 400 × 400 px at 20 px to the mm about (0, −10), on the slice at z. */
export function sampleState(
  options: {
    readonly soft?: Stack;
    readonly sharp?: Stack;
    readonly link?: PairState['link'];
    readonly z?: number;
  } = {},
): AppState {
  const soft = options.soft ?? sampleStack();
  const sharp = options.sharp ?? sampleStack({ series: '2.25.88001.3' });
  const pair: PairState = {
    soft,
    sharp,
    link: options.link ?? 'position',
    evidence: [],
    overrides: [],
    chosenBy: 'reader',
  };
  const plate = {
    ...INITIAL_STATE.plates.soft,
    centreMm: [0, -10, 0] as Vec3,
    scalePxPerMm: 20,
    size: { widthPx: 400, heightPx: 400 },
  };
  const note = createNote({
    id: 'note-1',
    now: '2026-01-10T10:00:00Z',
    reader: 'R. Eader',
    software: { name: 'Diptych', version: '0.0.0' },
    study: noteStudy(soft),
    pair: notePair(soft, sharp, pair),
    conditions: noteConditions(soft, sharp),
    synthetic: true,
  });
  const state: AppState = {
    ...INITIAL_STATE,
    pair,
    note,
    plates: { soft: plate, sharp: plate },
  };
  return scrollTo('soft', options.z ?? 2)(state);
}

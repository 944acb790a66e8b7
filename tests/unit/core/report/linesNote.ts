import type {
  Note,
  NoteEdge,
  NotePlane,
  NoteProfile,
  NoteProfileValue,
  NoteStent,
  StentValue,
} from '../../../../core/note/index.js';
import { PROFILE_DEFINITION } from '../../../../core/note/index.js';
import { SHARP_SERIES, SOFT_SERIES } from '../note/noteFixture.js';
import { richNote } from '../note/richNote.js';

/** Images of the fixture that lines and stents lie on: the third slice of each kernel. */
export const SOFT_IMAGE = `${SOFT_SERIES}.3`;
export const SHARP_IMAGE = `${SHARP_SERIES}.3`;

const ON_SOFT = {
  sliceIndex: 2,
  sliceOffsetMm: 0.125,
  sopInstanceUid: SOFT_IMAGE,
  frameNumber: null,
} as const;

const EDGE: NoteEdge = {
  id: 'E1',
  label: 'Edge 1',
  fromMm: [-6, -10, 2],
  toMm: [7, -10, 2],
  bandMm: 4,
  quote: 'soft',
  quoteReason: 'No rise on the sharp kernel. The soft one is quoted.',
  quoteBy: 'proposal',
  soft: {
    riseMm: 1.6789,
    riseErrorMm: 0.043,
    crossingsMm: 1.7012,
    blurFwhmMm: 1.5424,
    blurErrorMm: 0.037,
    fromHu: 50.25,
    toHu: -30,
    atMm: 6,
    n: 243,
    ...ON_SOFT,
    flags: [],
  },
  sharp: null,
};

export const PROFILE_VALUE: NoteProfileValue = {
  kind: 'stent',
  struts: [
    { atMm: 2.1, peakHu: 812.5 },
    { atMm: 5.18, peakHu: 790 },
  ],
  halfHeightMm: [2.55, 4.6125],
  visibleWidthMm: 2.0625,
  lumenHu: 401.25,
  peakDistanceMm: 3.0812,
  strutWidthMm: 0.9431,
  riseMm: 0.7154,
  // 5/16, so that 100 times it is the same number in binary too.
  narrowing: 0.3125,
  ...ON_SOFT,
  flags: [],
};

const PROFILE: NoteProfile = {
  id: 'X1',
  label: 'Profile 1',
  fromMm: [-8.5, -15.25, 2],
  toMm: [-4.5, -15.25, 2],
  bandMm: 1,
  nominalMm: 3,
  definition: PROFILE_DEFINITION,
  quote: 'sharp',
  quoteReason: 'Edges and widths: the sharp kernel blurs less.',
  quoteBy: 'proposal',
  soft: PROFILE_VALUE,
  sharp: {
    ...PROFILE_VALUE,
    visibleWidthMm: 2.4621,
    narrowing: 0.1793,
    sopInstanceUid: SHARP_IMAGE,
  },
};

const RESAMPLED = {
  code: 'resampled',
  text: 'Measured on an oblique cut, resampled by cubic convolution.',
};

/** A profile on the cut: it names no image. */
const PROFILE_ON_CUT: NoteProfile = {
  ...PROFILE,
  id: 'X2',
  label: 'Profile 2',
  plane: 'O1',
  quote: 'soft',
  quoteReason: 'looks truer here',
  quoteBy: 'reader',
  soft: {
    ...PROFILE_VALUE,
    visibleWidthMm: 2.3333,
    narrowing: 0.2222,
    sliceIndex: null,
    sliceOffsetMm: 0,
    sopInstanceUid: null,
    flags: [RESAMPLED],
  },
  sharp: null,
};

export const STENT_FIT: StentValue = {
  strutDiameterMm: { value: 3.1142, se: 0.0278 },
  lumenHu: { value: 345.26, se: 12.41 },
  wallWidthMm: { value: 0.6321, se: 0.0514 },
  wallHu: { value: 61.7, se: 18.3 },
  strutMassHuMm: { value: 412.6, se: 21.4 },
  blurSigmaMm: { value: 0.3517, se: 0.0126 },
  refitted: { strutDiameterMm: 0.0312, lumenHu: 14.6, refits: 32 },
  axisMm: [-6.51, -15.27, 2],
  axis: [0.02, 0.01, 0.9997],
  tiltDeg: 1.284,
  goodness: { chiSquare: 118.37, degreesOfFreedom: 104 },
  plain: { radiusMm: 1.09, softHu: 536.4, sharpHu: 418.9 },
  slices: 7,
  images: [
    {
      kernel: 'soft',
      sliceIndex: 2,
      sopInstanceUid: SOFT_IMAGE,
      frameNumber: null,
      noiseSdHu: 21.43,
    },
    {
      kernel: 'sharp',
      sliceIndex: 3,
      sopInstanceUid: `${SHARP_SERIES}.4`,
      frameNumber: null,
      noiseSdHu: 63.81,
    },
  ],
  reason: null,
};

const STENT: NoteStent = {
  id: 'S1',
  label: 'Stent 1',
  centreMm: [-6.5, -15.25, 2],
  nominalMm: 3,
  findingId: 'D1',
  fit: STENT_FIT,
};

/** A fit that gave no value. */
export const STENT_WITHOUT: NoteStent = {
  id: 'S2',
  label: 'Stent 2',
  centreMm: [-2.25, -15.25, 2],
  findingId: null,
  fit: {
    ...STENT_FIT,
    strutDiameterMm: null,
    lumenHu: null,
    wallWidthMm: null,
    wallHu: null,
    strutMassHuMm: null,
    blurSigmaMm: null,
    refitted: null,
    axisMm: null,
    axis: null,
    tiltDeg: null,
    goodness: null,
    plain: null,
    slices: 0,
    images: [],
    reason: { code: 'not-round', text: 'What is left over is not round: no value.' },
  },
};

const STENT_ON_CUT: NoteStent = {
  ...STENT,
  id: 'S3',
  label: 'Stent 3',
  plane: 'O1',
  findingId: null,
  fit: {
    ...STENT_FIT,
    strutDiameterMm: { value: 2.8713, se: 0.0391 },
    refitted: null,
    images: [],
  },
};

const PLANE: NotePlane = {
  id: 'O1',
  label: 'Cut 1',
  courseMm: [
    [-7.5, -15.25, 0.5],
    [-5.5, -15.25, 2.5],
  ],
  interpolation: 'cubic',
  slabMm: 1.5,
  angleDeg: 45,
  resampling: 'cubic convolution, mean over 1.5 mm',
  source: {
    soft: {
      first: { sopInstanceUid: `${SOFT_SERIES}.1`, frameNumber: null, sliceIndex: 0 },
      last: { sopInstanceUid: `${SOFT_SERIES}.4`, frameNumber: null, sliceIndex: 3 },
    },
    sharp: {
      first: { sopInstanceUid: `${SHARP_SERIES}.1`, frameNumber: null, sliceIndex: 0 },
      last: { sopInstanceUid: `${SHARP_SERIES}.4`, frameNumber: null, sliceIndex: 3 },
    },
  },
};

/** The rich note with invented edge lines, profiles, fitted stents and a cut; one region of it lies on the cut. */
export function linesNote(): Note {
  const note = richNote();
  return {
    ...note,
    edges: [EDGE],
    profiles: [PROFILE, PROFILE_ON_CUT],
    stents: [STENT, STENT_WITHOUT, STENT_ON_CUT],
    planes: [PLANE],
    regions: note.regions.map((region) =>
      region.id !== 'R1'
        ? region
        : {
            ...region,
            plane: 'O1',
            soft: region.soft && {
              ...region.soft,
              sliceIndex: null,
              sopInstanceUid: null,
              standardErrorHu: null,
              flags: [RESAMPLED],
            },
            sharp: null,
          },
    ),
  };
}

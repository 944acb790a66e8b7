import type { WriteElement } from '../../dicom/write/index.js';
import type { Code } from './code.js';

/** Our own coding scheme, for what no published one has a code. Private schemes begin with 99 (PS3.16 section 8.2). */
export const OWN_SCHEME = '99DIPTYCH';

/** Identifies the scheme: stableUid of its name, written out so that it never changes. */
const OWN_SCHEME_UID = '2.25.336553746648606168288501188345864865847';

function own(value: string, meaning: string): Code {
  return { value, scheme: OWN_SCHEME, meaning };
}

/** Every private code. What a value means is its Code Meaning; a value is never used again for another meaning. */
export const OWN = {
  cnr: own('CNR', 'Contrast to noise ratio'),
  pixelCount: own('N', 'Number of pixels with their centre inside'),
  sampledArea: own('SAMPLEDAREA', 'Number of pixels inside times the area of a pixel'),
  standardError: own('STDERR', 'Standard error of the mean, by noise alone'),
  placement: own('PLACEMENT', 'Placement sensitivity of the mean'),
  bandShare: own('BANDSHARE', 'Share of pixels in a density band'),
  edgeRise: own('EDGERISE', '10-90 % rise of a step fitted across an edge'),
  edgeRiseError: own('EDGERISESE', 'Standard error of the fitted 10-90 % rise'),
  edgeCrossings: own('EDGECROSS', '10-90 % distance read off the profile of an edge'),
  blurFwhm: own('BLURFWHM', 'Full width at half maximum of the Gaussian of a rise'),
  edgeStep: own('EDGESTEP', 'Step of the level across an edge'),
  edgePixels: own('EDGEN', 'Number of pixels in the band of an edge line'),
  visibleWidth: own('VISIBLEWIDTH', 'Visible width at half height'),
  strutPeaks: own('STRUTPEAKS', 'Distance of the peaks of two struts'),
  strutWidth: own('STRUTWIDTH', 'Width of a strut at half height'),
  innerRise: own('INNERRISE', '10-90 % distance of the inner edges'),
  lumenLevel: own('LUMENLEVEL', 'Level of the lumen in a profile'),
  narrowing: own('NARROWING', 'Artificial lumen narrowing against nominal diameter'),
  strutDiameter: own('STENTDIAM', 'Strut diameter, fitted on both kernels at once'),
  strutDiameterError: own('STENTDIAMSE', 'Standard error of the fitted strut diameter'),
  strutDiameterRefits: own('STENTDIAMRE', 'Standard error of the strut diameter by refits'),
  fittedLumen: own('STENTLUMEN', 'Lumen density, fitted on both kernels at once'),
  fittedLumenError: own('STENTLUMENSE', 'Standard error of the fitted lumen density'),
  fittedLumenRefits: own('STENTLUMENRE', 'Standard error of the lumen density by refits'),
  wallWidth: own('WALLWIDTH', 'Wall width, fitted on both kernels at once'),
  wallWidthError: own('WALLWIDTHSE', 'Standard error of the fitted wall width'),
  fittedWall: own('WALLHU', 'Wall density, fitted on both kernels at once'),
  fittedWallError: own('WALLHUSE', 'Standard error of the fitted wall density'),
  strutMass: own('STRUTMASS', 'Line mass of the strut ring, fitted'),
  strutMassError: own('STRUTMASSSE', 'Standard error of the fitted line mass'),
  sharedBlur: own('SHAREDBLUR', 'Standard deviation of the blur of both kernels'),
  sharedBlurError: own('SHAREDBLURSE', 'Standard error of the fitted blur'),
  chiSquare: own('CHISQUARE', 'Chi square of a fit'),
  degreesOfFreedom: own('DF', 'Degrees of freedom of a fit'),
  tilt: own('TILT', 'Angle of the vessel axis to the normal of the plane'),
  fittedSlices: own('FITSLICES', 'Slices of each kernel that were fitted'),
  plainRegion: own('PLAINREGION', 'Mean of a plain region inside a stent'),
  plainRadius: own('PLAINRADIUS', 'Radius of the plain region inside a stent'),
  stentNoise: own('STENTNOISE', 'SD of the noise around a stent'),
  formula: own('FORMULA', 'Formula'),
  definition: own('DEFINITION', 'Definition of the numbers of this group'),
  both: own('BOTH', 'Both kernels at once'),
  where: own('WHERE', 'Place of the measurement in patient space'),
  resampled: own('RESAMPLED', 'Resampled on an oblique plane'),
  nominal: own('NOMINAL', 'Nominal inner diameter'),
  kernel: own('KERNEL', 'Kernel of the pair'),
  soft: own('SOFT', 'Soft kernel'),
  sharp: own('SHARP', 'Sharp kernel'),
  kernelLabel: own('KERNELLABEL', 'Kernel label as in the files'),
  role: own('ROLE', 'Role of the region'),
  wall: own('WALL', 'Vessel wall'),
  reference: own('REFERENCE', 'Reference region'),
  nonCalcifiedPlaque: own('NCPLAQUE', 'Non-calcified plaque'),
  mixedPlaque: own('MIXEDPLAQUE', 'Mixed plaque'),
  referenceSite: own('REFSITE', 'Reference site'),
  assessability: own('ASSESSABILITY', 'Assessability'),
  reason: own('REASON', 'Reason'),
  detail: own('DETAIL', 'Detail of the finding'),
  place: own('PLACE', 'Place in the finding'),
  quoted: own('QUOTED', 'Quoted value'),
  operands: own('OPERANDS', 'What is compared'),
  slice: own('SLICE', 'Slice measured'),
  remark: own('REMARK', 'Remark'),
  noContour: own('NOCONTOUR', 'Contour not given'),
  provenance: own('PROVENANCE', 'Provenance'),
  caution: own('CAUTION', 'Caution'),
  identity: own('IDENTITY', 'Identity of the patient in this document'),
  amendment: own('AMENDMENT', 'Amendment'),
  absentSegments: own('ABSENT', 'Coronary segments that are absent'),
} as const;

/** Coding Scheme Identification Sequence (0008,0110): declares the private scheme (PS3.3 C.12.1.1.7). */
export function ownSchemeDeclaration(): WriteElement {
  return {
    tag: 0x00080110,
    vr: 'SQ',
    items: [
      [
        { tag: 0x00080102, vr: 'SH', value: OWN_SCHEME },
        { tag: 0x0008010c, vr: 'UI', value: OWN_SCHEME_UID },
        { tag: 0x00080115, vr: 'ST', value: 'Diptych private codes' },
        { tag: 0x00080103, vr: 'SH', value: '1' },
        { tag: 0x00080116, vr: 'ST', value: 'The authors of Diptych' },
      ],
    ],
  };
}

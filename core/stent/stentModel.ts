import { besselPair } from '../quality/index.js';
import { FREQUENCIES, RING_AREAS } from './frequencies.js';

/**
 * A stent in a vessel: the lumen fills the strut ring, a thin ring of unknown line mass, around it the wall, around that fat.
 * All round; blurred by one Gaussian that both kernels share, and by each kernel's own apodisation.
 */
export interface StentParameters {
  /** Radius of the circle in the middle of the struts, mm. */
  readonly radiusMm: number;
  /** From that circle to the outer border of the wall, mm. */
  readonly wallWidthMm: number;
  /** Standard deviation of the shared blur, mm. */
  readonly blurSigmaMm: number;
  readonly lumenHu: number;
  /** What the ring adds, per length of its circle, HU·mm. */
  readonly massHuMm: number;
  readonly wallHu: number;
  readonly fatHu: number;
  /** What the first kernel's level differs by from the last one's, HU: low frequencies are told least. */
  readonly levelHu: number;
}

export const PARAMETERS: readonly (keyof StentParameters)[] = [
  'radiusMm',
  'wallWidthMm',
  'blurSigmaMm',
  'lumenHu',
  'massHuMm',
  'wallHu',
  'fatHu',
  'levelHu',
];

/** As a list in the order of {@link PARAMETERS}, and back. */
export function listOf(parameters: StentParameters): Float64Array {
  return Float64Array.from(PARAMETERS, (name) => parameters[name]);
}

export function parametersOf(list: Float64Array): StentParameters {
  const [a = 0, b = 0, c = 0, d = 0, e = 0, f = 0, g = 0, h = 0] = list;
  return {
    radiusMm: a,
    wallWidthMm: b,
    blurSigmaMm: c,
    lumenHu: d,
    massHuMm: e,
    wallHu: f,
    fatHu: g,
    levelHu: h,
  };
}

/**
 * Spectrum of the blurred stent above fat, at {@link FREQUENCIES}, times 2πf df, and its derivatives by each parameter
 * in their order. A disc of radius R is R·J₁(2πRf)/f, a thin ring 2πR·J₀(2πRf) (Bracewell 2000, Hankel transforms),
 * the Gaussian exp(−2π²σ²f²). Level parameters add no wave.
 */
export function stentSpectrum(parameters: StentParameters): {
  readonly value: Float64Array;
  readonly slopes: readonly Float64Array[];
} {
  const { radiusMm, wallWidthMm, blurSigmaMm, lumenHu, massHuMm, wallHu, fatHu } = parameters;
  const outerMm = radiusMm + wallWidthMm;
  const size = FREQUENCIES.length;
  const value = new Float64Array(size);
  const slopes = PARAMETERS.map(() => new Float64Array(size));
  const [byRadius, byWall, byBlur, byLumen, byMass, byWallHu, byFat] = slopes as [
    Float64Array,
    Float64Array,
    Float64Array,
    Float64Array,
    Float64Array,
    Float64Array,
    Float64Array,
  ];
  for (let index = 0; index < size; index += 1) {
    const f = FREQUENCIES[index] as number;
    const k = 2 * Math.PI * f;
    const factor = (RING_AREAS[index] as number) * Math.exp(-((k * blurSigmaMm) ** 2) / 2);
    const inner = besselPair(k * radiusMm);
    const outer = besselPair(k * outerMm);
    const disc = ((radiusMm * inner.j1) / f) * factor;
    const ring = 2 * Math.PI * radiusMm * inner.j0 * factor;
    const outerDisc = ((outerMm * outer.j1) / f) * factor;
    const outerRing = 2 * Math.PI * outerMm * outer.j0 * factor;
    const total = (lumenHu - wallHu) * disc + massHuMm * ring + (wallHu - fatHu) * outerDisc;
    value[index] = total;
    // d(R·J₁(kR)/f)/dR = 2πR·J₀(kR), and J₀′ = −J₁.
    const ringSlope = 2 * Math.PI * (inner.j0 - k * radiusMm * inner.j1) * factor;
    byWall[index] = (wallHu - fatHu) * outerRing;
    byRadius[index] =
      (lumenHu - wallHu) * ring + massHuMm * ringSlope + (wallHu - fatHu) * outerRing;
    byBlur[index] = -k * k * blurSigmaMm * total;
    byLumen[index] = disc;
    byMass[index] = ring;
    byWallHu[index] = outerDisc - disc;
    byFat[index] = -outerDisc;
  }
  return { value, slopes };
}

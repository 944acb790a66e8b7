import { measureRegion } from '../../../core/region/index.js';
import { measureProfile } from '../../../core/stent/index.js';
import type { StentPair } from './stentPhantom.js';
import { strutDiameterMm, type TrueStent } from './stentScene.js';

/** What is read without a fit, at the true centre: the best case for it. */
export interface PlainReading {
  /** Mean of a round region of 70 % of the strut radius, with its standard error by noise. */
  readonly regionHu: number | null;
  readonly regionErrorHu: number | null;
  /** Visible width at half height of a profile, and the level that it takes for the lumen's. */
  readonly visibleWidthMm: number | null;
  readonly levelHu: number | null;
}

const PART = 0.7;

/** Reads a stent on one kernel as a reader would without a fit. */
export function plainReading(
  pair: StentPair,
  side: 'soft' | 'sharp',
  stent: TrueStent,
): PlainReading {
  const { stack, stored } = pair[side];
  const texture = pair.texture[side];
  const storedOf = (slice: number) => stored[slice];
  const [x, y] = stent.centreMm;
  const radiusMm = (PART * strutDiameterMm(stent)) / 2;
  const centreMm = [x, y, 0] as const;
  const region = measureRegion(
    { kind: 'ellipse', centreMm, radiiMm: [radiusMm, radiusMm] },
    stack,
    storedOf,
    texture ?? undefined,
  );
  const reach = stent.innerDiameterMm / 2 + 2.5;
  const profile = measureProfile(
    { fromMm: [x - reach, y, 0], toMm: [x + reach, y, 0], bandMm: 0.8 },
    stack,
    storedOf,
    texture ?? undefined,
  );
  return {
    regionHu: region.meanHu,
    regionErrorHu: region.standardErrorHu,
    visibleWidthMm: profile.visibleWidthMm,
    levelHu: profile.lumenHu,
  };
}

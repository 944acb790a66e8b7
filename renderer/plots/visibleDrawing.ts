import { line, type ScaleLogarithmic, scaleLog } from 'd3';
import type { Kernel } from '../../core/note/index.js';
import {
  type KernelTexture,
  LEAST_DIAMETER_MM,
  MOST_DIAMETER_MM,
  type PairTexture,
  visibleContrast,
} from '../../core/quality/index.js';

/** The contrast from which discs are seen on one kernel, over their diameter. */
export interface VisibleCurve {
  readonly kernel: Kernel;
  readonly points: readonly { readonly diameterMm: number; readonly contrastHu: number }[];
}

export interface VisibleDrawing {
  readonly x: ScaleLogarithmic<number, number>;
  readonly y: ScaleLogarithmic<number, number>;
  readonly lines: Readonly<Record<Kernel, string>>;
}

export const VISIBLE_MARGIN_PX = { top: 18, right: 14, bottom: 20, left: 40 } as const;

/** The least contrast that an eye tells apart under ideal conditions, HU: common practice, no source. */
export const LEAST_FOR_EYES_HU = 20;

const SHOWN_MM = [0.4, MOST_DIAMETER_MM] as const;
const SHOWN_HU = [5, 1000] as const;
/** Steps of a curve: so many that its bends look round. */
const STEPS = 48;

export const DIAMETER_TICKS_MM = [0.5, 1, 2, 5, 10] as const;
export const CONTRAST_TICKS_HU = [10, 100, 1000] as const;

/** The curves of both kernels for one k. A kernel whose texture gives none has an empty one. */
export function visibleCurves(texture: PairTexture, k: number): readonly VisibleCurve[] {
  return (['soft', 'sharp'] as const).map((kernel) => ({
    kernel,
    points: pointsOf(texture[kernel], k),
  }));
}

function pointsOf(texture: KernelTexture | null, k: number): VisibleCurve['points'] {
  if (texture === null) return [];
  const ratio = MOST_DIAMETER_MM / LEAST_DIAMETER_MM;
  return Array.from({ length: STEPS + 1 }, (_, step) => step / STEPS).flatMap((share) => {
    const diameterMm = LEAST_DIAMETER_MM * ratio ** share;
    const contrast = visibleContrast(texture, diameterMm, k);
    return contrast.ok ? [{ diameterMm, contrastHu: contrast.value }] : [];
  });
}

/** Both axes are logarithmic: contrast falls about as a power of the diameter. Curves end at the frame. */
export function visibleDrawing(
  curves: readonly VisibleCurve[],
  widthPx: number,
  heightPx: number,
): VisibleDrawing {
  const { left, right, top, bottom } = VISIBLE_MARGIN_PX;
  const x = scaleLog(SHOWN_MM, [left, widthPx - right]);
  const y = scaleLog(SHOWN_HU, [heightPx - bottom, top]);
  const curve = line<VisibleCurve['points'][number]>()
    .x(({ diameterMm }) => x(diameterMm))
    .y(({ contrastHu }) => y(contrastHu))
    .defined(
      ({ diameterMm, contrastHu }) =>
        diameterMm >= SHOWN_MM[0] && contrastHu >= SHOWN_HU[0] && contrastHu <= SHOWN_HU[1],
    );
  const lineOf = (kernel: Kernel): string =>
    curve(curves.find((one) => one.kernel === kernel)?.points ?? []) ?? '';
  return { x, y, lines: { soft: lineOf('soft'), sharp: lineOf('sharp') } };
}

/** A place held inside the frame, so that a region beyond it is still seen at its edge. */
export function heldInside(
  { x, y }: Pick<VisibleDrawing, 'x' | 'y'>,
  diameterMm: number,
  contrastHu: number,
): readonly [number, number] {
  const within = (value: number, [low, high]: readonly [number, number]): number =>
    Math.min(high, Math.max(low, value));
  return [x(within(diameterMm, SHOWN_MM)), y(within(contrastHu, SHOWN_HU))];
}

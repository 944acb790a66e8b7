import { formatFixed, formatSigned } from '../../core/format/index.js';
import { RANGE_LIMITS_HU, setRange } from '../state/changes/compare.js';
import type { Store } from '../state/store.js';
import { differenceColour } from './differenceColours.js';

export interface DifferenceScaleProps {
  readonly rangeHu: number;
  /** The slices' pixels do not fall together, so that one of them was interpolated. */
  readonly interpolated: boolean;
  readonly store: Store;
}

const WIDTH_PX = 220;
const HEIGHT_PX = 10;
const BANDS = 44;
/** Each press of an arrow makes the range larger or smaller by this factor. */
const STEP = 1.25;

/** The legend of a difference: its colours with their HU, what they mean, and the range, which keys change. */
export function DifferenceScale({ rangeHu, interpolated, store }: DifferenceScaleProps) {
  const onKeyDown = (event: KeyboardEvent): void => {
    const factor = {
      ArrowRight: STEP,
      ArrowUp: STEP,
      ArrowLeft: 1 / STEP,
      ArrowDown: 1 / STEP,
    }[event.key];
    if (factor === undefined) return;
    event.preventDefault();
    event.stopPropagation();
    store.change('Scale of the difference', setRange(rangeHu * factor));
  };
  const width = WIDTH_PX / BANDS;
  return (
    <div
      class="difference-scale"
      onPointerDown={(event) => event.stopPropagation()}
      onPointerUp={(event) => event.stopPropagation()}
    >
      <p class="title">Sharp − soft, {interpolated ? 'the coarser interpolated, ' : ''}HU</p>
      <div
        class="scale"
        role="slider"
        aria-label="Range of the difference"
        aria-valuemin={RANGE_LIMITS_HU[0]}
        aria-valuemax={RANGE_LIMITS_HU[1]}
        aria-valuenow={rangeHu}
        aria-valuetext={`from ${formatFixed(-rangeHu, 0)} to ${formatFixed(rangeHu, 0)} HU`}
        tabIndex={0}
        onKeyDown={onKeyDown}
      >
        <svg width={WIDTH_PX} height={HEIGHT_PX} aria-hidden="true">
          {Array.from({ length: BANDS }, (_, band) => {
            const part = (2 * band) / (BANDS - 1) - 1;
            return (
              <rect
                key={part}
                x={band * width}
                width={width + 0.5}
                height={HEIGHT_PX}
                fill={differenceColour(part)}
              />
            );
          })}
        </svg>
        <div class="ticks" aria-hidden="true">
          {[-1, -0.5, 0, 0.5, 1].map((part) => (
            <span key={part}>
              {formatSigned(part * rangeHu, (part * rangeHu) % 1 === 0 ? 0 : 1)}
            </span>
          ))}
        </div>
      </div>
      <p class="note">
        <span class="no-data" aria-hidden="true" /> no data · for looking only, never for measuring
      </p>
    </div>
  );
}

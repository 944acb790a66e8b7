import { useMemo } from 'preact/hooks';
import { formatFixed } from '../../core/format/index.js';
import { type PairedHistogram, pairedHistogram } from '../../core/region/index.js';
import { useSize } from '../panels/parts/useSize.js';
import { histogramDrawing, histogramSummary, MARGIN_PX } from './histogramDrawing.js';

export interface HistogramProps {
  /** Name of the selected region; undefined when none is. */
  readonly label: string | undefined;
  /** Values of the region's pixels on each kernel, padding left out; empty where there are none. */
  readonly soft: ArrayLike<number>;
  readonly sharp: ArrayLike<number>;
  readonly meanSoft: number | null;
  readonly meanSharp: number | null;
  readonly unit: string;
}

/** Histogram of the selected region on both kernels over the same bins: soft solid, sharp dashed. */
export function Histogram(props: HistogramProps) {
  const [ref, size] = useSize<HTMLDivElement>();
  const histogram = useMemo(
    () => pairedHistogram(props.soft, props.sharp),
    [props.soft, props.sharp],
  );
  return (
    <div class="plot-area" ref={ref}>
      {histogram === undefined && (
        <p class="empty">
          {props.label === undefined
            ? 'Select a region to see how its pixel values spread on both kernels.'
            : 'This region holds no pixels that can be measured.'}
        </p>
      )}
      {histogram !== undefined && size !== undefined && size.heightPx > 60 && (
        <Picture {...props} histogram={histogram} {...size} />
      )}
    </div>
  );
}

interface PictureProps extends HistogramProps {
  readonly histogram: PairedHistogram;
  readonly widthPx: number;
  readonly heightPx: number;
}

function Picture(props: PictureProps) {
  const { histogram, widthPx, heightPx, meanSoft, meanSharp } = props;
  const { x, y, softLine, softArea, sharpLine } = histogramDrawing(histogram, widthPx, heightPx);
  const bottom = heightPx - MARGIN_PX.bottom;
  const right = widthPx - MARGIN_PX.right;
  return (
    <svg
      width={widthPx}
      height={heightPx}
      role="img"
      aria-label={histogramSummary(histogram, props.unit, meanSoft, meanSharp)}
    >
      {y
        .ticks(4)
        .filter(Number.isInteger)
        .map((count) => (
          <g key={count}>
            <path
              class={count === 0 ? 'axis' : 'grid'}
              d={`M${MARGIN_PX.left} ${y(count)}H${right}`}
            />
            <text x={MARGIN_PX.left - 6} y={y(count) + 4} text-anchor="end">
              {formatFixed(count, 0)}
            </text>
          </g>
        ))}
      {x.ticks(Math.max(2, Math.floor(widthPx / 70))).map((hu) => (
        <g key={hu}>
          <path class="axis" d={`M${x(hu)} ${bottom}v4`} />
          <text x={x(hu)} y={bottom + 16} text-anchor="middle">
            {formatFixed(hu, 0)}
          </text>
        </g>
      ))}
      <text x={right} y={heightPx - 2} text-anchor="end">
        {props.unit}
      </text>
      <text x={MARGIN_PX.left} y={heightPx - 2}>
        pixels in bins of {formatFixed(histogram.binWidthHu, 1)} {props.unit}
      </text>
      <path class="fill soft" d={softArea} />
      <path class="series soft" d={softLine} />
      <path class="series sharp" d={sharpLine} />
      {meanSoft !== null && <path class="mean soft" d={meanLine(x(meanSoft), bottom)} />}
      {meanSharp !== null && <path class="mean sharp" d={meanLine(x(meanSharp), bottom)} />}
      <Key right={right} single={sharpLine === ''} />
    </svg>
  );
}

/** The line of a mean: from the axis to the top of the picture, and a little under the axis. */
function meanLine(px: number, bottomPx: number): string {
  return `M${px} ${MARGIN_PX.top}V${bottomPx + 5}`;
}

function Key({ right, single }: { readonly right: number; readonly single: boolean }) {
  return (
    <g>
      <path class="series soft" d={`M${right - 118} 11h18`} />
      <text class="soft" x={right - 95} y={15}>
        soft
      </text>
      {!single && (
        <>
          <path class="series sharp" d={`M${right - 58} 11h18`} />
          <text class="sharp" x={right} y={15} text-anchor="end">
            sharp
          </text>
        </>
      )}
    </g>
  );
}

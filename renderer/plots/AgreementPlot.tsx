import type { Agreement } from '../../core/agreement/index.js';
import { formatFixed } from '../../core/format/index.js';
import { useSize } from '../panels/parts/useSize.js';
import { agreementDrawing, ROOM_PX } from './agreementDrawing.js';

export interface AgreementPlotProps {
  readonly agreement: Agreement;
  /** 'mean, HU'. */
  readonly quantity: string;
  readonly description: string;
}

/** The plot of Bland and Altman: each region's difference over its mean, with bias and limits of agreement. */
export function AgreementPlot({ agreement, quantity, description }: AgreementPlotProps) {
  const [ref, size] = useSize<HTMLDivElement>();
  return (
    <div class="agreement-plot plot" ref={ref}>
      {size !== undefined && size.heightPx > 80 && (
        <Picture {...{ agreement, quantity, description }} {...size} />
      )}
    </div>
  );
}

interface PictureProps extends AgreementPlotProps {
  readonly widthPx: number;
  readonly heightPx: number;
}

function Picture({ agreement, quantity, description, widthPx, heightPx }: PictureProps) {
  const { x, y, points, lines } = agreementDrawing(agreement, widthPx, heightPx);
  const [right, bottom] = [widthPx - ROOM_PX.right, heightPx - ROOM_PX.bottom];
  return (
    <svg width={widthPx} height={heightPx} role="img" aria-label={description}>
      {y.ticks(5).map((value) => (
        <g key={value}>
          <path class={value === 0 ? 'axis' : 'grid'} d={`M${ROOM_PX.left} ${y(value)}H${right}`} />
          <text x={ROOM_PX.left - 6} y={y(value) + 4} text-anchor="end">
            {formatFixed(value, digitsOf(y.domain()))}
          </text>
        </g>
      ))}
      {x.ticks(Math.max(2, Math.floor(widthPx / 90))).map((value) => (
        <g key={value}>
          <path class="axis" d={`M${x(value)} ${bottom}v4`} />
          <text x={x(value)} y={bottom + 16} text-anchor="middle">
            {formatFixed(value, digitsOf(x.domain()))}
          </text>
        </g>
      ))}
      <text x={right} y={heightPx - 3} text-anchor="end">
        mean of both readings: {quantity}
      </text>
      {lines.map(({ kind, value, y: at }) => (
        <g key={`${kind} ${value}`}>
          <path class={`agreement-${kind}`} d={`M${ROOM_PX.left} ${at}H${right}`} />
          <text x={right} y={at - 4} text-anchor="end">
            {formatFixed(value, 1)}
          </text>
        </g>
      ))}
      {points.map(({ x: px, y: py }, index) => (
        <circle key={index} class="agreement-point" cx={px} cy={py} r={4} />
      ))}
    </svg>
  );
}

function digitsOf([from = 0, to = 1]: readonly number[]): number {
  return Math.abs(to - from) < 10 ? 1 : 0;
}

import { formatFixed } from '../../core/format/index.js';
import { useSize } from '../panels/parts/useSize.js';
import {
  ACROSS_MARGIN_PX,
  type Across,
  type AcrossScales,
  type AcrossSeries,
  type AcrossSpan,
  acrossPath,
  acrossScales,
  spanY,
} from './acrossDrawing.js';

export interface AcrossPlotProps {
  /** Undefined where there is nothing to draw. */
  readonly across: Across | undefined;
  /** What to say then. */
  readonly reason: string;
}

/** What both kernels show across a vessel: the measured profiles, the fitted curves, struts and widths. */
export function AcrossPlot({ across, reason }: AcrossPlotProps) {
  const [ref, size] = useSize<HTMLDivElement>();
  const isEmpty = across === undefined || across.series.length === 0;
  return (
    <div class="plot-area" ref={ref}>
      {isEmpty && <p class="empty">{reason}</p>}
      {!isEmpty && size !== undefined && size.heightPx > 60 && (
        <Picture across={across} widthPx={size.widthPx} heightPx={size.heightPx} />
      )}
    </div>
  );
}

interface PictureProps {
  readonly across: Across;
  readonly widthPx: number;
  readonly heightPx: number;
}

function Picture({ across, widthPx, heightPx }: PictureProps) {
  const scales = acrossScales(across, widthPx, heightPx);
  const { x, y } = scales;
  const bottom = heightPx - ACROSS_MARGIN_PX.bottom;
  const right = widthPx - ACROSS_MARGIN_PX.right;
  const hasFit = across.series.some(({ fitted }) => fitted.length > 0);
  return (
    <svg width={widthPx} height={heightPx} role="img" aria-label={across.summary}>
      {y.ticks(Math.max(2, Math.floor(heightPx / 45))).map((hu) => (
        <g key={hu}>
          <path class="grid" d={`M${ACROSS_MARGIN_PX.left} ${y(hu)}H${right}`} />
          <text x={ACROSS_MARGIN_PX.left - 6} y={y(hu) + 4} text-anchor="end">
            {formatFixed(hu, 0)}
          </text>
        </g>
      ))}
      <path class="axis" d={`M${ACROSS_MARGIN_PX.left} ${bottom}H${right}`} />
      {x.ticks(Math.max(2, Math.floor(widthPx / 60))).map((mm) => (
        <g key={mm}>
          <path class="axis" d={`M${x(mm)} ${bottom}v4`} />
          <text x={x(mm)} y={bottom + 15} text-anchor="middle">
            {formatFixed(mm, 0)}
          </text>
        </g>
      ))}
      <text x={ACROSS_MARGIN_PX.left} y={heightPx - 2}>
        {hasFit ? 'dots measured, lines fitted' : '○ struts, half height'}
      </text>
      <text x={right} y={heightPx - 2} text-anchor="end">
        {across.axis}
      </text>
      <text x={2} y={13}>
        HU
      </text>
      {across.uprightMm.map((mm) => (
        <path key={mm} class="strut-line" d={`M${x(mm)} ${ACROSS_MARGIN_PX.top}V${bottom}`} />
      ))}
      {across.spans.map((span, index) => (
        <Span key={span.name} span={span} scales={scales} atPx={spanY(index, heightPx)} />
      ))}
      {across.series.map((series) => (
        <Series key={series.kernel} series={series} scales={scales} />
      ))}
      <path class="series soft" d={`M${right - 118} 9h18`} />
      <text class="soft" x={right - 95} y={13}>
        soft
      </text>
      <path class="series sharp" d={`M${right - 58} 9h18`} />
      <text class="sharp" x={right} y={13} text-anchor="end">
        sharp
      </text>
    </svg>
  );
}

function Series({
  series: { kernel, measured, fitted, marks },
  scales,
}: {
  readonly series: AcrossSeries;
  readonly scales: AcrossScales;
}) {
  const { x, y } = scales;
  return (
    <g class="across" data-side={kernel}>
      {fitted.length > 0 &&
        measured.map(({ mm, hu }) => (
          <circle key={mm} class={`dot ${kernel}`} cx={x(mm)} cy={y(hu)} r={1.8} />
        ))}
      <path
        class={`series ${kernel}`}
        d={acrossPath(fitted.length > 0 ? fitted : measured, scales)}
      />
      {marks.map(({ mm, hu, name }) => (
        <circle key={`${name} ${mm}`} class={`edge-mark ${kernel}`} cx={x(mm)} cy={y(hu)} r={3.5}>
          <title>{`${name}, ${kernel} kernel`}</title>
        </circle>
      ))}
    </g>
  );
}

function Span({
  span: { fromMm, toMm, name },
  scales: { x },
  atPx,
}: {
  readonly span: AcrossSpan;
  readonly scales: AcrossScales;
  readonly atPx: number;
}) {
  return (
    <g class="span">
      <path d={`M${x(fromMm)} ${atPx - 3}v6m0 -3H${x(toMm)}m0 -3v6`} />
      <text x={(x(fromMm) + x(toMm)) / 2} y={atPx - 2} text-anchor="middle">
        {name}
      </text>
    </g>
  );
}

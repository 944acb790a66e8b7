import { formatFixed } from '../../core/format/index.js';
import type { LineEdge } from '../../core/quality/index.js';
import { useSize } from '../panels/parts/useSize.js';
import { EDGE_MARGIN_PX, edgeDrawing, edgeSummary, profileDrawing } from './edgeDrawing.js';

export interface EdgePlotProps {
  readonly label: string;
  /** Undefined on a kernel where the line shows no single edge. */
  readonly soft: LineEdge | undefined;
  readonly sharp: LineEdge | undefined;
  /** What to say where no kernel has a profile. */
  readonly reason: string;
}

/** The measured profile across an edge on both kernels, with the fitted step and its 10 and 90 % marks. */
export function EdgePlot(props: EdgePlotProps) {
  const [ref, size] = useSize<HTMLDivElement>();
  const isEmpty = props.soft === undefined && props.sharp === undefined;
  return (
    <div class="plot-area" ref={ref}>
      {isEmpty && <p class="empty">{props.reason}</p>}
      {!isEmpty && size !== undefined && size.heightPx > 60 && <Picture {...props} {...size} />}
    </div>
  );
}

function Picture({
  label,
  soft,
  sharp,
  widthPx,
  heightPx,
}: EdgePlotProps & { readonly widthPx: number; readonly heightPx: number }) {
  const edges = [soft, sharp].filter((edge) => edge !== undefined);
  const drawing = edgeDrawing(edges, widthPx, heightPx);
  const { x, y } = drawing;
  const bottom = heightPx - EDGE_MARGIN_PX.bottom;
  const right = widthPx - EDGE_MARGIN_PX.right;
  return (
    <svg width={widthPx} height={heightPx} role="img" aria-label={edgeSummary(label, soft, sharp)}>
      {y.ticks(Math.max(2, Math.floor(heightPx / 40))).map((hu) => (
        <g key={hu}>
          <path class="grid" d={`M${EDGE_MARGIN_PX.left} ${y(hu)}H${right}`} />
          <text x={EDGE_MARGIN_PX.left - 6} y={y(hu) + 4} text-anchor="end">
            {formatFixed(hu, 0)}
          </text>
        </g>
      ))}
      <path class="axis" d={`M${EDGE_MARGIN_PX.left} ${bottom}H${right}`} />
      {x.ticks(Math.max(2, Math.floor(widthPx / 60))).map((mm) => (
        <g key={mm}>
          <path class="axis" d={`M${x(mm)} ${bottom}v4`} />
          <text x={x(mm)} y={bottom + 15} text-anchor="middle">
            {formatFixed(mm, 0)}
          </text>
        </g>
      ))}
      <text x={EDGE_MARGIN_PX.left} y={heightPx - 2}>
        ○ 10 and 90 %
      </text>
      <text x={right} y={heightPx - 2} text-anchor="end">
        mm from the edge
      </text>
      <text x={2} y={13}>
        HU
      </text>
      {soft !== undefined && <Profile side="soft" edge={soft} drawing={drawing} />}
      {sharp !== undefined && <Profile side="sharp" edge={sharp} drawing={drawing} />}
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

function Profile({
  side,
  edge,
  drawing,
}: {
  readonly side: 'soft' | 'sharp';
  readonly edge: LineEdge;
  readonly drawing: ReturnType<typeof edgeDrawing>;
}) {
  const { dots, curve, marks } = profileDrawing(edge, drawing);
  return (
    <g class="edge-profile" data-side={side}>
      {dots.map((dot) => (
        <circle key={dot.x} class={`dot ${side}`} cx={dot.x} cy={dot.y} r={1.3} />
      ))}
      <path class={`series ${side}`} d={curve} />
      {marks.map((mark) => (
        <circle
          key={mark.percent}
          class={`edge-mark ${side}`}
          data-percent={mark.percent}
          cx={mark.x}
          cy={mark.y}
          r={4}
        >
          <title>{`${mark.percent} % of the step, ${side} kernel`}</title>
        </circle>
      ))}
    </g>
  );
}

import { useMemo } from 'preact/hooks';
import { formatFixed } from '../../core/format/index.js';
import type { Kernel, RoseCriterion } from '../../core/note/index.js';
import type { PairTexture } from '../../core/quality/index.js';
import { useSize } from '../panels/parts/useSize.js';
import type { OwnPlace } from '../state/visibleSelectors.js';
import {
  CONTRAST_TICKS_HU,
  DIAMETER_TICKS_MM,
  heldInside,
  LEAST_FOR_EYES_HU,
  VISIBLE_MARGIN_PX,
  type VisibleDrawing,
  visibleCurves,
  visibleDrawing,
} from './visibleDrawing.js';
import { placeSentences } from './visibleWords.js';

export interface VisiblePlotProps {
  readonly texture: PairTexture;
  readonly k: RoseCriterion;
  /** What the curves come to at the contrast asked about, in words. */
  readonly sentences: readonly string[];
  /** The selected region, or the lumen of the contrast asked about. */
  readonly own: OwnPlace | undefined;
}

/** Contrast from which a disc is seen, over its diameter: soft solid, sharp dashed; above a curve it is seen. */
export function VisiblePlot(props: VisiblePlotProps) {
  const [ref, size] = useSize<HTMLDivElement>();
  return (
    <div class="plot-area" ref={ref}>
      {size !== undefined && size.heightPx > 50 && <Picture {...props} {...size} />}
    </div>
  );
}

interface PictureProps extends VisiblePlotProps {
  readonly widthPx: number;
  readonly heightPx: number;
}

function Picture({ texture, k, sentences, own, widthPx, heightPx }: PictureProps) {
  const curves = useMemo(() => visibleCurves(texture, k), [texture, k]);
  const drawing = visibleDrawing(curves, widthPx, heightPx);
  const { x, y, lines } = drawing;
  const bottom = heightPx - VISIBLE_MARGIN_PX.bottom;
  const right = widthPx - VISIBLE_MARGIN_PX.right;
  const left = VISIBLE_MARGIN_PX.left;
  const place = own === undefined ? '' : placeSentences(own, (kernel) => texture[kernel], k);
  const eyes = y(LEAST_FOR_EYES_HU);
  return (
    <svg
      width={widthPx}
      height={heightPx}
      role="img"
      aria-label={`What could be seen, k ${k}. ${sentences.join(' ')} ${place}`.trim()}
    >
      {CONTRAST_TICKS_HU.map((hu) => (
        <g key={hu}>
          <path class="grid" d={`M${left} ${y(hu)}H${right}`} />
          <text x={left - 6} y={y(hu) + 4} text-anchor="end">
            {formatFixed(hu, 0)}
          </text>
        </g>
      ))}
      <path class="axis" d={`M${left} ${bottom}H${right}`} />
      {DIAMETER_TICKS_MM.map((mm) => (
        <g key={mm}>
          <path class="axis" d={`M${x(mm)} ${bottom}v4`} />
          <text x={x(mm)} y={bottom + 16} text-anchor="middle">
            {formatFixed(mm, mm < 1 ? 1 : 0)}
            {mm === 10 && ' mm'}
          </text>
        </g>
      ))}
      <path class="eyes" d={`M${left} ${eyes}H${right}`}>
        <title>
          The least contrast that an eye tells apart under ideal conditions: common practice, no
          published source
        </title>
      </path>
      <text x={left + 4} y={eyes + 11}>
        20 HU, the least for an eye
      </text>
      <text x={2} y={11}>
        HU
      </text>
      <path class="series soft" d={lines.soft} />
      <path class="series sharp" d={lines.sharp} />
      {own !== undefined && <Own own={own} drawing={drawing} />}
      <path class="series soft" d={`M${right - 134} 7h26`} />
      <text class="soft" x={right - 103} y={11}>
        soft
      </text>
      <path class="series sharp" d={`M${right - 66} 7h26`} />
      <text class="sharp" x={right} y={11} text-anchor="end">
        sharp
      </text>
      {own !== undefined && own.points.length > 0 && (
        <>
          <text x={left} y={11}>
            {own.label}
          </text>
          <path class="own soft" d={shapeOf('soft', right - 121, 7)} />
          <path class="own sharp" d={shapeOf('sharp', right - 53, 7)} />
        </>
      )}
    </svg>
  );
}

interface OwnProps {
  readonly own: OwnPlace;
  readonly drawing: VisibleDrawing;
}

/** The region's own place on each kernel: a filled circle for soft, an open diamond for sharp. */
function Own({ own, drawing }: OwnProps) {
  return (
    <g class="own-places">
      {own.points.map(({ kernel, diameterMm, contrastHu }) => {
        const [px, py] = heldInside(drawing, diameterMm, contrastHu);
        return (
          <path key={kernel} class={`own ${kernel}`} d={shapeOf(kernel, px, py)}>
            <title>
              {`${own.label} on the ${kernel} kernel: ${formatFixed(diameterMm, 1)} mm across, ${formatFixed(contrastHu, 0)} HU between lumen and wall`}
            </title>
          </path>
        );
      })}
    </g>
  );
}

function shapeOf(kernel: Kernel, px: number, py: number): string {
  return kernel === 'soft'
    ? `M${px - 3.5} ${py}a3.5 3.5 0 1 0 7 0a3.5 3.5 0 1 0 -7 0Z`
    : `M${px} ${py - 5}l5 5l-5 5l-5 -5Z`;
}

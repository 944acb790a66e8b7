import { useRef } from 'preact/hooks';
import { formatFixed } from '../../core/format/index.js';
import type { Role } from '../../core/region/index.js';
import { RoleShape } from './parts/RoleSignView.js';
import { useSize } from './parts/useSize.js';
import {
  nextPositionMm,
  type RulerScale,
  rulerLabelsMm,
  rulerScale,
  rulerTicks,
} from './rulerScale.js';

/** A region on the ruler. */
export interface RulerMark {
  readonly regionId: string;
  readonly label: string;
  readonly role: Role;
  readonly alongMm: number;
  readonly selected: boolean;
}

export interface TwinRulerProps {
  /** Positions of the slices along the normal, mm, ascending. */
  readonly softMm: readonly number[];
  /** Undefined when one stack alone is read. */
  readonly sharpMm: readonly number[] | undefined;
  /** Where both plates are. */
  readonly positionMm: number;
  readonly marks: readonly RulerMark[];
  readonly onMove: (alongMm: number) => void;
  readonly onMark: (regionId: string) => void;
}

const MIDDLE_PX = 115;
const FIRST_MARK_PX = 56;
const FAST = 10;

/** The slices of both stacks on one axis in mm. Its handle is dragged or moved by keys; regions are marks to go to. */
export function TwinRuler(props: TwinRulerProps) {
  const [ref, size] = useSize<HTMLDivElement>();
  const dragging = useRef(false);
  const heightPx = size?.heightPx ?? 0;
  const sharpMm = props.sharpMm ?? [];
  const scale = rulerScale([props.softMm, sharpMm], heightPx);
  // Keys go slice by slice through the finer of the two stacks.
  const finerMm = sharpMm.length > props.softMm.length ? sharpMm : props.softMm;

  const moveTo = (event: PointerEvent) => {
    const top = ref.current?.getBoundingClientRect().top;
    if (scale !== undefined && top !== undefined) props.onMove(scale.mmAt(event.clientY - top));
  };
  const onPointerDown = (event: PointerEvent) => {
    if (event.button !== 0 || !(event.target instanceof Element)) return;
    if (event.target.closest('.ruler-mark')) return;
    dragging.current = true;
    ref.current?.setPointerCapture(event.pointerId);
    moveTo(event);
  };
  const onKeyDown = (event: KeyboardEvent) => {
    const to = positionForKey(event, finerMm, props.positionMm);
    if (to === undefined) return;
    event.preventDefault();
    event.stopPropagation();
    props.onMove(to);
  };

  return (
    <div
      class="ruler"
      ref={ref}
      onPointerDown={onPointerDown}
      onPointerMove={(event) => dragging.current && moveTo(event)}
      onPointerUp={() => {
        dragging.current = false;
      }}
      onPointerCancel={() => {
        dragging.current = false;
      }}
    >
      {scale !== undefined && heightPx > 0 && (
        <>
          <Drawing {...props} scale={scale} heightPx={heightPx} />
          <div
            class="ruler-handle"
            role="slider"
            aria-label="Position of both plates"
            aria-orientation="vertical"
            aria-valuemin={scale.fromMm}
            aria-valuemax={scale.toMm}
            aria-valuenow={props.positionMm}
            aria-valuetext={`${formatFixed(props.positionMm, 1)} mm`}
            tabIndex={0}
            style={{ top: `${scale.toPx(props.positionMm)}px` }}
            onKeyDown={onKeyDown}
          >
            {formatFixed(props.positionMm, 1)} mm
          </div>
          {placedMarks(props.marks, scale).map(({ mark, leftPx, topPx }) => (
            <button
              key={mark.regionId}
              type="button"
              class="ruler-mark"
              data-role={mark.role}
              aria-current={mark.selected}
              aria-label={`Go to ${mark.label}, ${formatFixed(mark.alongMm, 1)} mm`}
              title={`${mark.label} · ${formatFixed(mark.alongMm, 1)} mm`}
              style={{ left: `${leftPx}px`, top: `${topPx}px` }}
              onClick={() => props.onMark(mark.regionId)}
            >
              <RoleShape role={mark.role} />
            </button>
          ))}
        </>
      )}
    </div>
  );
}

function positionForKey(event: KeyboardEvent, slicesMm: readonly number[], nowMm: number) {
  const count = event.shiftKey ? FAST : 1;
  switch (event.key) {
    case 'ArrowUp':
    case 'ArrowRight':
      return nextPositionMm(slicesMm, nowMm, count);
    case 'ArrowDown':
    case 'ArrowLeft':
      return nextPositionMm(slicesMm, nowMm, -count);
    case 'Home':
      return slicesMm[0];
    case 'End':
      return slicesMm.at(-1);
    default:
      return undefined;
  }
}

/** Marks too close to be hit one by one stand side by side, towards the edge. */
function placedMarks(marks: readonly RulerMark[], scale: RulerScale) {
  const placed: { mark: RulerMark; leftPx: number; topPx: number }[] = [];
  for (const mark of marks) {
    const topPx = scale.toPx(mark.alongMm);
    const near = placed.filter((other) => Math.abs(other.topPx - topPx) < 14).length;
    placed.push({ mark, topPx, leftPx: FIRST_MARK_PX - 16 * Math.min(near, 2) });
  }
  return placed;
}

interface DrawingProps extends TwinRulerProps {
  readonly scale: RulerScale;
  readonly heightPx: number;
}

function Drawing({ softMm, sharpMm, positionMm, scale, heightPx }: DrawingProps) {
  const here = scale.toPx(positionMm);
  return (
    <svg width={2 * MIDDLE_PX} height={heightPx} aria-hidden="true">
      <text x={12} y={16}>
        soft
      </text>
      <text x={218} y={16} text-anchor="end">
        {sharpMm === undefined ? '' : 'sharp'}
      </text>
      <path class="spine" d={`M${MIDDLE_PX} 4V${heightPx - 4}`} />
      <Side slicesMm={softMm} scale={scale} direction={-1} />
      {sharpMm !== undefined && <Side slicesMm={sharpMm} scale={scale} direction={1} />}
      {rulerLabelsMm(scale, heightPx)
        .filter((mm) => Math.abs(scale.toPx(mm) - here) > 14 && scale.toPx(mm) > 26)
        .map((mm) => (
          <text key={mm} class="mm" x={176} y={scale.toPx(mm) + 3.5}>
            {formatFixed(mm, Number.isInteger(mm) ? 0 : 1)}
          </text>
        ))}
      <path class="here" d={`M84 ${here}H148`} />
    </svg>
  );
}

interface SideProps {
  readonly slicesMm: readonly number[];
  readonly scale: RulerScale;
  /** −1 to the left of the axis, 1 to its right. */
  readonly direction: -1 | 1;
}

function Side({ slicesMm, scale, direction }: SideProps) {
  if (slicesMm.length === 0) return null;
  const { ticks, gaps } = rulerTicks(slicesMm, scale);
  const from = MIDDLE_PX + 2 * direction;
  const inGap = (px: number) => gaps.some(({ topPx, bottomPx }) => px > topPx && px < bottomPx);
  return (
    <g>
      <path
        class="tick"
        d={ticks
          .filter(({ px }) => !inGap(px))
          .map(({ px, long }) => `M${from} ${crisp(px)}h${(long ? 22 : 14) * direction}`)
          .join('')}
      />
      {gaps.map(({ topPx, bottomPx }) => (
        <rect
          key={topPx}
          class="gap"
          x={direction < 0 ? from - 16 : from}
          y={topPx + 1}
          width={16}
          height={Math.max(2, bottomPx - topPx - 2)}
        />
      ))}
    </g>
  );
}

/** Middle of the device's pixel row, so that a thin line is not smeared over two. */
function crisp(px: number): number {
  return Math.floor(px) + 0.5;
}

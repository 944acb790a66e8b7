import type { ComponentChildren } from 'preact';
import { useRef, useState } from 'preact/hooks';

export interface AppFrameProps {
  readonly header: ComponentChildren;
  readonly tools: ComponentChildren;
  readonly soft: ComponentChildren;
  readonly hinge: ComponentChildren;
  readonly sharp: ComponentChildren;
  readonly ledger: ComponentChildren;
  readonly plot: ComponentChildren;
  readonly status: ComponentChildren;
  /** 'one' gives the soft slot the width of both plates: for folding, alternating and the difference. */
  readonly plates?: 'two' | 'one';
}

/** Values of data-panel in the order in which F6 goes round; each such element can be focused by script. */
export const PANEL_ORDER = ['tools', 'soft', 'hinge', 'sharp', 'ledger', 'plot'] as const;

const LEAST_LEDGER_PX = 120;
const LEAST_PLATES_PX = 160;
const STEP_PX = 24;

/** The window's plan: header, tools, plates about the hinge, a movable edge, ledger and plot, status. */
export function AppFrame(props: AppFrameProps) {
  const bench = useRef<HTMLElement>(null);
  const desk = useRef<HTMLDivElement>(null);
  const [ledgerPx, setLedgerPx] = useState<number>();
  const one = props.plates === 'one';

  const resize = (wantedPx: number) => {
    const most = (bench.current?.clientHeight ?? 0) - LEAST_PLATES_PX;
    setLedgerPx(Math.round(Math.max(LEAST_LEDGER_PX, Math.min(most, wantedPx))));
  };
  const heightPx = () => desk.current?.clientHeight ?? LEAST_LEDGER_PX;

  const onPointerDown = (event: PointerEvent) => {
    if (!(event.currentTarget instanceof HTMLElement)) return;
    event.preventDefault();
    event.currentTarget.setPointerCapture(event.pointerId);
  };
  const onPointerMove = (event: PointerEvent) => {
    if (!(event.currentTarget instanceof HTMLElement)) return;
    if (!event.currentTarget.hasPointerCapture(event.pointerId)) return;
    const bottom = bench.current?.getBoundingClientRect().bottom;
    if (bottom !== undefined) resize(bottom - event.clientY);
  };
  const onKeyDown = (event: KeyboardEvent) => {
    const step = { ArrowUp: STEP_PX, ArrowDown: -STEP_PX }[event.key];
    if (step === undefined) return;
    event.preventDefault();
    event.stopPropagation();
    resize(heightPx() + step);
  };

  return (
    <div class="frame">
      {props.header}
      <section data-panel="tools" aria-label="Tools" tabIndex={-1}>
        {props.tools}
      </section>
      <main
        class="bench"
        ref={bench}
        style={ledgerPx === undefined ? {} : { '--ledger-height': `${ledgerPx}px` }}
      >
        <div class={one ? 'spread one' : 'spread'}>
          <div class="slot plate-slot" data-panel="soft" tabIndex={-1}>
            {props.soft}
          </div>
          <div class="slot hinge-slot" data-panel="hinge" tabIndex={-1}>
            {props.hinge}
          </div>
          {!one && (
            <div class="slot plate-slot" data-panel="sharp" tabIndex={-1}>
              {props.sharp}
            </div>
          )}
        </div>
        {/* biome-ignore lint/a11y/useSemanticElements: a movable separator is no thematic break */}
        <div
          class="splitter"
          role="separator"
          aria-orientation="horizontal"
          aria-label="Height of the reading note"
          aria-valuenow={ledgerPx ?? 290}
          aria-valuemin={LEAST_LEDGER_PX}
          aria-valuemax={2000}
          aria-valuetext={ledgerPx === undefined ? 'automatic' : `${ledgerPx} pixels`}
          tabIndex={0}
          onPointerDown={onPointerDown}
          onPointerMove={onPointerMove}
          onKeyDown={onKeyDown}
          onDblClick={() => setLedgerPx(undefined)}
        />
        <div class="desk" ref={desk}>
          <div class="slot" data-panel="ledger" tabIndex={-1}>
            {props.ledger}
          </div>
          <div class="slot plot-slot" data-panel="plot" tabIndex={-1}>
            {props.plot}
          </div>
        </div>
      </main>
      {props.status}
    </div>
  );
}

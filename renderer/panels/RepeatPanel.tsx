import { visibleText } from '../../core/format/index.js';
import { type NoteFinding, type RunningRepeat, segmentOf } from '../../core/note/index.js';

export interface RepeatPanelProps {
  readonly running: RunningRepeat;
  /** The finding of the region that comes next. */
  readonly finding: NoteFinding | undefined;
  readonly onSkip: () => void;
  readonly onFinish: () => void;
  readonly onGiveUp: () => void;
}

/** What the reader does now in a repeat reading; the first reading is hidden as long as it runs. */
export function RepeatPanel({ running, finding, onSkip, onFinish, onGiveUp }: RepeatPanelProps) {
  const { next, step, steps, repeat } = running;
  const segment = segmentOf(finding?.segment ?? null);
  const place = [
    next?.role,
    next?.place && visibleText(next.place),
    finding?.kind,
    segment && `${segment.number} ${segment.abbreviation}`,
  ].filter(Boolean);
  return (
    <section class="ledger repeat" aria-label="Repeat reading">
      <div class="ledger-head">
        <h2>
          Repeat reading, {step} of {steps}
        </h2>
      </div>
      <p role="status">
        {next === undefined
          ? 'All regions were drawn again.'
          : `Draw ${next.label} as you would the first time: ${place.join(' · ')}. Its slice is shown.`}
      </p>
      <p class="hint">
        Shapes and values of the first reading are hidden until you finish.{' '}
        {repeat.regions.length > 0 &&
          `${repeat.regions.length} drawn so far; undo takes the last one back.`}
      </p>
      <div class="repeat-buttons">
        <button
          type="button"
          class="button outlined"
          disabled={next === undefined}
          onClick={onSkip}
        >
          Skip this region
        </button>
        <button type="button" class="button outlined" onClick={onFinish}>
          Finish here
        </button>
        <button type="button" class="button outlined" onClick={onGiveUp}>
          Give up the repeat
        </button>
      </div>
    </section>
  );
}

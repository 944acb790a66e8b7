import type { Progress } from '../../app/host/contract.js';
import { formatCount } from '../../core/format/index.js';

export interface ProgressLineProps {
  readonly progress: Progress;
  readonly onCancel: () => void;
}

/** How far a long job is, and the button that ends it. */
export function ProgressLine({ progress, onCancel }: ProgressLineProps) {
  const { done, total, text } = progress;
  const count =
    total === undefined ? formatCount(done) : `${formatCount(done)} of ${formatCount(total)}`;
  return (
    <div class="progress-line">
      <progress
        class="progress-bar"
        aria-label={text}
        {...(total === undefined ? {} : { value: done, max: Math.max(1, total) })}
      />
      <button type="button" class="button outlined" onClick={onCancel}>
        Cancel
      </button>
      <span class="text" role="status">
        {text} · {count}
      </span>
    </div>
  );
}

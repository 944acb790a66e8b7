import type { Kernel } from '../../core/note/index.js';
import { restOn } from '../state/changes/compare.js';
import { KERNELS } from '../state/selectors.js';
import type { Store } from '../state/store.js';

export interface AlternateSwitchProps {
  /** The kernel on the plate now. */
  readonly shown: Kernel;
  readonly resting: Kernel;
  readonly letterKeys: boolean;
  readonly store: Store;
}

/** Says which kernel is shown, and switches it for those who can't hold a key. */
export function AlternateSwitch({ shown, resting, letterKeys, store }: AlternateSwitchProps) {
  return (
    // biome-ignore lint/a11y/useSemanticElements: a fieldset is for forms; this switches a view
    <div
      class="alternate-switch"
      role="group"
      aria-label="Kernel on the plate"
      onPointerDown={(event) => event.stopPropagation()}
      onKeyDown={(event) => {
        // Enter and Space press the button; the plate has other uses for both.
        if (event.key === 'Enter' || event.key === ' ') event.stopPropagation();
      }}
      onPointerUp={(event) => event.stopPropagation()}
    >
      {KERNELS.map((kernel) => (
        <button
          key={kernel}
          type="button"
          aria-pressed={resting === kernel}
          data-shown={shown === kernel}
          onClick={() => store.change('Switch kernel', restOn(kernel))}
        >
          {kernel === 'soft' ? 'Soft' : 'Sharp'}
        </button>
      ))}
      <span class="hint" aria-hidden="true">
        {letterKeys ? 'hold A or Space · switch X' : 'hold Space'}
      </span>
    </div>
  );
}

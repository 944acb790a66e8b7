import type { ComponentChildren } from 'preact';
import { useEffect, useId, useRef } from 'preact/hooks';

export interface DialogProps {
  readonly title: string;
  /** 'narrow' for a few fields, 'page' for text, 'wide' for tables. */
  readonly size?: 'narrow' | 'page' | 'wide';
  /** Without it the dialog can't be dismissed: it must be answered. */
  readonly onClose?: () => void;
  /** Buttons and the like, at the foot. */
  readonly foot?: ComponentChildren;
  readonly children: ComponentChildren;
}

/** Where the focus begins: the first thing to fill in or choose, and the text itself where there is none. */
const FIRST_FOCUS = '.dialog-content :is(input:checked, input[type="text"], select, .level button)';

/** A native modal dialog. Esc closes it, the focus goes back to where it was, and letters do not reach the bench. */
export function Dialog({ title, size, onClose, foot, children }: DialogProps) {
  const ref = useRef<HTMLDialogElement>(null);
  const titleId = useId();

  useEffect(() => {
    const opener = document.activeElement;
    const dialog = ref.current;
    dialog?.showModal();
    const first = dialog?.querySelector<HTMLElement>(FIRST_FOCUS);
    (first ?? dialog?.querySelector<HTMLElement>('.dialog-content'))?.focus();
    return () => {
      dialog?.close();
      if (opener instanceof HTMLElement) opener.focus();
    };
  }, []);

  const onCancel = (event: Event) => {
    event.preventDefault();
    onClose?.();
  };
  // A browser may close a dialog in spite of preventDefault when Esc is pressed twice.
  const onNativeClose = () => {
    const dialog = ref.current;
    if (dialog === null || dialog.open || !dialog.isConnected) return;
    if (onClose) onClose();
    else dialog.showModal();
  };

  return (
    <dialog
      class={`dialog ${size ?? 'narrow'}`}
      ref={ref}
      aria-labelledby={titleId}
      onCancel={onCancel}
      onClose={onNativeClose}
      onKeyDown={(event) => event.stopPropagation()}
    >
      <div class="dialog-body">
        <div class="dialog-head">
          <h2 id={titleId}>{title}</h2>
          {onClose && (
            <button
              type="button"
              class="button icon-button"
              aria-label={`Close ${title}`}
              onClick={onClose}
            >
              <svg width={12} height={12} viewBox="0 0 12 12" aria-hidden="true">
                <path d="M2 2 10 10M10 2 2 10" stroke="currentColor" stroke-width={1.4} />
              </svg>
            </button>
          )}
        </div>
        {/* biome-ignore lint/a11y/noNoninteractiveTabindex: what scrolls must be reachable by keyboard */}
        <section class="dialog-content" tabIndex={0} aria-label={title}>
          {children}
        </section>
        {foot !== undefined && <div class="dialog-foot">{foot}</div>}
      </div>
    </dialog>
  );
}

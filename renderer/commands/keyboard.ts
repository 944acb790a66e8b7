import type { Engine } from '../engine.js';
import { PANEL_ORDER } from '../panels/AppFrame.js';
import { holdOther } from '../state/changes/compare.js';
import { commandForKey } from './keyMap.js';

/** Listens for the keys of commands, for F6, and for what is held in the middle of a drag. */
export function connectKeyboard(engine: Engine, page: Document): void {
  const { store, run, machine, signal } = engine;
  const mac = /Mac/.test(navigator.platform);
  let holding: string | undefined;
  const letGo = (): void => {
    holding = undefined;
    store.change('Let go of the other kernel', holdOther(false));
  };
  page.addEventListener(
    'keydown',
    (event) => {
      if (event.defaultPrevented || store.now().dialog !== undefined) return;
      if (event.key === 'Shift' || event.key === 'Alt') machine.modifiers(held(event));
      if (event.key === 'F6') {
        event.preventDefault();
        focusNextPanel(page, event.shiftKey ? -1 : 1);
        return;
      }
      const command = commandForKey(
        {
          key: event.key,
          ctrl: event.ctrlKey,
          meta: event.metaKey,
          shift: event.shiftKey,
          alt: event.altKey,
        },
        {
          mac,
          inTextField: isTextField(event.target),
          inScroller: isInScroller(event.target),
          letterKeys: store.now().settings.letterKeys,
        },
      );
      if (command === 'alternate.hold' || isSpaceOnPlate(event)) {
        if (store.now().compare.way !== 'alternate') return;
        event.preventDefault();
        holding = event.key;
        store.change('Hold the other kernel', holdOther(true));
        return;
      }
      if (command === undefined) return;
      event.preventDefault();
      run(command);
    },
    { signal },
  );
  page.addEventListener(
    'keyup',
    (event) => {
      if (event.key === 'Shift' || event.key === 'Alt') machine.modifiers(held(event));
      // A key that went down with Shift can come up without: any case of the letter ends the hold.
      if (event.key.toLowerCase() === holding?.toLowerCase()) letGo();
    },
    { signal },
  );
  // When the window loses the keyboard the key's end is never told.
  page.defaultView?.addEventListener('blur', letGo, { signal });
}

/** Space on the image itself; on a button it presses the button. */
function isSpaceOnPlate({ key, target, ctrlKey, metaKey, altKey }: KeyboardEvent): boolean {
  if (key !== ' ' || ctrlKey || metaKey || altKey) return false;
  return target instanceof HTMLElement && target.classList.contains('plate-surface');
}

function held(event: KeyboardEvent): { readonly shift: boolean; readonly alt: boolean } {
  return { shift: event.shiftKey, alt: event.altKey };
}

/** Input types that take no text; letters pressed on them are free for commands. */
const WITHOUT_TEXT = new Set(['button', 'checkbox', 'radio', 'range', 'submit']);

function isTextField(target: EventTarget | null): boolean {
  if (target instanceof HTMLInputElement) return !WITHOUT_TEXT.has(target.type);
  return (
    target instanceof HTMLTextAreaElement ||
    target instanceof HTMLSelectElement ||
    (target instanceof HTMLElement && target.isContentEditable)
  );
}

function isInScroller(target: EventTarget | null): boolean {
  return (
    target instanceof Element &&
    target.closest('[data-panel="ledger"], [data-panel="plot"]') !== null
  );
}

/** What takes the focus in a panel; a button that can't be used takes none. */
const FOCUSABLE = '[tabindex="0"]:not(:disabled), button:not([tabindex="-1"]):not(:disabled)';

/** Takes the focus to the next panel of the window, to what in it takes keys. */
function focusNextPanel(page: Document, step: 1 | -1): void {
  const panels = PANEL_ORDER.flatMap((name) => {
    const panel = page.querySelector<HTMLElement>(`[data-panel="${name}"]`);
    return panel === null ? [] : [panel];
  });
  const at = panels.findIndex((panel) => panel.contains(page.activeElement));
  const from = at < 0 && step < 0 ? 0 : at;
  const next = panels[(from + step + panels.length) % panels.length];
  if (next === undefined) return;
  const first = next.querySelector<HTMLElement>(FOCUSABLE);
  (first ?? next).focus();
}

/** Where an arrow key takes the focus in a list of n; undefined for other keys and for an empty list. */
export function focusMove(key: string, at: number, n: number): number | undefined {
  if (n === 0) return undefined;
  switch (key) {
    case 'ArrowDown':
      return (at + 1) % n;
    case 'ArrowUp':
      return at <= 0 ? n - 1 : at - 1;
    case 'Home':
      return 0;
    case 'End':
      return n - 1;
    default:
      return undefined;
  }
}

/** The buttons, menu items or options of a list, in document order. */
export function itemsOf(list: Element, selector: string): readonly HTMLElement[] {
  return [...list.querySelectorAll<HTMLElement>(selector)];
}

/** Place of the focused element among these; −1 when it is none of them. */
export function indexOfFocus(items: readonly HTMLElement[]): number {
  const { activeElement } = document;
  return activeElement instanceof HTMLElement ? items.indexOf(activeElement) : -1;
}

/** Moves the focus in a list by arrow keys, Home and End. True when the key was one of these. */
export function moveFocus(event: KeyboardEvent, list: Element, selector: string): boolean {
  const items = itemsOf(list, selector);
  const at = indexOfFocus(items);
  const next = focusMove(event.key, at, items.length);
  if (next === undefined) return false;
  event.preventDefault();
  event.stopPropagation();
  items[next]?.focus();
  return true;
}

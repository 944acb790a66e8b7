import type { ComponentChildren } from 'preact';
import { useEffect, useId, useRef, useState } from 'preact/hooks';
import { itemsOf, moveFocus } from './focusMove.js';

export interface MenuItem {
  readonly id: string;
  readonly title: string;
  /** What to press instead. */
  readonly keyText?: string | undefined;
  /** Given for items that can be on or off. */
  readonly checked?: boolean;
  readonly disabled?: boolean;
}

export interface MenuButtonProps {
  /** Name for those who hear it, when the face alone does not tell. */
  readonly label?: string;
  readonly items: readonly MenuItem[];
  readonly onChoose: (id: string) => void;
  /** The menu opens towards the right edge of the window. */
  readonly toRight?: boolean;
  readonly disabled?: boolean;
  readonly children: ComponentChildren;
}

const ITEM = '[role^="menuitem"]';

/** A button that opens a menu: arrows, Home, End, Esc and Tab work as in menus of the system. */
export function MenuButton(props: MenuButtonProps) {
  const [open, setOpen] = useState(false);
  const anchor = useRef<HTMLDivElement>(null);
  const button = useRef<HTMLButtonElement>(null);
  const menu = useRef<HTMLDivElement>(null);
  const menuId = useId();

  useEffect(() => {
    if (!open) return undefined;
    if (menu.current !== null) itemsOf(menu.current, ITEM)[0]?.focus();
    const outside = (event: PointerEvent) => {
      if (event.target instanceof Node && !anchor.current?.contains(event.target)) setOpen(false);
    };
    document.addEventListener('pointerdown', outside);
    return () => document.removeEventListener('pointerdown', outside);
  }, [open]);

  const close = () => {
    setOpen(false);
    button.current?.focus();
  };
  const choose = (item: MenuItem) => {
    if (item.disabled) return;
    close();
    props.onChoose(item.id);
  };
  const onMenuKey = (event: KeyboardEvent) => {
    if (menu.current === null || moveFocus(event, menu.current, ITEM)) return;
    // Letters belong to the menu while it is open, not to the commands of the bench.
    event.stopPropagation();
    if (event.key === 'Escape') close();
    else if (event.key === 'Tab') setOpen(false);
  };
  const onButtonKey = (event: KeyboardEvent) => {
    if (event.key !== 'ArrowDown') return;
    event.preventDefault();
    event.stopPropagation();
    setOpen(true);
  };

  return (
    <div class="menu-anchor" ref={anchor}>
      <button
        type="button"
        class="button"
        ref={button}
        disabled={props.disabled ?? false}
        aria-haspopup="menu"
        aria-expanded={open}
        aria-controls={open ? menuId : undefined}
        aria-label={props.label}
        onClick={() => setOpen(!open)}
        onKeyDown={onButtonKey}
      >
        {props.children}
        <span class="caret" aria-hidden="true">
          ▾
        </span>
      </button>
      {open && (
        <div
          class={props.toRight ? 'menu to-right' : 'menu'}
          id={menuId}
          role="menu"
          tabIndex={-1}
          ref={menu}
          onKeyDown={onMenuKey}
        >
          {props.items.map((item) => (
            <MenuLine key={item.id} item={item} onChoose={() => choose(item)} />
          ))}
        </div>
      )}
    </div>
  );
}

function MenuLine({ item, onChoose }: { readonly item: MenuItem; readonly onChoose: () => void }) {
  const checkable = item.checked !== undefined;
  return (
    // biome-ignore lint/a11y/useAriaPropsSupportedByRole: aria-checked goes with menuitemcheckbox alone
    <button
      type="button"
      role={checkable ? 'menuitemcheckbox' : 'menuitem'}
      aria-checked={checkable ? item.checked : undefined}
      aria-disabled={item.disabled ?? false}
      tabIndex={-1}
      onClick={onChoose}
    >
      {checkable && (
        <span class="tick" aria-hidden="true">
          {item.checked ? '✓' : ''}
        </span>
      )}
      {item.title}
      {item.keyText !== undefined && <kbd>{item.keyText}</kbd>}
    </button>
  );
}

import { useEffect, useRef } from 'preact/hooks';
import type { FolderLevel } from '../../app/host/contract.js';
import { visibleText } from '../../core/format/index.js';
import { indexOfFocus, itemsOf, moveFocus } from '../panels/parts/focusMove.js';

export interface FolderListProps {
  readonly level: FolderLevel | undefined;
  readonly disabled: boolean;
  readonly onEnter: (folderId: string) => void;
}

/** The folders of one level. Arrows move, Enter goes in, Backspace goes up, letters jump to a name. */
export function FolderList({ level, disabled, onEnter }: FolderListProps) {
  const list = useRef<HTMLUListElement>(null);
  const parent = level?.trail.at(-2);
  const levelId = level?.id;

  // Going down a level by keyboard would lose the focus with the old list.
  useEffect(() => {
    if (list.current !== null) itemsOf(list.current, 'button')[0]?.focus();
  }, [levelId]);

  const onKeyDown = (event: KeyboardEvent) => {
    if (list.current === null || moveFocus(event, list.current, 'button')) return;
    if ((event.key === 'Backspace' || event.key === 'ArrowLeft') && parent) onEnter(parent.id);
    if (event.key === 'ArrowRight' && event.target instanceof HTMLElement) event.target.click();
    if (event.key.length === 1 && !event.ctrlKey && !event.metaKey) {
      jumpToName(list.current, event.key);
    }
  };

  if (level === undefined) return <p class="level empty">Reading the folders…</p>;
  if (level.refusal !== undefined) {
    return (
      <p class="level empty" role="alert">
        {level.refusal}
      </p>
    );
  }
  return (
    <ul class="level" ref={list} onKeyDown={onKeyDown} aria-label={`Folders in ${level.name}`}>
      {level.children.length === 0 && <li class="empty">No folders inside.</li>}
      {level.children.map((child, i) => (
        <li key={child.id}>
          <button
            type="button"
            tabIndex={i === 0 ? 0 : -1}
            disabled={disabled}
            onClick={() => onEnter(child.id)}
          >
            <svg class="folder-sign" width={14} height={12} viewBox="0 0 14 12" aria-hidden="true">
              <path d="M1 2.5H5L6.5 4H13V10.5H1Z" fill="none" stroke="currentColor" />
            </svg>
            {visibleText(child.name)}
          </button>
        </li>
      ))}
    </ul>
  );
}

/** Focus goes to the next name that begins with the letter, round the end. */
function jumpToName(list: Element, letter: string): void {
  const items = itemsOf(list, 'button');
  const at = indexOfFocus(items);
  const round = [...items.slice(at + 1), ...items.slice(0, at + 1)];
  const wanted = letter.toLocaleLowerCase();
  round.find((item) => item.textContent?.trim().toLocaleLowerCase().startsWith(wanted))?.focus();
}

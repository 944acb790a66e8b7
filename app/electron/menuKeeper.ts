import type { Menu, MenuItemConstructorOptions } from 'electron';
import { COMMANDS } from '../../core/commands/table.js';
import type { ShellState } from '../host/contract.js';
import { type MenuSetup, menuTemplate } from './menu.js';

/** The parts of Electron's Menu that are used. */
export interface MenuPart {
  buildFromTemplate(template: MenuItemConstructorOptions[]): Menu;
  setApplicationMenu(menu: Menu): void;
}

/** The standard items look after themselves; only these follow the page. */
const COMMAND_IDS: ReadonlySet<string> = new Set(COMMANDS.map((command) => command.id));

/** What changes while the app runs. */
export type MenuChange = Partial<Pick<MenuSetup, 'state' | 'recent' | 'letterKeys'>>;

/**
 * Keeps the application menu in step. A report of the page only enables and ticks the items that
 * are there, since it comes with every mark; the menu is built anew when its texts change.
 */
export function keepMenu(part: MenuPart, first: MenuSetup): (change: MenuChange) => void {
  let setup = first;
  let menu = build();

  function build(): Menu {
    const built = part.buildFromTemplate(menuTemplate(setup));
    part.setApplicationMenu(built);
    return built;
  }

  return (change) => {
    const before = setup;
    setup = { ...setup, ...change };
    if (setup.letterKeys !== before.letterKeys || !sameRecent(setup.recent, before.recent)) {
      menu = build();
    } else if (setup.state !== before.state) {
      applyState(menu, setup.state);
    }
  };
}

function applyState(menu: Menu, state: ShellState | undefined): void {
  const enabled = new Set(state?.enabled);
  const checked = new Set(state?.checked);
  const visit = (items: Menu['items']): void => {
    for (const item of items) {
      if (item.submenu) visit(item.submenu.items);
      else if (COMMAND_IDS.has(item.id)) {
        item.enabled = enabled.has(item.id);
        if (item.type === 'checkbox') item.checked = checked.has(item.id);
      }
    }
  };
  visit(menu.items);
}

function sameRecent(a: MenuSetup['recent'], b: MenuSetup['recent']): boolean {
  return (
    a.length === b.length &&
    a.every((folder, index) => {
      const other = b[index];
      return (
        folder.id === other?.id && folder.name === other.name && folder.missing === other.missing
      );
    })
  );
}

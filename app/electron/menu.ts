import type { MenuItemConstructorOptions } from 'electron';
import { COMMANDS, type Command, MENUS, type Menu } from '../../core/commands/table.js';
import type { RecentFolder, ShellState } from '../host/contract.js';
import { accelerator, keyAsText } from './accelerator.js';

/** What the menu shows and does. */
export interface MenuSetup {
  readonly mac: boolean;
  /** Undefined until the page has reported: then no command can be used. */
  readonly state: ShellState | undefined;
  readonly recent: readonly RecentFolder[];
  readonly letterKeys: boolean;
  /** Reload and developer tools, only in an unpackaged app. */
  readonly developerTools: boolean;
  readonly onCommand: (id: string) => void;
  readonly onRecent: (id: string) => void;
  readonly onClearRecent: () => void;
}

type Item = MenuItemConstructorOptions;

const LINE: Item = { type: 'separator' };

/** The command that macOS keeps in the menu named after the app. */
const SETTINGS = 'edit.settings';

/** The whole application menu, made from the table that the tool bar and the sheet of keys are made from. */
export function menuTemplate(setup: MenuSetup): Item[] {
  const menus = MENUS.flatMap((menu): Item[] => {
    const whole: Item = {
      label: menu,
      submenu: [
        ...standardBefore(menu),
        ...commandItems(menu, setup),
        ...standardAfter(menu, setup),
      ],
    };
    if (menu !== 'Help') return [whole];
    // The Help menu's role gives it the search field of macOS.
    return [windowMenu(setup.mac), { ...whole, role: 'help' }];
  });
  return setup.mac ? [appMenu(setup), ...menus] : menus;
}

function commandItems(menu: Menu, setup: MenuSetup): Item[] {
  const items: Item[] = [];
  for (const command of COMMANDS as readonly Command[]) {
    if (command.menu !== menu || (setup.mac && command.id === SETTINGS)) continue;
    if (command.separated === true && items.length > 0) items.push(LINE);
    items.push(commandItem(command, setup));
    if (command.id === 'folder.open') items.push(recentMenu(setup));
  }
  return items;
}

function commandItem(command: Command, setup: MenuSetup): Item {
  const { state } = setup;
  const key = accelerator(command.key);
  const shown = keyAsText(command, setup.letterKeys);
  const title = plainLabel(command.title);
  const checkable = command.group !== undefined || command.toggle === true;
  const checked = checkable && (state?.checked.includes(command.id) ?? false);
  return {
    id: command.id,
    label: shown === undefined ? title : `${title} (${shown})`,
    enabled: state?.enabled.includes(command.id) ?? false,
    ...(key === undefined ? {} : { accelerator: key }),
    // Boxes rather than radio items: a group can lie in two menus, and may have none chosen.
    ...(checkable ? { type: 'checkbox' as const, checked } : {}),
    click: (item) => {
      // Electron has flipped the box by itself; only the page's report decides whether it is on.
      if (checkable) item.checked = !item.checked;
      setup.onCommand(command.id);
    },
  };
}

function recentMenu(setup: MenuSetup): Item {
  const folders = setup.recent.map(
    (folder): Item => ({
      label: plainLabel(folder.missing ? `${folder.name} (not there now)` : folder.name),
      enabled: !folder.missing,
      click: () => setup.onRecent(folder.id),
    }),
  );
  return {
    id: 'recent',
    label: 'Open recent',
    enabled: folders.length > 0,
    submenu: [...folders, LINE, { label: 'Clear recent', click: setup.onClearRecent }],
  };
}

function standardBefore(menu: Menu): Item[] {
  return menu === 'View' ? [{ role: 'togglefullscreen', label: 'Full screen' }, LINE] : [];
}

function standardAfter(menu: Menu, setup: MenuSetup): Item[] {
  switch (menu) {
    case 'File':
      return setup.mac ? [LINE, { role: 'close' }] : [LINE, { role: 'quit', label: 'Quit' }];
    case 'Edit':
      return [
        LINE,
        { role: 'cut', label: 'Cut' },
        { role: 'copy', label: 'Copy' },
        { role: 'paste', label: 'Paste' },
        { role: 'selectAll', label: 'Select all' },
      ];
    case 'View':
      return [
        LINE,
        { role: 'zoomIn', label: 'Larger controls' },
        { role: 'zoomOut', label: 'Smaller controls' },
        { role: 'resetZoom', label: 'Controls at normal size' },
        ...(setup.developerTools
          ? [LINE, { role: 'reload' as const }, { role: 'toggleDevTools' as const }]
          : []),
      ];
    case 'Help':
      return setup.mac ? [] : [LINE, { role: 'about', label: 'About Diptych' }];
    default:
      return [];
  }
}

function windowMenu(mac: boolean): Item {
  const items: Item[] = [{ role: 'minimize', label: 'Minimise' }];
  if (mac) items.push({ role: 'zoom' }, LINE, { role: 'front' });
  else items.push({ role: 'close', label: 'Close window' });
  return { label: 'Window', role: 'window', submenu: items };
}

function appMenu(setup: MenuSetup): Item {
  const settings = (COMMANDS as readonly Command[]).find((command) => command.id === SETTINGS);
  return {
    label: 'Diptych',
    submenu: [
      { role: 'about', label: 'About Diptych' },
      ...(settings === undefined ? [] : [LINE, commandItem(settings, setup)]),
      LINE,
      { role: 'services' },
      LINE,
      { role: 'hide' },
      { role: 'hideOthers' },
      { role: 'unhide' },
      LINE,
      { role: 'quit' },
    ],
  };
}

/** '&' would mark a key of the menu on Windows and Linux; doubled it is the character itself. */
function plainLabel(text: string): string {
  return text.replaceAll('&', '&&');
}

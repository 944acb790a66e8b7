import type { MenuItem, MenuItemConstructorOptions } from 'electron';
import { describe, expect, it } from 'vitest';
import { accelerator, keyAsText } from '../../../../app/electron/accelerator.js';
import { type MenuSetup, menuTemplate } from '../../../../app/electron/menu.js';
import { COMMANDS, type Command } from '../../../../core/commands/table.js';

type Item = MenuItemConstructorOptions;

const ALL: readonly Command[] = COMMANDS;
const EVERYTHING = { enabled: ALL.map((one) => one.id), checked: [], unsaved: false, title: '' };

function setup(change: Partial<MenuSetup> = {}) {
  const chosen: string[] = [];
  const whole: MenuSetup = {
    mac: false,
    state: EVERYTHING,
    recent: [],
    letterKeys: true,
    developerTools: false,
    onCommand: (id) => chosen.push(id),
    onRecent: (id) => chosen.push(`recent ${id}`),
    onClearRecent: () => chosen.push('clear recent'),
    ...change,
  };
  return { chosen, menus: menuTemplate(whole) };
}

function children(item: Item | undefined): readonly Item[] {
  return Array.isArray(item?.submenu) ? item.submenu : [];
}

function menu(menus: readonly Item[], label: string): readonly Item[] {
  return children(menus.find((item) => item.label === label));
}

function flat(items: readonly Item[]): readonly Item[] {
  return items.flatMap((item) => [item, ...flat(children(item))]);
}

function byId(menus: readonly Item[], id: string): Item | undefined {
  return flat(menus).find((item) => item.id === id);
}

/** One line per item, as a reader sees the menu. */
function drawn(items: readonly Item[]): readonly string[] {
  return items.map((item) => {
    if (item.type === 'separator') return '—';
    const key = item.accelerator === undefined ? '' : ` [${String(item.accelerator)}]`;
    return `${item.label ?? item.role}${key}${item.submenu === undefined ? '' : ' ▸'}`;
  });
}

describe('menuTemplate', () => {
  it('has the table’s menus in their order, with Window before Help', () => {
    const labels = (mac: boolean) => setup({ mac }).menus.map((item) => item.label);
    expect(labels(false)).toEqual(['File', 'Edit', 'View', 'Mark', 'Note', 'Window', 'Help']);
    expect(labels(true)).toEqual([
      'Diptych',
      'File',
      'Edit',
      'View',
      'Mark',
      'Note',
      'Window',
      'Help',
    ]);
  });

  it.each([false, true])('shows every command of the table exactly once (macOS: %s)', (mac) => {
    const ids = flat(setup({ mac }).menus).flatMap((item) => item.id ?? []);
    expect(ids.filter((id) => id !== 'recent').sort()).toEqual(ALL.map((one) => one.id).sort());
  });

  it('draws the File menu', () => {
    const file = drawn(menu(setup().menus, 'File'));
    expect(file.slice(0, 3)).toEqual([
      'Open folder… [CmdOrCtrl+O]',
      'Open recent ▸',
      'Open the synthetic demonstration study',
    ]);
    expect(file.slice(-2)).toEqual(['—', 'Quit']);
    expect(drawn(menu(setup({ mac: true }).menus, 'File')).slice(-2)).toEqual(['—', 'close']);
  });

  it('draws the Edit menu, with the standard items that text fields need', () => {
    const edit = drawn(menu(setup().menus, 'Edit'));
    expect(edit).toEqual(
      expect.arrayContaining([
        'Undo [CmdOrCtrl+Z]',
        'Redo [CmdOrCtrl+Shift+Z]',
        'Delete what is selected (Delete)',
        'Settings… [CmdOrCtrl+,]',
      ]),
    );
    expect(edit.slice(-5)).toEqual(['—', 'Cut', 'Copy', 'Paste', 'Select all']);
    expect(
      menu(setup().menus, 'Edit')
        .slice(-4)
        .map((item) => item.role),
    ).toEqual(['cut', 'copy', 'paste', 'selectAll']);
  });

  it('keeps Settings in the app’s own menu on macOS', () => {
    const { menus } = setup({ mac: true });
    expect(drawn(menu(menus, 'Diptych'))).toEqual([
      'About Diptych',
      '—',
      'Settings… [CmdOrCtrl+,]',
      '—',
      'services',
      '—',
      'hide',
      'hideOthers',
      'unhide',
      '—',
      'quit',
    ]);
    expect(drawn(menu(menus, 'Edit')).join()).not.toContain('Settings');
  });

  it('shows letters and editing keys as text and registers none of them', () => {
    const { menus } = setup();
    expect(byId(menus, 'tool.ellipse')).toMatchObject({ label: 'Ellipse (E)' });
    expect(byId(menus, 'slice.next')).toMatchObject({ label: 'Next slice (Page up)' });
    for (const item of flat(menus)) {
      if (item.accelerator === undefined || item.accelerator === null) continue;
      expect(String(item.accelerator)).toMatch(/^(CmdOrCtrl\+|F([1-9]|1[0-2])$)/);
    }
  });

  it('leaves the letters out when the reader has switched them off', () => {
    const { menus } = setup({ letterKeys: false });
    expect(byId(menus, 'tool.ellipse')).toMatchObject({ label: 'Ellipse' });
    expect(byId(menus, 'slice.next')).toMatchObject({ label: 'Next slice (Page up)' });
  });

  it('enables and ticks what the page says, and nothing before the page has spoken', () => {
    const state = {
      enabled: ['tool.ellipse'],
      checked: ['tool.ellipse', 'note.save'],
      unsaved: true,
      title: '',
    };
    const { menus } = setup({ state });
    expect(byId(menus, 'tool.ellipse')).toMatchObject({
      enabled: true,
      type: 'checkbox',
      checked: true,
    });
    expect(byId(menus, 'tool.outline')).toMatchObject({
      enabled: false,
      type: 'checkbox',
      checked: false,
    });
    // A command that can't be on has no box, whatever is reported.
    expect(byId(menus, 'note.save')).toMatchObject({ enabled: false });
    expect(byId(menus, 'note.save')).not.toHaveProperty('checked');
    const silent = flat(setup({ state: undefined }).menus).filter((item) => item.id?.includes('.'));
    expect(silent.every((item) => item.enabled === false)).toBe(true);
    expect(silent).toHaveLength(ALL.length);
  });

  it('sends the command, and leaves the tick to the page', () => {
    const { chosen, menus } = setup();
    // Electron flips a box before it calls click.
    const flipped = { checked: true } as MenuItem;
    byId(menus, 'link.scroll')?.click?.(flipped, undefined, {});
    expect(flipped.checked).toBe(false);
    byId(menus, 'note.save')?.click?.({} as MenuItem, undefined, {});
    expect(chosen).toEqual(['link.scroll', 'note.save']);
  });

  it('lists recent folders as plain text, with the missing ones greyed, and can clear them', () => {
    const { chosen, menus } = setup({
      recent: [
        { id: 'r1', name: 'A & B', missing: false },
        { id: 'r2', name: 'gone', missing: true },
      ],
    });
    const recent = byId(menus, 'recent');
    expect(recent?.enabled).toBe(true);
    expect(drawn(children(recent))).toEqual([
      'A && B',
      'gone (not there now)',
      '—',
      'Clear recent',
    ]);
    expect(children(recent).map((item) => item.enabled)).toEqual([
      true,
      false,
      undefined,
      undefined,
    ]);
    children(recent)[0]?.click?.({} as MenuItem, undefined, {});
    children(recent)[3]?.click?.({} as MenuItem, undefined, {});
    expect(chosen).toEqual(['recent r1', 'clear recent']);
    expect(byId(setup().menus, 'recent')?.enabled).toBe(false);
  });

  it('offers reload and developer tools only where asked for', () => {
    const roles = (developerTools: boolean) =>
      flat(setup({ developerTools }).menus).map((item) => item.role);
    expect(roles(false)).not.toContain('toggleDevTools');
    expect(roles(false)).not.toContain('reload');
    expect(roles(true)).toEqual(expect.arrayContaining(['reload', 'toggleDevTools']));
  });

  it('gives no accelerator twice', () => {
    const keys = flat(setup().menus).flatMap((item) =>
      item.accelerator ? [String(item.accelerator)] : [],
    );
    expect(new Set(keys).size).toBe(keys.length);
  });

  it('has no line first, last, or beside another line', () => {
    for (const mac of [false, true]) {
      for (const whole of setup({ mac, developerTools: true }).menus) {
        const lines = drawn(children(whole));
        expect(lines[0]).not.toBe('—');
        expect(lines.at(-1)).not.toBe('—');
        expect(lines.some((line, index) => line === '—' && lines[index + 1] === '—')).toBe(false);
      }
    }
  });
});

describe('accelerator', () => {
  it.each([
    ['Mod+O', 'CmdOrCtrl+O'],
    ['Mod+Shift+Z', 'CmdOrCtrl+Shift+Z'],
    ['Mod+,', 'CmdOrCtrl+,'],
    ['F1', 'F1'],
    ['F12', 'F12'],
    ['F13', undefined],
    ['Delete', undefined],
    ['PageUp', undefined],
    ['e', undefined],
    ['Shift+E', undefined],
    [undefined, undefined],
  ])('%s → %s', (key, expected) => expect(accelerator(key)).toBe(expected));
});

describe('keyAsText', () => {
  it.each([
    [{ key: 'Mod+O' }, undefined],
    [{ key: 'Delete' }, 'Delete'],
    [{ key: 'PageDown' }, 'Page down'],
    [{ letter: 'e' }, 'E'],
    [{ letter: '?' }, '?'],
    [{}, undefined],
  ])('%j → %s', (command, expected) => expect(keyAsText(command, true)).toBe(expected));
});

import type { Menu, MenuItemConstructorOptions } from 'electron';
import { describe, expect, it } from 'vitest';
import { keepMenu } from '../../../../app/electron/menuKeeper.js';

interface StandInItem {
  readonly id?: string;
  readonly type?: string;
  readonly role?: string;
  enabled: boolean;
  checked: boolean;
  readonly submenu?: { readonly items: readonly StandInItem[] };
}

function built(template: readonly MenuItemConstructorOptions[]): readonly StandInItem[] {
  return template.map((item) => ({
    ...(item.id === undefined ? {} : { id: item.id }),
    ...(item.type === undefined ? {} : { type: item.type }),
    ...(item.role === undefined ? {} : { role: item.role }),
    enabled: item.enabled ?? true,
    checked: item.checked ?? false,
    ...(Array.isArray(item.submenu) ? { submenu: { items: built(item.submenu) } } : {}),
  }));
}

function flat(items: readonly StandInItem[]): readonly StandInItem[] {
  return items.flatMap((item) => [item, ...flat(item.submenu?.items ?? [])]);
}

function kept() {
  const menus: { readonly items: readonly StandInItem[] }[] = [];
  const change = keepMenu(
    {
      buildFromTemplate: (template) => ({ items: built(template) }) as unknown as Menu,
      setApplicationMenu: (menu) =>
        void menus.push(menu as unknown as { readonly items: readonly StandInItem[] }),
    },
    {
      mac: false,
      state: undefined,
      recent: [],
      letterKeys: true,
      developerTools: false,
      onCommand: () => undefined,
      onRecent: () => undefined,
      onClearRecent: () => undefined,
    },
  );
  const enabled = () =>
    flat(menus.at(-1)?.items ?? []).flatMap((item) =>
      item.enabled && item.id?.includes('.') ? [item.id] : [],
    );
  const checked = () =>
    flat(menus.at(-1)?.items ?? []).flatMap((item) => (item.checked && item.id ? [item.id] : []));
  return { change, menus, enabled, checked };
}

const STATE = {
  enabled: ['note.save', 'tool.zoom'],
  checked: ['tool.zoom'],
  unsaved: false,
  title: '',
};

describe('keepMenu', () => {
  it('follows the page’s reports without building the menu anew', () => {
    const { change, menus, enabled, checked } = kept();
    expect(enabled()).toEqual([]);
    change({ state: STATE });
    expect([...enabled()].sort()).toEqual(['note.save', 'tool.zoom']);
    expect(checked()).toEqual(['tool.zoom']);
    change({ state: { ...STATE, enabled: ['edit.undo'], checked: [] } });
    expect(enabled()).toEqual(['edit.undo']);
    expect(checked()).toEqual([]);
    change({ state: undefined });
    expect(enabled()).toEqual([]);
    expect(menus).toHaveLength(1);
  });

  it('leaves the standard items alone', () => {
    const { change, menus } = kept();
    change({ state: undefined });
    change({ state: STATE });
    const standard = flat(menus[0]?.items ?? []).filter((item) => item.role === 'copy');
    expect(standard.map((item) => item.enabled)).toEqual([true]);
  });

  it('builds it anew, in the same state, when its texts change', () => {
    const { change, menus, enabled } = kept();
    change({ state: STATE });
    change({ recent: [{ id: 'r', name: 'study', missing: false }] });
    expect(menus).toHaveLength(2);
    expect([...enabled()].sort()).toEqual(['note.save', 'tool.zoom']);
    change({ recent: [{ id: 'r', name: 'study', missing: false }], letterKeys: true });
    expect(menus).toHaveLength(2);
    change({ recent: [{ id: 'r', name: 'study', missing: true }] });
    change({ letterKeys: false });
    expect(menus).toHaveLength(4);
  });
});

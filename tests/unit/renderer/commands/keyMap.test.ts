import { describe, expect, it } from 'vitest';
import { commandForKey, type KeySetting } from '../../../../renderer/commands/keyMap.js';

const press = (
  key: string,
  held: { ctrl?: boolean; meta?: boolean; shift?: boolean; alt?: boolean } = {},
) => ({
  key,
  ctrl: false,
  meta: false,
  shift: false,
  alt: false,
  ...held,
});

const usual: KeySetting = { mac: false, inTextField: false, inScroller: false, letterKeys: true };

describe('The keys of commands', () => {
  it('take Mod as Ctrl, and as the command key on a Mac', () => {
    expect(commandForKey(press('o', { ctrl: true }), usual)).toBe('folder.open');
    expect(commandForKey(press('o', { meta: true }), { ...usual, mac: true })).toBe('folder.open');
    expect(commandForKey(press('o', { ctrl: true }), { ...usual, mac: true })).toBeUndefined();
  });

  it('tell undo from redo by Shift', () => {
    expect(commandForKey(press('z', { ctrl: true }), usual)).toBe('edit.undo');
    expect(commandForKey(press('Z', { ctrl: true, shift: true }), usual)).toBe('edit.redo');
  });

  it('copy the table with Mod+Shift+C and open settings with Mod+comma', () => {
    expect(commandForKey(press('C', { ctrl: true, shift: true }), usual)).toBe('edit.copyTable');
    expect(commandForKey(press(',', { ctrl: true }), usual)).toBe('edit.settings');
  });

  it('work with a modifier in text fields too', () => {
    const inField = { ...usual, inTextField: true };
    expect(commandForKey(press('s', { ctrl: true }), inField)).toBe('note.save');
  });

  it('leave undoing in a text field to the field', () => {
    const inField = { ...usual, inTextField: true };
    expect(commandForKey(press('z', { ctrl: true }), inField)).toBeUndefined();
    expect(commandForKey(press('Z', { ctrl: true, shift: true }), inField)).toBeUndefined();
  });

  it('take single letters only outside of text fields', () => {
    expect(commandForKey(press('e'), usual)).toBe('tool.ellipse');
    expect(commandForKey(press('e'), { ...usual, inTextField: true })).toBeUndefined();
  });

  it('take no single letters when they are switched off', () => {
    expect(commandForKey(press('e'), { ...usual, letterKeys: false })).toBeUndefined();
    expect(commandForKey(press('F1'), { ...usual, letterKeys: false })).toBe('help.numbers');
  });

  it('take signs that need Shift, and letters with Shift not', () => {
    expect(commandForKey(press('?', { shift: true }), usual)).toBe('help.keys');
    expect(commandForKey(press('+', { shift: true }), usual)).toBe('view.zoomIn');
    expect(commandForKey(press('E', { shift: true }), usual)).toBeUndefined();
  });

  it('take a letter under caps lock', () => {
    expect(commandForKey(press('E'), usual)).toBe('tool.ellipse');
  });

  it('leave Delete to text fields, and Page up to what scrolls', () => {
    expect(commandForKey(press('Delete'), usual)).toBe('region.delete');
    expect(commandForKey(press('Delete'), { ...usual, inTextField: true })).toBeUndefined();
    expect(commandForKey(press('PageUp'), usual)).toBe('slice.next');
    expect(commandForKey(press('PageUp'), { ...usual, inScroller: true })).toBeUndefined();
  });

  it('leave Alt to the system', () => {
    expect(commandForKey(press('e', { alt: true }), usual)).toBeUndefined();
  });
});

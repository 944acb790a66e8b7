import { describe, expect, it } from 'vitest';
import { COMMANDS } from '../../../../core/commands/index.js';
import { saveText } from '../../../../renderer/panels/Header.js';
import { identityText } from '../../../../renderer/panels/identityText.js';
import { focusMove } from '../../../../renderer/panels/parts/focusMove.js';
import { commandKeyText, keyText, letterText } from '../../../../renderer/panels/parts/keyText.js';
import { parseMm } from '../../../../renderer/panels/parts/parseMm.js';
import { lastWord, toolGroups } from '../../../../renderer/panels/toolGroups.js';

describe('keyText', () => {
  it('names keys as the platform does', () => {
    expect(keyText('Mod+Shift+Z', 'other')).toBe('Ctrl+Shift+Z');
    // Order of the modifiers in menus of macOS: ⌃⌥⇧⌘ (Apple's interface guidelines, from memory).
    expect(keyText('Mod+Shift+Z', 'mac')).toBe('⇧⌘Z');
    expect(keyText('PageUp', 'other')).toBe('Page up');
  });
  it('gives a letter only while letters are on', () => {
    expect(commandKeyText({ letter: 'e' }, 'other', true)).toBe('E');
    expect(commandKeyText({ letter: 'e' }, 'other', false)).toBeUndefined();
    expect(commandKeyText({ letter: 'e', key: 'F1' }, 'other', false)).toBe('F1');
    expect(letterText('-')).toBe('−');
  });
});

describe('toolGroups', () => {
  it('cuts the table of commands into groups and keeps its order', () => {
    const groups = toolGroups(COMMANDS);
    const ids = (commands: readonly { readonly id: string }[]) => commands.map(({ id }) => id);
    expect(ids(groups.roles)).toEqual([
      'role.lumen',
      'role.wall',
      'role.plaque',
      'role.fat',
      'role.reference',
    ]);
    expect(ids(groups.look)).toContain('tool.window');
    expect(ids(groups.mark)).toContain('tool.ellipse');
    expect(ids(groups.windows)).toContain('window.vessel');
    expect(ids(groups.links)).toContain('link.scroll');
    expect(lastWord('link.scroll')).toBe('scroll');
  });
});

describe('parseMm', () => {
  it.each([
    ['3', 3],
    ['2,75', 2.75],
    [' 3.5 mm', 3.5],
    ['', null],
    ['-3', undefined],
    ['0', undefined],
    ['three', undefined],
    ['1e3', undefined],
  ])('reads %j as %s', (text, expected) => {
    expect(parseMm(text)).toBe(expected);
  });
});

describe('focusMove', () => {
  it('goes round at both ends and knows Home and End', () => {
    expect(focusMove('ArrowDown', 2, 3)).toBe(0);
    expect(focusMove('ArrowUp', 0, 3)).toBe(2);
    expect(focusMove('ArrowUp', -1, 3)).toBe(2);
    expect(focusMove('Home', 2, 3)).toBe(0);
    expect(focusMove('End', 0, 3)).toBe(2);
  });
  it('leaves other keys and empty lists alone', () => {
    expect(focusMove('a', 0, 3)).toBeUndefined();
    expect(focusMove('ArrowDown', -1, 0)).toBeUndefined();
  });
});

describe('identityText', () => {
  const silent = {
    studyInstanceUid: '1.2',
    patientId: null,
    patientName: null,
    patientBirthDate: null,
    patientSex: null,
    studyDate: null,
    studyDescription: null,
    accessionNumber: null,
  };
  it('shows name, identifier, birth date, study and date', () => {
    expect(
      identityText({
        ...silent,
        patientName: 'Rowan^Alder',
        patientId: 'D-0101',
        patientBirthDate: '19580302',
        studyDescription: 'CTA heart',
        studyDate: '20260110',
      }),
    ).toEqual({
      name: 'Rowan, Alder',
      details: ['D-0101', '1958-03-02', 'CTA heart', '2026-01-10'],
    });
  });
  it('says that there is no name and leaves out what is not there', () => {
    expect(identityText(silent)).toEqual({ name: 'No patient name', details: [] });
  });
});

describe('saveText', () => {
  it('tells the last save and both states of the note', () => {
    expect(
      saveText({ kind: 'saved', time: '10:42', completion: 'PARTIAL', verification: 'UNVERIFIED' }),
    ).toBe('Saved 10:42 · partial · unverified');
    expect(saveText({ kind: 'waiting' })).toBe('Not saved yet');
    expect(saveText({ kind: 'none' })).toBe('');
  });
});

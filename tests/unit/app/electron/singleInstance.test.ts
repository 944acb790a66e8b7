import { describe, expect, it } from 'vitest';
import { folderArguments } from '../../../../app/electron/folderArgument.js';
import { beOnlyInstance, type InstanceApp } from '../../../../app/electron/singleInstance.js';

describe('folderArguments', () => {
  it.each([
    ['none', ['diptych'], true, []],
    ['a relative one', ['diptych', 'study'], true, ['/data/study']],
    ['an absolute one', ['diptych', '/other/./study/'], true, ['/other/study']],
    ['one above', ['diptych', '../study'], true, ['/study']],
    ['several among switches', ['diptych', '--a=1', 'x', '-b', 'y'], true, ['/data/x', '/data/y']],
    ['one that begins with a hyphen, after --', ['diptych', '--', '-x'], true, ['/data/-x']],
    ['an empty word', ['diptych', ''], true, []],
    ['unpackaged: none', ['electron', '.'], false, []],
    ['unpackaged: one', ['electron', '.', 'study'], false, ['/data/study']],
    [
      'unpackaged: a switch before the app',
      ['electron', '--no-sandbox', '.', 'study'],
      false,
      ['/data/study'],
    ],
    ['unpackaged: after --', ['electron', '.', '--', '-x'], false, ['/data/-x']],
  ])('%s', (_name, argv, isPackaged, folders) => {
    expect(folderArguments(argv, isPackaged, '/data')).toEqual(folders);
  });
});

describe('beOnlyInstance', () => {
  function instance(isFirst: boolean) {
    const opened: (readonly string[])[] = [];
    const locks: unknown[] = [];
    let second: ((event: unknown, argv: string[], cwd: string, data: unknown) => void) | undefined;
    const app: InstanceApp = {
      requestSingleInstanceLock: (data) => {
        locks.push(data);
        return isFirst;
      },
      on: (_event, listener) => {
        second = listener;
      },
    };
    const only = beOnlyInstance(app, ['/first'], true, (folders) => opened.push(folders));
    return { only, opened, locks, second };
  }

  it('hands this start’s folders to the instance that runs, and reports that one does', () => {
    const { only, locks, second } = instance(false);
    expect(only).toBe(false);
    expect(locks).toEqual([{ folders: ['/first'] }]);
    expect(second).toBeUndefined();
  });

  it('opens the folders that a second start has resolved itself', () => {
    const { only, opened, second } = instance(true);
    expect(only).toBe(true);
    second?.({}, ['diptych', 'changed', '--by-chromium'], '/elsewhere', { folders: ['/b/study'] });
    expect(opened).toEqual([['/b/study']]);
  });

  it.each([
    ['nothing', undefined],
    ['relative folders', { folders: ['study'] }],
    ['something else', { folders: 'study' }],
  ])(
    'resolves the second start’s arguments against its own folder when it handed over %s',
    (_name, data) => {
      const { opened, second } = instance(true);
      second?.({}, ['diptych', '--flag', 'study'], '/elsewhere', data);
      expect(opened).toEqual([['/elsewhere/study']]);
    },
  );
});

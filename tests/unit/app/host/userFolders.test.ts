import { resolve, sep } from 'node:path';
import { expect, test } from 'vitest';
import { userFolders } from '../../../../app/host/userFolders.js';

test('DIPTYCH_HOME holds all three folders', () => {
  const home = resolve('/somewhere/else');
  expect(userFolders({ DIPTYCH_HOME: home })).toEqual({
    data: `${home}${sep}data`,
    config: `${home}${sep}config`,
    cache: `${home}${sep}cache`,
  });
});

// XDG Base Directory Specification: $XDG_DATA_HOME defaults to ~/.local/share, $XDG_CONFIG_HOME to ~/.config.
test.skipIf(
  process.platform !== 'linux' || process.env.XDG_DATA_HOME || process.env.XDG_CONFIG_HOME,
)('without it they are the XDG folders, and bear the name of the program only', () => {
  const folders = userFolders({});
  expect(folders.data).toMatch(/\/\.local\/share\/Diptych$/);
  expect(folders.config).toMatch(/\/\.config\/Diptych$/);
});

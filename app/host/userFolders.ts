import { join, resolve } from 'node:path';
import envPaths from 'env-paths';

/** Where the user's own files lie; the same in both shells and on the command line. */
export interface UserFolders {
  /** Notes and the demonstration study. */
  readonly data: string;
  /** Settings and the list of recent folders. */
  readonly config: string;
  /** What can be made again. */
  readonly cache: string;
}

/**
 * The user's folders by the rules of the system: `~/.local/share/Diptych` and `~/.config/Diptych` on
 * Linux (XDG base directories), `Application Support` and `Preferences` on macOS, `AppData` on Windows.
 * With the environment variable DIPTYCH_HOME all three lie in that folder instead, as `data`, `config`
 * and `cache`: for a program carried on a disk, and for tests.
 */
export function userFolders(
  environment: Readonly<Record<string, string | undefined>> = process.env,
): UserFolders {
  const home = environment.DIPTYCH_HOME;
  if (home !== undefined && home !== '') {
    const root = resolve(home);
    return { data: join(root, 'data'), config: join(root, 'config'), cache: join(root, 'cache') };
  }
  const { data, config, cache } = envPaths('Diptych', { suffix: '' });
  return { data, config, cache };
}

import { stat } from 'node:fs/promises';
import { userInfo } from 'node:os';
import { join } from 'node:path';
import { fileErrorCode } from '../storage/fileError.js';

/** A place from which the folder chooser can start. */
export interface StartingPlace {
  readonly name: string;
  readonly path: string;
}

/** Home, the root or the drives, and where the system mounts discs and sticks; only those that are there. */
export async function startingPlaces(
  home: string,
  platform: NodeJS.Platform = process.platform,
): Promise<readonly StartingPlace[]> {
  const there = await Promise.all(
    candidates(platform).map(async (place) => ((await exists(place.path)) ? [place] : [])),
  );
  return [{ name: 'Home', path: home }, ...there.flat()];
}

function candidates(platform: NodeJS.Platform): readonly StartingPlace[] {
  if (platform === 'win32') {
    return Array.from({ length: 26 }, (_, index) => {
      const letter = String.fromCharCode(65 + index);
      return { name: `${letter}:`, path: `${letter}:\\` };
    });
  }
  const computer = { name: 'This computer', path: '/' };
  if (platform === 'darwin') return [computer, { name: 'Discs', path: '/Volumes' }];
  const user = userInfo().username;
  return [
    computer,
    { name: 'Media', path: join('/media', user) },
    { name: 'Media', path: join('/run/media', user) },
    { name: 'Mounted', path: '/mnt' },
  ];
}

async function exists(path: string): Promise<boolean> {
  try {
    return (await stat(path)).isDirectory();
  } catch (error) {
    if (fileErrorCode(error) === undefined) throw error;
    return false;
  }
}

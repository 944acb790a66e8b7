import { isAbsolute } from 'node:path';
import { z } from 'zod';
import { folderArguments } from './folderArgument.js';

const handedOver = z.strictObject({
  folders: z.array(z.string().min(1).max(32_767).refine(isAbsolute)).max(16),
});

/** The parts of Electron's app that are used here. */
export interface InstanceApp {
  requestSingleInstanceLock(data: { folders: readonly string[] }): boolean;
  on(
    event: 'second-instance',
    listener: (event: unknown, argv: string[], cwd: string, data: unknown) => void,
  ): unknown;
}

/**
 * Takes the lock of the only instance, before the app is ready. False: another one runs, has been
 * told of these folders, and this process must quit.
 *
 * The second process resolves its folders itself and hands them over, because Chromium changes and
 * reorders the arguments on their way; they are read again only when nothing usable came.
 */
export function beOnlyInstance(
  app: InstanceApp,
  folders: readonly string[],
  isPackaged: boolean,
  onSecond: (folders: readonly string[]) => void,
): boolean {
  if (!app.requestSingleInstanceLock({ folders })) return false;
  app.on('second-instance', (_event, argv, cwd, data) => {
    const handed = handedOver.safeParse(data);
    onSecond(handed.success ? handed.data.folders : folderArguments(argv, isPackaged, cwd));
  });
  return true;
}

import { createHandler } from '../host/handler.js';
import type { Services } from '../host/services.js';
import { type AppWindow, openAppWindow } from './appWindow.js';
import { type EndReason, type Lifetime, watchLifetime } from './lifetime.js';
import { startServer } from './server.js';
import { launchAddress, launchToken } from './token.js';

/** What the browser shell runs with. */
export interface ShellOptions {
  readonly services: Services;
  /** Program of the browser that shows the window; without one the address is printed and nothing opened. */
  readonly browser?: string;
  readonly port: number;
  readonly openDemonstration: boolean;
  /** Writes one line to standard output. */
  readonly say: (line: string) => void;
  /** Aborted when the program is told to end. */
  readonly signal: AbortSignal;
}

/** Time that the browser has to close after it was asked to, ms. */
const CLOSING_MS = 5_000;

/** Serves the page, shows it in a window if there is a browser, and returns when it is over and all is stored. */
export async function runShell(options: ShellOptions): Promise<EndReason> {
  const { services, browser, say, signal } = options;
  const token = launchToken();
  const handler = createHandler(services, {
    token,
    folderChooser: true,
    openDemonstration: options.openDemonstration,
  });
  const server = await startServer(handler, options.port);
  const address = launchAddress(server.origin, token);
  const lifetime = watchLifetime(services.presence, { window: browser !== undefined });
  const stop = (): void => lifetime.end('signal');
  if (signal.aborted) stop();
  else signal.addEventListener('abort', stop, { once: true });

  let window: AppWindow | undefined;
  try {
    if (browser === undefined) say(`Diptych is served at ${address}`);
    else {
      window = await openAppWindow(browser, address);
      endWithWindow(window, services, lifetime, () =>
        say(`The browser ended before it showed the page. Open this address yourself: ${address}`),
      );
    }
    return await lifetime.ended;
  } finally {
    signal.removeEventListener('abort', stop);
    // The server stays until the browser is gone, so that a note that is sent on closing still arrives.
    await closeWindow(window);
    await server.close();
    await services.settled();
  }
}

/** The window's end is ours; but when no page ever came from it, the reader gets the address instead. */
function endWithWindow(
  window: AppWindow,
  { presence, report }: Services,
  lifetime: Lifetime,
  sayAddress: () => void,
): void {
  let came = presence.count > 0;
  const unwatch = presence.watch(() => {
    came = true;
  });
  window.ended.then(() => {
    unwatch();
    if (came || lifetime.isOver()) lifetime.end('window closed');
    else {
      lifetime.serveOn();
      sayAddress();
    }
  }, report);
}

async function closeWindow(window: AppWindow | undefined): Promise<void> {
  if (window === undefined) return;
  window.close();
  let timer: NodeJS.Timeout | undefined;
  const late = new Promise<void>((resolve) => {
    timer = setTimeout(resolve, CLOSING_MS);
  });
  await Promise.race([window.ended, late]);
  clearTimeout(timer);
}

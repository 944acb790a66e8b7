import type { Log } from './log.js';
import { isOwnUrl, ORIGIN } from './origin.js';

/** An event whose default can be prevented. */
export interface PreventableEvent {
  preventDefault(): void;
}

/** The parts of Electron's web contents that can leave the page. */
export interface NavigableContents {
  on(
    event: 'will-navigate' | 'will-frame-navigate' | 'will-redirect' | 'will-attach-webview',
    listener: (event: PreventableEvent) => void,
  ): unknown;
  on(
    event: 'select-bluetooth-device',
    listener: (
      event: PreventableEvent,
      devices: unknown,
      callback: (deviceId: string) => void,
    ) => void,
  ): unknown;
  setWindowOpenHandler(handler: () => { action: 'deny' }): void;
}

const WAYS_OUT = [
  'will-navigate',
  'will-frame-navigate',
  'will-redirect',
  'will-attach-webview',
] as const;

/** Keeps one web contents where it is: no navigation, no redirect, no new window, no webview. */
export function confine(contents: NavigableContents, log: Log): void {
  for (const way of WAYS_OUT) {
    contents.on(way, (event) => {
      event.preventDefault();
      log(`prevented ${way}`);
    });
  }
  contents.setWindowOpenHandler(() => {
    log('prevented a new window');
    return { action: 'deny' };
  });
  // Electron picks the first device by itself unless the default is prevented.
  contents.on('select-bluetooth-device', (event, _devices, callback) => {
    event.preventDefault();
    callback('');
  });
}

/** The part of Electron's session that sees every request and download. */
export interface NetworkSession {
  readonly webRequest: {
    onBeforeRequest(
      listener: (
        details: { readonly url: string },
        callback: (response: { cancel: boolean }) => void,
      ) => void,
    ): void;
  };
  on(event: 'will-download', listener: (event: PreventableEvent) => void): unknown;
}

/**
 * True for addresses that never leave the machine: the page's own, and data and objects that it made
 * itself; what it may do with these is up to the content security policy.
 * The developer tools' own pages are let through only where the tools exist.
 */
export function mayLoad(address: string, developerTools: boolean): boolean {
  if (isOwnUrl(address)) return true;
  if (address.startsWith(`blob:${ORIGIN}/`) || address.startsWith('data:')) return true;
  return developerTools && address.startsWith('devtools://');
}

/** Cancels every request that is not the page's own, and every download; saving goes by dialog. */
export function cutNetwork(session: NetworkSession, developerTools: boolean, log: Log): void {
  session.webRequest.onBeforeRequest((details, callback) => {
    const cancel = !mayLoad(details.url, developerTools);
    if (cancel) log('cancelled a request that would have left the page');
    callback({ cancel });
  });
  session.on('will-download', (event) => {
    event.preventDefault();
    log('prevented a download');
  });
}

import { isOwnUrl } from './origin.js';

/** What the page may do, each with its reason. Whatever is not in this table is denied. */
export const ALLOWED_PERMISSIONS: ReadonlyMap<string, string> = new Map([
  ['clipboard-sanitized-write', 'Copy table puts the measurement table on the clipboard.'],
  ['fullscreen', 'Images are read on the whole screen.'],
]);

/** True when the page's own top frame asks for something that the table allows. */
export function isAllowed(permission: string, address: string, isTopFrame: boolean): boolean {
  return ALLOWED_PERMISSIONS.has(permission) && isOwnUrl(address) && isTopFrame;
}

/** The parts of Electron's session that decide on permissions. */
export interface PermissionSession {
  setPermissionRequestHandler(
    handler: (
      contents: unknown,
      permission: string,
      callback: (granted: boolean) => void,
      details: { readonly requestingUrl?: string; readonly isMainFrame?: boolean },
    ) => void,
  ): void;
  setPermissionCheckHandler(
    handler: (
      contents: unknown,
      permission: string,
      requestingOrigin: string,
      details: { readonly isMainFrame: boolean },
    ) => boolean,
  ): void;
  setDevicePermissionHandler(handler: (details: unknown) => boolean): void;
}

/**
 * Denies every permission that is not in the table. All three handlers are needed: Electron approves
 * by default, and one handler alone leaves gaps (security guide, item 5).
 */
export function restrictPermissions(session: PermissionSession): void {
  session.setPermissionRequestHandler((_contents, permission, callback, details) => {
    callback(isAllowed(permission, details.requestingUrl ?? '', details.isMainFrame === true));
  });
  session.setPermissionCheckHandler((_contents, permission, requestingOrigin, details) =>
    isAllowed(permission, requestingOrigin, details.isMainFrame),
  );
  session.setDevicePermissionHandler(() => false);
}

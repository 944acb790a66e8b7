import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import {
  ALLOWED_PERMISSIONS,
  type PermissionSession,
  restrictPermissions,
} from '../../../../app/electron/permissions.js';

type RequestHandler = Parameters<PermissionSession['setPermissionRequestHandler']>[0];
type CheckHandler = Parameters<PermissionSession['setPermissionCheckHandler']>[0];
type DeviceHandler = Parameters<PermissionSession['setDevicePermissionHandler']>[0];

/** Every permission that this Electron knows, read from its own type declarations. */
function knownPermissions(): readonly string[] {
  const declarations = readFileSync('node_modules/electron/electron.d.ts', 'utf8');
  const found = /setPermissionCheckHandler\(handler: .*?permission: ([^,]+),/.exec(declarations);
  return (found?.[1] ?? '').split('|').map((quoted) => quoted.trim().replaceAll("'", ''));
}

function restricted() {
  const handlers: { request?: RequestHandler; check?: CheckHandler; device?: DeviceHandler } = {};
  restrictPermissions({
    setPermissionRequestHandler: (handler) => void Object.assign(handlers, { request: handler }),
    setPermissionCheckHandler: (handler) => void Object.assign(handlers, { check: handler }),
    setDevicePermissionHandler: (handler) => void Object.assign(handlers, { device: handler }),
  });
  return {
    request: (permission: string, requestingUrl?: string, isMainFrame = true) => {
      const answers: boolean[] = [];
      handlers.request?.({}, permission, (granted) => answers.push(granted), {
        ...(requestingUrl === undefined ? {} : { requestingUrl }),
        isMainFrame,
      });
      return answers;
    },
    check: (permission: string, origin: string, isMainFrame = true) =>
      handlers.check?.(null, permission, origin, { isMainFrame }),
    device: () => handlers.device?.({ deviceType: 'hid', origin: 'app://local' }),
  };
}

describe('restrictPermissions', () => {
  it('allows two things, each with a reason', () => {
    expect([...ALLOWED_PERMISSIONS.keys()]).toEqual(['clipboard-sanitized-write', 'fullscreen']);
    for (const reason of ALLOWED_PERMISSIONS.values()) expect(reason).toMatch(/^[A-Z].+\.$/);
  });

  it('denies our own page every other permission that Electron declares', () => {
    const known = knownPermissions();
    expect(known).toEqual(expect.arrayContaining(['geolocation', 'media', 'hid', 'openExternal']));
    expect(known.length).toBeGreaterThan(40);
    const { request, check } = restricted();
    const allowed = known.filter((name) => check(name, 'app://local/'));
    const granted = known.filter((name) => request(name, 'app://local/').includes(true));
    expect(allowed).toEqual(['clipboard-sanitized-write', 'fullscreen']);
    expect(granted).toEqual(['clipboard-sanitized-write', 'fullscreen']);
  });

  it('answers each request exactly once', () => {
    const { request } = restricted();
    expect(request('fullscreen', 'app://local/')).toEqual([true]);
    expect(request('media', 'app://local/')).toEqual([false]);
  });

  it.each(['https://example.com/', 'app://other/', '', 'null'])(
    'denies the origin %j',
    (origin) => {
      const { request, check } = restricted();
      expect(request('fullscreen', origin)).toEqual([false]);
      expect(check('fullscreen', origin)).toBe(false);
    },
  );

  it('denies a request that does not say where it comes from', () => {
    expect(restricted().request('fullscreen')).toEqual([false]);
  });

  it('denies a subframe', () => {
    const { request, check } = restricted();
    expect(request('fullscreen', 'app://local/', false)).toEqual([false]);
    expect(check('fullscreen', 'app://local/', false)).toBe(false);
  });

  it('denies every device', () => {
    expect(restricted().device()).toBe(false);
  });
});

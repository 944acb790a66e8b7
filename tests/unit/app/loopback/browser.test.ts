import { expect, test } from 'vitest';
import { browserFlags } from '../../../../app/loopback/browserFlags.js';
import { findBrowser } from '../../../../app/loopback/findBrowser.js';
import { hasDisplay } from '../../../../app/loopback/hasDisplay.js';

const search = (
  platform: NodeJS.Platform,
  environment: Readonly<Record<string, string>>,
  programs: readonly string[],
) => findBrowser({ platform, environment, isProgram: (path) => programs.includes(path) });

test('the browser that DIPTYCH_BROWSER names comes first, then the PATH, then the usual places', () => {
  const programs = ['/own/browser', '/bin2/chromium', '/usr/bin/google-chrome'];
  const path = { PATH: '/bin1:/bin2' };
  expect(search('linux', { ...path, DIPTYCH_BROWSER: '/own/browser' }, programs)).toBe(
    '/own/browser',
  );
  expect(search('linux', { ...path, DIPTYCH_BROWSER: '/gone' }, programs)).toBe('/bin2/chromium');
  expect(search('linux', { PATH: '' }, programs)).toBe('/usr/bin/google-chrome');
  expect(search('linux', {}, [])).toBeUndefined();
});

test('usual places on Windows and macOS', () => {
  const edge = 'C:\\Program Files (x86)\\Microsoft\\Edge\\Application\\msedge.exe';
  expect(search('win32', { 'PROGRAMFILES(X86)': 'C:\\Program Files (x86)' }, [edge])).toBe(edge);
  const chromium = '/Applications/Chromium.app/Contents/MacOS/Chromium';
  expect(search('darwin', { HOME: '/Users/a' }, [chromium])).toBe(chromium);
});

test('a program that only begins like a browser is none', () => {
  expect(search('linux', { PATH: '/bin' }, ['/bin/chromium-bsu'])).toBeUndefined();
});

test('the sandbox is given up for root only', () => {
  const options = { address: 'http://127.0.0.1:1/#t', profile: '/p' };
  expect(browserFlags({ ...options, root: false })).not.toContain('--no-sandbox');
  expect(browserFlags({ ...options, root: true })).toContain('--no-sandbox');
  expect(browserFlags({ ...options, root: false }).slice(0, 2)).toEqual([
    '--app=http://127.0.0.1:1/#t',
    '--user-data-dir=/p',
  ]);
});

test('on Linux a display must be named', () => {
  expect(hasDisplay('linux', {})).toBe(false);
  expect(hasDisplay('linux', { DISPLAY: '' })).toBe(false);
  expect(hasDisplay('linux', { DISPLAY: ':0' })).toBe(true);
  expect(hasDisplay('linux', { WAYLAND_DISPLAY: 'wayland-0' })).toBe(true);
  expect(hasDisplay('darwin', {})).toBe(true);
});

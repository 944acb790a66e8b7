import { EventEmitter } from 'node:events';
import type { Session } from 'electron';
import { describe, expect, it, vi } from 'vitest';
import { pageTitle } from '../../../../app/electron/pageTitle.js';
import { applyTheme } from '../../../../app/electron/theme.js';
import {
  type ShowableWindow,
  showWhenReady,
  windowOptions,
} from '../../../../app/electron/window.js';

const PLACE = {
  bounds: { x: 1, y: 2, width: 1200, height: 800 },
  maximised: false,
  fullScreen: false,
  displayId: 1,
};

describe('windowOptions', () => {
  const session = {} as Session;
  const setup = {
    place: PLACE,
    preload: '/p/preload.cjs',
    icon: '/p/icon.png',
    session,
    dark: true,
    developerTools: false,
  };

  it('states every safe value of the page’s process (Electron security guide, items 2 to 11)', () => {
    expect(windowOptions(setup).webPreferences).toEqual({
      preload: '/p/preload.cjs',
      session,
      sandbox: true,
      contextIsolation: true,
      nodeIntegration: false,
      nodeIntegrationInWorker: false,
      nodeIntegrationInSubFrames: false,
      webSecurity: true,
      webviewTag: false,
      spellcheck: false,
      devTools: false,
      navigateOnDragDrop: false,
    });
  });

  it('is hidden at first, in its place, on the ground colour of its theme', () => {
    expect(windowOptions(setup)).toMatchObject({ ...PLACE.bounds, show: false });
    expect(windowOptions(setup).backgroundColor).toBe('#1b1c1e');
    expect(windowOptions({ ...setup, dark: false }).backgroundColor).toBe('#f4f4f2');
  });

  it('demands no more room than it is given', () => {
    const tiny = { ...PLACE, bounds: { x: 0, y: 0, width: 800, height: 500 } };
    expect(windowOptions({ ...setup, place: tiny })).toMatchObject({
      minWidth: 800,
      minHeight: 500,
    });
    expect(windowOptions(setup)).toMatchObject({ minWidth: 960, minHeight: 620 });
  });

  it('has developer tools only where asked for', () => {
    expect(windowOptions({ ...setup, developerTools: true }).webPreferences?.devTools).toBe(true);
  });
});

describe('showWhenReady', () => {
  function shown(place: typeof PLACE) {
    const calls: string[] = [];
    const window = Object.assign(new EventEmitter(), {
      maximize: () => calls.push('maximise'),
      show: () => calls.push('show'),
      setFullScreen: (on: boolean) => calls.push(`full screen ${on}`),
    });
    showWhenReady(window as unknown as ShowableWindow, place);
    expect(calls).toEqual([]);
    window.emit('ready-to-show');
    return { window, calls };
  }

  it('shows the window once the page has painted', () => {
    expect(shown(PLACE).calls).toEqual(['show']);
    expect(shown({ ...PLACE, maximised: true }).calls).toEqual(['maximise', 'show']);
    expect(shown({ ...PLACE, fullScreen: true }).calls).toEqual(['show', 'full screen true']);
  });

  it('does not let the page’s document name the window', () => {
    const event = { preventDefault: vi.fn() };
    shown(PLACE).window.emit('page-title-updated', event);
    expect(event.preventDefault).toHaveBeenCalledOnce();
  });
});

describe('pageTitle', () => {
  it('marks unsaved changes with a dot', () => {
    const state = { enabled: [], checked: [], unsaved: false, title: 'Study 1' };
    expect(pageTitle(undefined)).toBe('Diptych');
    expect(pageTitle(state)).toBe('Study 1');
    expect(pageTitle({ ...state, unsaved: true })).toBe('• Study 1');
    expect(pageTitle({ ...state, unsaved: true, title: ' ' })).toBe('• Diptych');
  });
});

describe('applyTheme', () => {
  it('sets the theme only when it differs', () => {
    const set: string[] = [];
    let source: 'system' | 'dark' | 'light' = 'system';
    const nativeTheme = {
      get themeSource() {
        return source;
      },
      set themeSource(next) {
        source = next;
        set.push(next);
      },
    };
    for (const theme of ['system', 'dark', 'dark', 'light', 'system'] as const) {
      applyTheme(nativeTheme, theme);
    }
    expect(set).toEqual(['dark', 'light', 'system']);
  });
});

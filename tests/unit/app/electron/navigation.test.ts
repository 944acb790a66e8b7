import { EventEmitter } from 'node:events';
import { describe, expect, it, vi } from 'vitest';
import {
  confine,
  cutNetwork,
  mayLoad,
  type NavigableContents,
  type NetworkSession,
} from '../../../../app/electron/navigation.js';

describe('confine', () => {
  function confined() {
    const lines: string[] = [];
    let openWindow: (() => { action: 'deny' }) | undefined;
    const contents = Object.assign(new EventEmitter(), {
      setWindowOpenHandler: (handler: () => { action: 'deny' }) => {
        openWindow = handler;
      },
    });
    confine(contents as unknown as NavigableContents, (line) => lines.push(line));
    return { contents, lines, open: () => openWindow?.() };
  }

  it.each(['will-navigate', 'will-frame-navigate', 'will-redirect', 'will-attach-webview'])(
    'prevents %s, also within our origin',
    (way) => {
      const { contents, lines } = confined();
      const event = { preventDefault: vi.fn(), url: 'app://local/other' };
      contents.emit(way, event);
      expect(event.preventDefault).toHaveBeenCalledOnce();
      expect(lines).toEqual([`prevented ${way}`]);
    },
  );

  it('denies every new window', () => {
    expect(confined().open()).toEqual({ action: 'deny' });
  });

  it('chooses no Bluetooth device', () => {
    const event = { preventDefault: vi.fn() };
    const choose = vi.fn();
    confined().contents.emit('select-bluetooth-device', event, [{ deviceId: 'x' }], choose);
    expect(event.preventDefault).toHaveBeenCalledOnce();
    expect(choose).toHaveBeenCalledExactlyOnceWith('');
  });
});

describe('mayLoad', () => {
  it.each([
    ['app://local/index.html', false, true],
    ['blob:app://local/8f0e', false, true],
    ['blob:https://example.com/8f0e', false, false],
    ['blob:app://local.example/8f0e', false, false],
    ['https://example.com/', true, false],
    ['http://127.0.0.1:8080/', true, false],
    ['ws://example.com/', true, false],
    ['file:///etc/passwd', true, false],
    ['data:image/png;base64,AA==', false, true],
    ['devtools://devtools/bundled/inspector.html', true, true],
    ['devtools://devtools/bundled/inspector.html', false, false],
  ])('%s with developer tools %s: %s', (address, developerTools, allowed) => {
    expect(mayLoad(address, developerTools)).toBe(allowed);
  });
});

describe('cutNetwork', () => {
  it('cancels what would leave the page, and every download', () => {
    const lines: string[] = [];
    let ask: Parameters<NetworkSession['webRequest']['onBeforeRequest']>[0] | undefined;
    const session = Object.assign(new EventEmitter(), {
      webRequest: {
        onBeforeRequest: (listener: NonNullable<typeof ask>) => {
          ask = listener;
        },
      },
    });
    cutNetwork(session as unknown as NetworkSession, false, (line) => lines.push(line));
    const answers: unknown[] = [];
    ask?.({ url: 'https://example.com/?secret' }, (answer) => answers.push(answer));
    ask?.({ url: 'app://local/' }, (answer) => answers.push(answer));
    expect(answers).toEqual([{ cancel: true }, { cancel: false }]);
    const event = { preventDefault: vi.fn() };
    session.emit('will-download', event);
    expect(event.preventDefault).toHaveBeenCalledOnce();
    expect(lines).toEqual([
      'cancelled a request that would have left the page',
      'prevented a download',
    ]);
  });
});

import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import {
  handle,
  type IpcMainPart,
  listen,
  type SenderEvent,
  senderRefusal,
} from '../../../../app/electron/ipc.js';
import {
  droppedArguments,
  LARGEST_SAVE_BYTES,
  noArguments,
  openFolderAnswer,
  saveArguments,
  stateArguments,
} from '../../../../app/electron/messages.js';

const OURS: SenderEvent = { senderFrame: { origin: 'app://local', parent: null } };

/** Senders that Electron's security guide, item 17, says to refuse, each with the reason logged. */
const FOREIGN: readonly (readonly [string, SenderEvent, string])[] = [
  ['a frame that is gone', { senderFrame: null }, 'the frame is gone'],
  [
    'a subframe of our own origin',
    { senderFrame: { origin: 'app://local', parent: {} } },
    'not the top frame',
  ],
  [
    'a top frame of another origin',
    { senderFrame: { origin: 'https://example.com', parent: null } },
    'foreign origin',
  ],
  ['an opaque origin', { senderFrame: { origin: 'null', parent: null } }, 'foreign origin'],
  [
    'an origin that begins like ours',
    { senderFrame: { origin: 'app://local.example', parent: null } },
    'foreign origin',
  ],
];

function ipcMain() {
  const handlers = new Map<string, (event: SenderEvent, ...sent: unknown[]) => unknown>();
  const part: IpcMainPart = {
    handle: (channel, listener) => void handlers.set(channel, listener),
    on: (channel, listener) => handlers.set(channel, listener),
  };
  const deliver = (event: SenderEvent, ...sent: unknown[]) =>
    handlers.get('test')?.(event, ...sent);
  return { part, deliver };
}

describe('senderRefusal', () => {
  it('lets the top frame of our origin pass', () => {
    expect(senderRefusal(OURS)).toBeUndefined();
  });

  it.each(FOREIGN)('refuses %s', (_name, event, reason) => {
    expect(senderRefusal(event)).toBe(reason);
  });
});

describe('handle', () => {
  function doubled() {
    const lines: string[] = [];
    const calls: number[] = [];
    const { part, deliver } = ipcMain();
    handle(part, (line) => lines.push(line), {
      channel: 'test',
      takes: z.tuple([z.number()]),
      gives: z.number().max(100),
      answer: async (number) => {
        calls.push(number);
        return number * 2;
      },
    });
    return { lines, calls, deliver };
  }

  it('answers our page', async () => {
    const { lines, deliver } = doubled();
    expect(await deliver(OURS, 21)).toBe(42);
    expect(lines).toEqual([]);
  });

  it.each(FOREIGN)('rejects %s without acting, and logs why', async (_name, event, reason) => {
    const { lines, calls, deliver } = doubled();
    await expect(deliver(event, 21)).rejects.toThrow(/^request refused$/);
    expect(calls).toEqual([]);
    expect(lines).toEqual([`refused test: ${reason}`]);
  });

  it.each([
    ['of a wrong type', ['/home/somebody']],
    ['that are missing', []],
    ['that are too many', [1, 2]],
  ])('rejects arguments %s and logs no content of them', async (_name, sent) => {
    const { lines, calls, deliver } = doubled();
    await expect(deliver(OURS, ...sent)).rejects.toThrow(/^request refused$/);
    expect(calls).toEqual([]);
    expect(lines).toHaveLength(1);
    expect(lines[0]).toMatch(/^refused test: (invalid_type|too_small|too_big) at /);
    expect(lines[0]).not.toContain('somebody');
  });

  it('rejects an answer of a wrong form instead of passing it on', async () => {
    const { deliver } = doubled();
    await expect(deliver(OURS, 51)).rejects.toThrow();
  });
});

describe('listen', () => {
  it.each(FOREIGN)('drops a message of %s and logs why', (_name, event, reason) => {
    const lines: string[] = [];
    const heard: unknown[] = [];
    const { part, deliver } = ipcMain();
    listen(part, (line) => lines.push(line), {
      channel: 'test',
      takes: z.tuple([z.string()]),
      hear: (word) => heard.push(word),
    });
    deliver(event, 'a');
    deliver(OURS, 1);
    deliver(OURS, 'b');
    expect(heard).toEqual(['b']);
    expect(lines).toEqual([`refused test: ${reason}`, 'refused test: invalid_type at 0']);
  });
});

describe('messages', () => {
  const state = { enabled: ['note.save'], checked: [], unsaved: true, title: 'Diptych' };

  it('take what the bridge sends', () => {
    expect(noArguments.safeParse([]).success).toBe(true);
    expect(droppedArguments.safeParse(['/a']).success).toBe(true);
    expect(saveArguments.safeParse(['a.csv', new Uint8Array(3)]).success).toBe(true);
    expect(stateArguments.safeParse([state]).success).toBe(true);
    expect(openFolderAnswer.safeParse(undefined).success).toBe(true);
    expect(openFolderAnswer.safeParse({ grant: 'g', name: 'n' }).success).toBe(true);
  });

  it.each([
    ['a path that is empty', droppedArguments, ['']],
    ['a path that is no text', droppedArguments, [{}]],
    ['bytes that are text', saveArguments, ['a.csv', 'text']],
    ['a name that is too long', saveArguments, ['a'.repeat(256), new Uint8Array(1)]],
    ['a state without its flag', stateArguments, [{ ...state, unsaved: 'no' }]],
    ['a state with more than is known', stateArguments, [{ ...state, path: '/a' }]],
    [
      'a list of commands without end',
      stateArguments,
      [{ ...state, enabled: Array(257).fill('a') }],
    ],
    ['an answer that holds a path', openFolderAnswer, { grant: 'g', name: 'n', root: '/a' }],
  ] as const)('refuse %s', (_name, form, value) => {
    expect(form.safeParse(value).success).toBe(false);
  });

  it('refuse bytes beyond 256 MiB', () => {
    expect(LARGEST_SAVE_BYTES).toBe(268_435_456);
    // The length alone is looked at; a real array of this size would only slow the tests.
    const huge = Object.defineProperty(new Uint8Array(1), 'byteLength', {
      value: LARGEST_SAVE_BYTES + 1,
    });
    expect(saveArguments.safeParse(['a.csv', huge]).success).toBe(false);
  });
});

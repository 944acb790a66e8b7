import { describe, expect, it } from 'vitest';
import { createClient } from '../../../../renderer/host/client.js';
import { takeToken } from '../../../../renderer/host/token.js';
import { sampleState } from '../sample.js';

const signal = new AbortController().signal;

/** A client whose host answers with what it is told to; every request is written down. */
function clientOf(answer: (request: Request) => Response | Promise<Response>, token?: string) {
  const asked: Request[] = [];
  const client = createClient('http://127.0.0.1:5000', {
    token,
    fetch: async (input, init) => {
      const request = new Request(input, init);
      asked.push(request);
      return answer(request);
    },
  });
  return { client, asked };
}

const json = (body: unknown, init: ResponseInit = {}) => Response.json(body, init);

function events(...lines: readonly string[]): Response {
  return new Response(lines.join(''), { headers: { 'Content-Type': 'text/event-stream' } });
}

describe('The token', () => {
  const tab = () => {
    const kept = new Map<string, string>();
    return {
      getItem: (key: string) => kept.get(key) ?? null,
      setItem: (key: string, value: string) => {
        kept.set(key, value);
      },
    };
  };

  it('is taken from the fragment, which is erased, and is there again when the page is loaded again', () => {
    const erased: string[] = [];
    const history = {
      replaceState: (_: unknown, __: string, url?: string | URL | null) => erased.push(String(url)),
    };
    const storage = tab();
    expect(takeToken({ hash: '#secret', pathname: '/', search: '?x' }, history, storage)).toBe(
      'secret',
    );
    expect(erased).toEqual(['/?x']);
    expect(takeToken({ hash: '', pathname: '/', search: '' }, history, storage)).toBe('secret');
  });

  it('is none where there is neither', () => {
    const history = { replaceState: () => {} };
    expect(takeToken({ hash: '', pathname: '/', search: '' }, history, tab())).toBeUndefined();
  });
});

describe('The client of the host', () => {
  it('sends the token with every request', async () => {
    const { client, asked } = clientOf(() => json({ version: '1' }), 'secret');
    await client.session(signal);
    expect(asked[0]?.headers.get('Authorization')).toBe('Bearer secret');
    expect(asked[0]?.url).toBe('http://127.0.0.1:5000/api/session');
    expect(client.frame('g/1', 7)).toEqual({
      url: 'http://127.0.0.1:5000/api/folders/g%2F1/frames/7',
      headers: { Authorization: 'Bearer secret' },
    });
  });

  it('hands on the host’s own sentence', async () => {
    const { client } = clientOf(() =>
      json({ code: 'no-such-place', text: 'This place is no longer known.' }, { status: 404 }),
    );
    expect(await client.browse('x', signal)).toEqual({
      ok: false,
      refusal: { code: 'no-such-place', text: 'This place is no longer known.' },
    });
  });

  it('says that the host can’t be reached, and tells that from a request that was given up', async () => {
    const { client } = clientOf(() => Promise.reject(new TypeError('fetch failed')));
    expect(await client.session(signal)).toMatchObject({ refusal: { code: 'unreachable' } });
    const abort = new AbortController();
    abort.abort();
    expect(await client.session(abort.signal)).toMatchObject({ refusal: { code: 'cancelled' } });
  });

  it('follows the index from its progress to its end', async () => {
    const { client, asked } = clientOf(() =>
      events(
        ': open\n\n',
        'event: progress\ndata: {"done":1,"total":2,"text":"Reading"}\n\n',
        'event: done\ndata: {"files":2,"stacks":[],"leftOut":[]}\n\n',
      ),
    );
    const progress: unknown[] = [];
    const index = await client.index('g1', (step) => progress.push(step), signal);
    expect(asked[0]?.url).toBe('http://127.0.0.1:5000/api/folders/g1/index');
    expect(progress).toEqual([{ done: 1, total: 2, text: 'Reading' }]);
    expect(index).toEqual({ ok: true, value: { files: 2, stacks: [], leftOut: [] } });
  });

  it('refuses a job that failed, and one whose stream ended too early', async () => {
    const failed = clientOf(() =>
      events('event: failed\ndata: {"code":"vanished","text":"Gone."}\n\n'),
    );
    expect(await failed.client.index('g1', () => {}, signal)).toEqual({
      ok: false,
      refusal: { code: 'vanished', text: 'Gone.' },
    });
    const cut = clientOf(() => events('event: progress\ndata: {"done":1,"text":""}\n\n'));
    expect(await cut.client.index('g1', () => {}, signal)).toMatchObject({
      refusal: { code: 'no-end' },
    });
  });

  it('has no note where the host has none, and the note with its tag where it has one', async () => {
    const none = clientOf(() => json({ code: 'no-note', text: 'None.' }, { status: 404 }));
    expect(await none.client.readNote('2.25.1', signal)).toEqual({ ok: true, value: undefined });
    const { note } = sampleState();
    const one = clientOf(() => json(note, { headers: { ETag: '"a"' } }));
    expect(await one.client.readNote('2.25.1', signal)).toEqual({
      ok: true,
      value: { note, json: note, etag: '"a"' },
    });
  });

  it('refuses a note that does not follow the format', async () => {
    const { client } = clientOf(() =>
      json({ format: 'diptych-note' }, { headers: { ETag: '"a"' } }),
    );
    expect((await client.readNote('2.25.1', signal)).ok).toBe(false);
  });

  it('guards a write by the tag of what it replaces, and a first one by there being none', async () => {
    const { note } = sampleState();
    if (note === undefined) throw new Error('invalid sample');
    const { client, asked } = clientOf(() => json({}, { headers: { ETag: '"b"' } }));
    expect(await client.writeNote('2.25.1', note, '"a"', signal)).toEqual({
      ok: true,
      value: '"b"',
    });
    await client.writeNote('2.25.1', note, undefined, signal);
    expect(
      asked.map(({ headers }) => [headers.get('If-Match'), headers.get('If-None-Match')]),
    ).toEqual([
      ['"a"', null],
      [null, '*'],
    ]);
  });

  it('calls another window’s version a conflict', async () => {
    const { note } = sampleState();
    if (note === undefined) throw new Error('invalid sample');
    const { client } = clientOf(() =>
      json({ code: 'note-conflict', text: 'Changed.' }, { status: 412 }),
    );
    expect(await client.writeNote('2.25.1', note, '"a"', signal)).toMatchObject({
      refusal: { code: 'conflict', text: 'Changed.' },
    });
  });
});

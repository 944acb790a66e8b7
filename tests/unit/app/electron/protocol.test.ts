import { describe, expect, it } from 'vitest';
import { afterWrites } from '../../../../app/electron/afterWrites.js';
import { OWN_SCHEME, serve } from '../../../../app/electron/protocol.js';

describe('OWN_SCHEME', () => {
  it('has the four privileges that the page needs, and no other', () => {
    expect(OWN_SCHEME).toEqual({
      scheme: 'app',
      privileges: { standard: true, secure: true, supportFetchAPI: true, stream: true },
    });
  });
});

describe('serve', () => {
  function served() {
    const lines: string[] = [];
    const asked: string[] = [];
    let mounted: ((request: Request) => Promise<Response>) | undefined;
    serve(
      {
        handle: (scheme, handler) => {
          expect(scheme).toBe('app');
          mounted = handler;
        },
      },
      (request) => {
        asked.push(request.url);
        return new Response('page');
      },
      (line) => lines.push(line),
    );
    const ask = (url: string, initiatorOrigin?: string | null) =>
      mounted?.(
        Object.assign(new Request(url), initiatorOrigin === undefined ? {} : { initiatorOrigin }),
      );
    return { lines, asked, ask };
  }

  it('passes our page’s requests, and the browser’s own, to the host', async () => {
    const { ask, asked, lines } = served();
    expect((await ask('app://local/'))?.status).toBe(200);
    expect(await (await ask('app://local/api', 'app://local'))?.text()).toBe('page');
    expect(asked).toEqual(['app://local/', 'app://local/api']);
    expect(lines).toEqual([]);
  });

  it.each([
    ['app://elsewhere/', undefined, 'foreign host'],
    ['app://local/api', 'https://example.com', 'foreign origin'],
    ['app://local/api', null, 'foreign origin'],
  ])('refuses %s asked by %s with 403 and an empty body', async (url, initiator, reason) => {
    const { ask, asked, lines } = served();
    const response = await ask(url, initiator);
    expect(response?.status).toBe(403);
    expect(await response?.text()).toBe('');
    expect(asked).toEqual([]);
    expect(lines).toEqual([`refused a request: ${reason}`]);
  });
});

describe('afterWrites', () => {
  it.each([
    ['GET', 0],
    ['HEAD', 0],
    ['PUT', 1],
    ['POST', 1],
    ['DELETE', 1],
  ])('after %s calls back %i times', async (method, times) => {
    let called = 0;
    const handler = afterWrites(
      () => new Response('done'),
      () => {
        called += 1;
      },
    );
    const response = await handler(new Request('app://local/x', { method }));
    expect(response.status).toBe(200);
    expect(called).toBe(times);
  });
});

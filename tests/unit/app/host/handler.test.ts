import { mkdir, readFile, rm, symlink, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { success } from '../../../../core/result.js';
import { hostForTest, jsonRequest, studyFolder } from './hostForTest.js';
import { readEvents } from './readEvents.js';

const bearer = (token: string) => ({ headers: { Authorization: `Bearer ${token}` } });

test('every answer carries the security headers, refusals too', async () => {
  const { ask } = await hostForTest({ token: 'secret' });
  for (const path of ['/', '/assets/index-1.js', '/nothing', '/api/session', '/api/nothing']) {
    const { headers } = await ask(path);
    const policy = headers.get('Content-Security-Policy') ?? '';
    expect(policy).toContain("default-src 'none'");
    expect(policy).toContain("script-src 'self' 'wasm-unsafe-eval'");
    expect(policy).toContain("frame-ancestors 'none'");
    expect(policy).not.toContain('unsafe-inline');
    expect(policy).not.toContain("'unsafe-eval'");
    expect({
      opener: headers.get('Cross-Origin-Opener-Policy'),
      embedder: headers.get('Cross-Origin-Embedder-Policy'),
      resource: headers.get('Cross-Origin-Resource-Policy'),
      sniff: headers.get('X-Content-Type-Options'),
      referrer: headers.get('Referrer-Policy'),
      cache: headers.get('Cache-Control'),
      cors: headers.get('Access-Control-Allow-Origin'),
    }).toEqual({
      opener: 'same-origin',
      embedder: 'require-corp',
      resource: 'same-origin',
      sniff: 'nosniff',
      referrer: 'no-referrer',
      cache: 'no-store',
      cors: null,
    });
  }
});

test('the page is served without a token, its data only with it', async () => {
  const { ask } = await hostForTest({ token: 'secret' });
  const page = await ask('/');
  expect([page.status, page.headers.get('Content-Type')]).toEqual([
    200,
    'text/html; charset=utf-8',
  ]);
  expect((await ask('/api/session')).status).toBe(401);
  expect((await ask('/api/session?token=secret')).status).toBe(401);
  expect((await ask('/api/session', bearer('secreT'))).status).toBe(401);
  expect((await ask('/api/session', { headers: { Authorization: 'secret' } })).status).toBe(401);
  expect((await ask('/api/session', bearer('secret'))).status).toBe(200);
});

test('a session tells version, folders, recent folders and settings', async () => {
  const { ask } = await hostForTest({ openDemonstration: true });
  expect(await (await ask('/api/session')).json()).toEqual({
    version: JSON.parse(await readFile('package.json', 'utf8')).version,
    folders: [],
    recent: [],
    settings: { cautionsAccepted: false, theme: 'dark', letterKeys: true, reader: '' },
    openDemonstration: true,
    remarks: [],
  });
});

test('methods are those of the table: others get 405 with Allow, unknown addresses 404', async () => {
  const { ask } = await hostForTest();
  const answers = await Promise.all(
    (
      [
        ['OPTIONS', '/api/session'],
        ['HEAD', '/api/presence'],
        ['POST', '/api/session'],
        ['DELETE', '/api/notes/1.2'],
        ['OPTIONS', '/'],
        ['POST', '/'],
        ['GET', '/api/nothing'],
        ['GET', '/api/folders//index'],
      ] as const
    ).map(async ([method, path]) => {
      const answer = await ask(path, { method });
      return [method, path, answer.status, answer.headers.get('Allow')];
    }),
  );
  expect(answers).toEqual([
    ['OPTIONS', '/api/session', 405, 'GET'],
    ['HEAD', '/api/presence', 405, 'GET'],
    ['POST', '/api/session', 405, 'GET'],
    ['DELETE', '/api/notes/1.2', 405, 'GET, PUT'],
    ['OPTIONS', '/', 405, 'GET, HEAD'],
    ['POST', '/', 405, 'GET, HEAD'],
    ['GET', '/api/nothing', 404, null],
    ['GET', '/api/folders//index', 404, null],
  ]);
});

test('bodies are JSON, of a bounded size and of the right shape', async () => {
  const { ask } = await hostForTest();
  const settings = { cautionsAccepted: true, theme: 'dark', letterKeys: false, reader: 'R. Eader' };
  const put = (body: unknown) => ask('/api/settings', jsonRequest('PUT', body));
  const text = await ask('/api/settings', { method: 'PUT', body: JSON.stringify(settings) });
  expect([text.status, (await text.json()).code]).toEqual([415, 'not-json']);
  expect((await ask('/api/demonstration', { method: 'POST', body: 'x' })).status).toBe(415);
  expect((await ask('/api/settings', { ...jsonRequest('PUT', 0), body: '{"a":' })).status).toBe(
    400,
  );
  expect((await put({ ...settings, theme: 'pink' })).status).toBe(400);
  expect((await put({ ...settings, more: 1 })).status).toBe(400);
  expect((await put({ ...settings, reader: 'x'.repeat(1 << 20) })).status).toBe(413);
  const good = await put(settings);
  expect([good.status, await good.json()]).toEqual([200, settings]);
  expect((await (await ask('/api/session')).json()).settings).toEqual(settings);
});

test('no form of a path leads out of the built page', async () => {
  const { ask, home } = await hostForTest();
  await writeFile(join(home, 'secret.js'), 'secret');
  await symlink(join(home, 'secret.js'), join(home, 'page', 'late.js'));
  const paths = [
    '/../secret.js',
    '/%2e%2e/secret.js',
    '/%2e%2e%2fsecret.js',
    '/assets/..%2f..%2fsecret.js',
    '/..%5csecret.js',
    '/assets/%00',
    '/index.html%00.js',
    '/late.js',
    '/assets',
    '/assets/',
    '/%',
    '//127.0.0.1/index.html',
  ];
  for (const path of paths) {
    const answer = await ask(path);
    expect([path, answer.status]).toEqual([path, 404]);
    expect(await answer.text()).not.toContain('secret');
  }
});

test('a folder is chosen by ids that the host gave, and read by its grant', async () => {
  const { ask, home, reported } = await hostForTest({ folderChooser: true });
  await studyFolder(home);
  const level = await (await ask('/api/browse')).json();
  const study = level.children.find((child: { name: string }) => child.name === 'study');
  const opened = await (await ask('/api/folders', jsonRequest('POST', { id: study.id }))).json();
  expect(opened).toEqual({ grant: expect.stringMatching(/^[\w-]{22}$/), name: 'study' });

  const events = await readEvents(await ask(`/api/folders/${opened.grant}/index`));
  expect(events.map(({ event }) => event)).toEqual(['progress', 'done']);
  expect(events.at(-1)?.data).toMatchObject({ files: 3, stacks: [{ unit: 'HU' }], leftOut: [] });
  expect(JSON.stringify(events)).not.toContain(home);

  const session = await (await ask('/api/session')).json();
  expect(session.folders).toEqual([opened]);
  expect(session.recent).toEqual([{ id: expect.any(String), name: 'study', missing: false }]);
  expect(reported).toEqual([]);
});

test('a path instead of an id opens nothing, and a shell with a dialog has no chooser', async () => {
  const { ask } = await hostForTest({ folderChooser: true });
  for (const id of ['/etc', '../..', 'x'.repeat(22)]) {
    expect((await ask('/api/folders', jsonRequest('POST', { id }))).status).toBe(404);
    expect((await ask(`/api/browse?at=${encodeURIComponent(id)}`)).status).toBe(404);
  }
  const electron = await hostForTest();
  expect((await electron.ask('/api/browse')).status).toBe(404);
  expect((await electron.ask('/api/folders', jsonRequest('POST', { id: 'x' }))).status).toBe(404);
});

test('frames are the file’s bytes, whole or in part, and only those of the index', async () => {
  const { ask, home, services } = await hostForTest();
  const folder = await studyFolder(home);
  const opened = await services.openFolder(folder);
  if (!opened.ok) throw new Error(opened.refusal.text);
  const frames = `/api/folders/${opened.value.grant}/frames`;
  expect((await ask(`${frames}/0`)).status).toBe(404);
  await (await ask(`/api/folders/${opened.value.grant}/index`)).text();

  const bytes = await readFile(join(folder, 'slice1.dcm'));
  const whole = await ask(`${frames}/0`);
  expect([
    whole.status,
    whole.headers.get('Content-Length'),
    whole.headers.get('Content-Type'),
  ]).toEqual([200, String(bytes.length), 'application/dicom']);
  expect(Buffer.from(await whole.arrayBuffer())).toEqual(bytes);

  const part = await ask(`${frames}/0`, { headers: { Range: 'bytes=128-131' } });
  expect([part.status, part.headers.get('Content-Range'), await part.text()]).toEqual([
    206,
    `bytes 128-131/${bytes.length}`,
    'DICM',
  ]);
  const beyond = await ask(`${frames}/0`, { headers: { Range: `bytes=${bytes.length}-` } });
  expect([beyond.status, beyond.headers.get('Content-Range')]).toEqual([
    416,
    `bytes */${bytes.length}`,
  ]);

  for (const fileId of ['3', '-1', '1e0', '0x0', '..%2f0', '%00', '99999999999']) {
    expect([fileId, (await ask(`${frames}/${fileId}`)).status]).toEqual([fileId, 404]);
  }
  expect((await ask('/api/folders/other/frames/0')).status).toBe(404);

  await writeFile(join(folder, 'slice2.dcm'), 'something else');
  await rm(join(folder, 'slice3.dcm'));
  const changed = await ask(`${frames}/1`);
  expect([changed.status, (await changed.json()).code]).toEqual([409, 'file-changed']);
  const vanished = await ask(`${frames}/2`);
  expect([vanished.status, await vanished.json()]).toEqual([
    404,
    { code: 'vanished', text: 'This file is no longer there. Open the folder again.' },
  ]);
});

test('an empty file has an empty answer', async () => {
  const { ask, home, services } = await hostForTest();
  await mkdir(join(home, 'study'));
  await writeFile(join(home, 'study', 'empty'), '');
  const opened = await services.openFolder(join(home, 'study'));
  if (!opened.ok) throw new Error(opened.refusal.text);
  await (await ask(`/api/folders/${opened.value.grant}/index`)).text();
  const answer = await ask(`/api/folders/${opened.value.grant}/frames/0`);
  expect([answer.status, answer.headers.get('Content-Length'), await answer.text()]).toEqual([
    200,
    '0',
    '',
  ]);
});

test('a file that became a link out of the folder is not read', async () => {
  const { ask, home, services } = await hostForTest();
  const folder = await studyFolder(home);
  const opened = await services.openFolder(folder);
  if (!opened.ok) throw new Error(opened.refusal.text);
  await (await ask(`/api/folders/${opened.value.grant}/index`)).text();
  await rm(join(folder, 'slice1.dcm'));
  await writeFile(join(home, 'secret'), 'secret');
  await symlink(join(home, 'secret'), join(folder, 'slice1.dcm'));
  const answer = await ask(`/api/folders/${opened.value.grant}/frames/0`);
  expect([answer.status, (await answer.json()).code]).toEqual([403, 'outside-folder']);
});

test('recent folders are opened again by their id, taken off, and forgotten', async () => {
  const { ask, home, services } = await hostForTest();
  await services.openFolder(await studyFolder(home));
  await mkdir(join(home, 'gone'));
  await services.openFolder(join(home, 'gone'));
  await rm(join(home, 'gone'), { recursive: true });
  const { recent } = await (await ask('/api/session')).json();
  expect(recent).toEqual([
    { id: expect.any(String), name: 'gone', missing: true },
    { id: expect.any(String), name: 'study', missing: false },
  ]);
  const [gone, study] = recent;
  expect((await ask(`/api/recent/${gone.id}/open`, { method: 'POST' })).status).toBe(404);
  expect((await ask('/api/recent/unknown/open', { method: 'POST' })).status).toBe(404);
  const opened = await ask(`/api/recent/${study.id}/open`, { method: 'POST' });
  expect(await opened.json()).toEqual({ grant: expect.any(String), name: 'study' });
  const left = await ask(`/api/recent/${gone.id}`, { method: 'DELETE' });
  expect(await left.json()).toEqual([study]);
  expect(await (await ask('/api/recent', { method: 'DELETE' })).json()).toEqual([]);
});

test('the demonstration tells its progress and opens its folder, which is not put among the recent ones', async () => {
  const { ask, home } = await hostForTest({
    ensureDemonstration: async (data, { onProgress }) => {
      onProgress?.({ done: 1, total: 2, text: 'Half' });
      await mkdir(join(data, 'demo'), { recursive: true });
      return success({ folder: join(data, 'demo') });
    },
  });
  const events = await readEvents(await ask('/api/demonstration', { method: 'POST' }));
  expect(events).toEqual([
    { event: 'progress', data: { done: 1, total: 2, text: 'Half' } },
    { event: 'done', data: { grant: expect.any(String), name: 'demo' } },
  ]);
  expect((await (await ask('/api/session')).json()).recent).toEqual([]);
  expect(JSON.stringify(events)).not.toContain(home);
});

test('a job that is refused ends with failed; one that breaks is reported and tells no details', async () => {
  const refused = await hostForTest();
  expect(await readEvents(await refused.ask('/api/demonstration', { method: 'POST' }))).toEqual([
    { event: 'failed', data: { code: 'none', text: 'No demonstration in this test.' } },
  ]);
  const broken = await hostForTest({
    ensureDemonstration: async () => {
      throw new Error('details of /home/somebody');
    },
  });
  const events = await readEvents(await broken.ask('/api/demonstration', { method: 'POST' }));
  expect(events).toMatchObject([{ event: 'failed', data: { code: 'internal' } }]);
  expect(JSON.stringify(events)).not.toContain('somebody');
  expect(broken.reported).toHaveLength(1);
});

function openPromise(): { readonly promise: Promise<void>; readonly resolve: () => void } {
  let resolve = (): void => {};
  const promise = new Promise<void>((settle) => {
    resolve = settle;
  });
  return { promise, resolve };
}

test('a job is told to stop when its reader goes, by the request and by the stream', async () => {
  for (const way of ['request', 'stream'] as const) {
    let told: AbortSignal | undefined;
    const started = openPromise();
    const stopped = openPromise();
    const { ask } = await hostForTest({
      ensureDemonstration: async (_data, { signal }) => {
        told = signal;
        started.resolve();
        await new Promise<void>((resolve) => signal?.addEventListener('abort', () => resolve()));
        stopped.resolve();
        return success({ folder: '/' });
      },
    });
    const cancel = new AbortController();
    const answer = await ask('/api/demonstration', { method: 'POST', signal: cancel.signal });
    const reader = answer.body?.getReader();
    await reader?.read();
    await started.promise;
    expect(told?.aborted).toBe(false);
    if (way === 'request') cancel.abort();
    else await reader?.cancel();
    await stopped.promise;
    expect(told?.aborted).toBe(true);
  }
});

test('presence counts the pages that hold its stream open', async () => {
  const { ask, services } = await hostForTest();
  const first = await ask('/api/presence');
  const second = await ask('/api/presence');
  expect(services.presence.count).toBe(2);
  await first.body?.cancel();
  await expect.poll(() => services.presence.count).toBe(1);
  await second.body?.cancel();
  await expect.poll(() => services.presence.count).toBe(0);
});

import { expect, test } from 'vitest';
import { hostForTest, jsonRequest } from './hostForTest.js';
import { sampleNote } from './sampleNote.js';

const ADDRESS = '/api/notes/2.25.77001.1';
const QUERY = `${ADDRESS}?reader=R.%20Eader`;
const FIRST = { 'If-None-Match': '*' };

test('a study without a note gives 404; the first save 201; then the note with its tag', async () => {
  const { ask } = await hostForTest();
  const none = await ask(QUERY);
  expect([none.status, (await none.json()).code]).toEqual([404, 'no-note']);
  const saved = await ask(ADDRESS, jsonRequest('PUT', sampleNote(), FIRST));
  expect(saved.status).toBe(201);
  const read = await ask(QUERY);
  expect([read.status, read.headers.get('Content-Type')]).toEqual([200, 'application/json']);
  expect(read.headers.get('ETag')).toBe(saved.headers.get('ETag'));
  expect(await read.json()).toEqual(sampleNote());
});

test('without a query the note is that of the reader of the settings', async () => {
  const { ask, services } = await hostForTest();
  await ask(ADDRESS, jsonRequest('PUT', sampleNote(), FIRST));
  expect((await ask(ADDRESS)).status).toBe(404);
  const { settings } = await services.settings.read();
  await services.settings.write({ ...settings, reader: 'R. Eader' });
  expect((await ask(ADDRESS)).status).toBe(200);
});

test('of two windows the second to save is refused with 412 and a sentence', async () => {
  const { ask } = await hostForTest();
  await ask(ADDRESS, jsonRequest('PUT', sampleNote(), FIRST));
  const etag = (await ask(QUERY)).headers.get('ETag') ?? '';
  const one = await ask(
    ADDRESS,
    jsonRequest('PUT', sampleNote({ comment: 'one' }), { 'If-Match': etag }),
  );
  const two = await ask(
    ADDRESS,
    jsonRequest('PUT', sampleNote({ comment: 'two' }), { 'If-Match': etag }),
  );
  const new_ = await ask(ADDRESS, jsonRequest('PUT', sampleNote({ comment: 'three' }), FIRST));
  expect([one.status, two.status, new_.status]).toEqual([200, 412, 412]);
  expect(await two.json()).toMatchObject({
    code: 'note-conflict',
    text: expect.stringMatching(/^Another window stored this note meanwhile\./),
  });
  expect((await (await ask(QUERY)).json()).comment).toBe('one');
});

test('a save must say what it replaces (RFC 6585: 428), and “anything” does not count', async () => {
  const { ask } = await hostForTest();
  for (const headers of [{}, { 'If-Match': '*' }, { 'If-None-Match': '"x"' }] as Record<
    string,
    string
  >[]) {
    expect((await ask(ADDRESS, jsonRequest('PUT', sampleNote(), headers))).status).toBe(428);
  }
  expect((await ask(QUERY)).status).toBe(404);
});

test('a note of another study, and what is no note, are refused with 400', async () => {
  const { ask } = await hostForTest();
  const other = await ask('/api/notes/1.2', jsonRequest('PUT', sampleNote(), FIRST));
  expect([other.status, (await other.json()).code]).toEqual([400, 'other-study']);
  const broken = await ask(
    ADDRESS,
    jsonRequest('PUT', { format: 'diptych-note', version: 1 }, FIRST),
  );
  expect([broken.status, (await broken.json()).code]).toEqual([400, 'note-invalid']);
});

test('a note may be larger than other bodies, up to 4 MiB', async () => {
  const { ask } = await hostForTest();
  const large = sampleNote({ comment: 'x'.repeat(3 << 20) });
  expect((await ask(ADDRESS, jsonRequest('PUT', large, FIRST))).status).toBe(201);
  const larger = sampleNote({ reader: 'A. Nother', comment: 'x'.repeat(4 << 20) });
  expect((await ask(ADDRESS, jsonRequest('PUT', larger, FIRST))).status).toBe(413);
});

import { expect, test } from 'vitest';
import { encodePng, makeRaster } from '../../../../core/raster/index.js';
import { richNote } from '../../core/note/richNote.js';
import { hostForTest, jsonRequest } from './hostForTest.js';

const ADDRESS = '/api/exports/pdf';
const PNG = Buffer.from(encodePng(makeRaster(8, 8, [1, 2, 3]))).toString('base64');

test('a note with its key images comes back as a PDF file', async () => {
  const { ask } = await hostForTest();
  const body = { note: richNote(), pictures: [{ regionId: 'L1', png: PNG }] };
  const answer = await ask(ADDRESS, jsonRequest('POST', body));
  expect([answer.status, answer.headers.get('Content-Type')]).toEqual([200, 'application/pdf']);
  expect(
    Buffer.from(await answer.arrayBuffer())
      .subarray(0, 5)
      .toString(),
  ).toBe('%PDF-');
});

test('what is no note, and a picture that is no PNG file, are refused with a sentence', async () => {
  const { ask } = await hostForTest();
  const none = await ask(ADDRESS, jsonRequest('POST', { note: {}, pictures: [] }));
  expect([none.status, (await none.json()).code]).toEqual([400, 'note-invalid']);
  const body = { note: richNote(), pictures: [{ regionId: 'L1', png: 'AAAA' }] };
  const bad = await ask(ADDRESS, jsonRequest('POST', body));
  expect([bad.status, (await bad.json()).text]).toEqual([400, 'The picture of L1 is no PNG file.']);
});

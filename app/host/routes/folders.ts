import { type Context, Hono } from 'hono';
import { characterSetChoice } from '../../../core/dicom/index.js';
import { type Refusal, refuse } from '../../../core/result.js';
import { byteRange } from '../http/byteRange.js';
import { jobStream } from '../http/jobStream.js';
import { refused } from '../http/refused.js';
import { createFrameMaps, type FrameMaps } from '../library/frameMaps.js';
import { frameStream } from '../library/frameStream.js';
import type { OpenFrame } from '../library/openFrame.js';
import type { Services } from '../services.js';

const NO_SUCH_SET: Refusal = {
  code: 'no-such-character-set',
  text: 'Texts can’t be read in this character set. Choose one of those that are offered.',
};

/** What an opened folder holds, and the bytes of its files by their number. */
export function folderRoutes(services: Services) {
  const maps = createFrameMaps();
  return new Hono()
    .get('/folders/:grant/index', (context) => {
      const characterSet = context.req.query('characterSet');
      if (characterSet !== undefined && characterSetChoice(characterSet) === undefined) {
        return refused(context, NO_SUCH_SET);
      }
      return jobStream(context.req.raw.signal, services.report, (options) =>
        services.library.index(context.req.param('grant'), { ...options, characterSet }),
      );
    })
    .get('/folders/:grant/frames/:fileId', async (context) => {
      const number = context.req.param('fileId');
      const fileId = /^\d{1,9}$/.test(number) ? Number(number) : -1;
      const opened = await services.library.open(context.req.param('grant'), fileId);
      if (!opened.ok) return refused(context, opened.refusal);
      const frame = context.req.query('frame');
      if (frame === undefined) return sendFile(context, opened.value);
      const key = `${context.req.param('grant')} ${fileId}`;
      return sendFrame(context, opened.value, maps, key, frame);
    });
}

/** The file's bytes as they are, or the part that a Range header asks for (RFC 9110 section 14). */
async function sendFile(context: Context, frame: OpenFrame): Promise<Response> {
  const { size, file } = frame;
  const range = byteRange(context.req.header('Range'), size);
  const headers = new Headers({ 'Accept-Ranges': 'bytes', 'Content-Type': 'application/dicom' });
  if (range.kind === 'unsatisfiable') {
    await file.close();
    headers.set('Content-Range', `bytes */${size}`);
    return new Response(null, { status: 416, headers });
  }
  const { start, length } = range.kind === 'part' ? range.span : { start: 0, length: size };
  headers.set('Content-Length', String(length));
  if (range.kind === 'part') {
    headers.set('Content-Range', `bytes ${start}-${start + length - 1}/${size}`);
  }
  return new Response(frameStream(frame, [{ start, length }]), {
    status: range.kind === 'part' ? 206 : 200,
    headers,
  });
}

/** The encoded bytes of one frame alone, counted from 0, of a file that may hold thousands. */
async function sendFrame(
  context: Context,
  opened: OpenFrame,
  maps: FrameMaps,
  key: string,
  frame: string,
): Promise<Response> {
  const places = await findFrame(opened, maps, key, frame);
  if (!places.ok) {
    await opened.file.close();
    return refused(context, { code: 'no-such-frame', text: places.refusal.text });
  }
  const spans = places.value.map(({ offset, length }) => ({ start: offset, length }));
  const length = spans.reduce((sum, span) => sum + span.length, 0);
  const headers = { 'Content-Type': 'application/octet-stream', 'Content-Length': String(length) };
  return new Response(frameStream(opened, spans), { headers });
}

async function findFrame(opened: OpenFrame, maps: FrameMaps, key: string, frame: string) {
  const index = /^\d{1,6}$/.test(frame) ? Number(frame) : Number.NaN;
  if (Number.isNaN(index)) return refuse('no-such-frame', 'There is no such frame in this file.');
  try {
    return await maps.places(opened, key, index);
  } catch (error) {
    await opened.file.close();
    throw error;
  }
}

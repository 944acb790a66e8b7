import { type Context, Hono } from 'hono';
import { byteRange } from '../http/byteRange.js';
import { jobStream } from '../http/jobStream.js';
import { refused } from '../http/refused.js';
import { frameStream } from '../library/frameStream.js';
import type { OpenFrame } from '../library/openFrame.js';
import type { Services } from '../services.js';

/** What an opened folder holds, and the bytes of its files by their number. */
export function folderRoutes(services: Services) {
  return new Hono()
    .get('/folders/:grant/index', (context) =>
      jobStream(context.req.raw.signal, services.report, (options) =>
        services.library.index(context.req.param('grant'), options),
      ),
    )
    .get('/folders/:grant/frames/:fileId', async (context) => {
      const number = context.req.param('fileId');
      const fileId = /^\d{1,9}$/.test(number) ? Number(number) : -1;
      const opened = await services.library.open(context.req.param('grant'), fileId);
      return opened.ok ? await sendFrame(context, opened.value) : refused(context, opened.refusal);
    });
}

/** The file's bytes as they are, or the part that a Range header asks for (RFC 9110 section 14). */
async function sendFrame(context: Context, frame: OpenFrame): Promise<Response> {
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
  return new Response(frameStream(frame, { start, length }), {
    status: range.kind === 'part' ? 206 : 200,
    headers,
  });
}

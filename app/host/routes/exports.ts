import { Hono } from 'hono';
import { z } from 'zod';
import { pdfDocument } from '../../../core/report/pdf/index.js';
import { toPdf } from '../exports/toPdf.js';
import { jsonBody } from '../http/jsonBody.js';
import { limitBody } from '../http/limitBody.js';
import { refused } from '../http/refused.js';
import { checkSentNote } from '../notes/checkNote.js';

/** A note with a key image of each of its regions. */
export const PDF_BODY_BYTES = 64 << 20;

const PdfRequestSchema = z.object({
  note: z.unknown(),
  /** Key images as the page drew them: PNG files in base64. */
  pictures: z.array(z.object({ regionId: z.string(), png: z.base64() })),
});

/** Exports that take a library which the page does not carry. Nothing is kept of what is sent. */
export function exportRoutes() {
  return new Hono().post(
    '/exports/pdf',
    limitBody(PDF_BODY_BYTES),
    jsonBody(PdfRequestSchema),
    async (context) => {
      const { note: json, pictures } = context.req.valid('json');
      const note = checkSentNote(json);
      if (!note.ok) return refused(context, note.refusal);
      const bad = pictures.find(({ png }) => !isPng(Buffer.from(png, 'base64')));
      if (bad !== undefined) {
        const text = `The picture of ${bad.regionId} is no PNG file.`;
        return context.json({ code: 'bad-request', text }, 400);
      }
      const nameOf = (regionId: string): string => `region-${regionId}`;
      const regionIds = pictures.map(({ regionId }) => regionId);
      const pdf = await toPdf(
        pdfDocument(note.value, { regionIds, nameOf }),
        new Map(
          pictures.map(({ regionId, png }) => [
            nameOf(regionId),
            new Uint8Array(Buffer.from(png, 'base64')),
          ]),
        ),
        new Date().toISOString(),
      );
      return context.body(new Uint8Array(pdf), 200, { 'Content-Type': 'application/pdf' });
    },
  );
}

/** First bytes of every PNG file (ISO/IEC 15948, 5.2). */
const PNG = Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]);

function isPng(bytes: Buffer): boolean {
  return bytes.subarray(0, PNG.length).equals(PNG);
}

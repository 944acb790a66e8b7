import { Hono } from 'hono';
import { z } from 'zod';
import { jsonBody } from '../http/jsonBody.js';
import { limitBody, NOTE_BODY_BYTES } from '../http/limitBody.js';
import { refused } from '../http/refused.js';
import type { SaveCondition } from '../notes/notesStore.js';
import type { Services } from '../services.js';

const StudySchema = z.object({ study: z.object({ studyInstanceUid: z.string() }) });

/**
 * The reading note of a study. GET takes the reader from the query, else from the settings; PUT takes
 * it from the note. A save says what it replaces: `If-Match` with the tag it was given, or
 * `If-None-Match: *` for the first note (RFC 9110 section 13.1).
 */
export function noteRoutes(services: Services) {
  return new Hono()
    .get('/notes/:studyInstanceUid', async (context) => {
      const reader =
        context.req.query('reader') ?? (await services.settings.read()).settings.reader;
      const studyInstanceUid = context.req.param('studyInstanceUid');
      const stored = await services.notes.read({ studyInstanceUid, reader });
      if (!stored.ok) return refused(context, stored.refusal);
      return context.body(stored.value.bytes, 200, {
        'Content-Type': 'application/json',
        ETag: stored.value.etag,
      });
    })
    .get('/notes/:studyInstanceUid/readers', async (context) =>
      context.json(await services.notes.list(context.req.param('studyInstanceUid'))),
    )
    .put(
      '/notes/:studyInstanceUid',
      limitBody(NOTE_BODY_BYTES),
      jsonBody(z.unknown()),
      async (context) => {
        const note = context.req.valid('json');
        const condition = saveCondition(
          context.req.header('If-Match'),
          context.req.header('If-None-Match'),
        );
        if (condition === undefined) {
          const text = 'A note is stored only with If-Match and its tag, or with If-None-Match: *.';
          return context.json({ code: 'no-condition', text }, 428);
        }
        const study = StudySchema.safeParse(note);
        if (
          study.success &&
          study.data.study.studyInstanceUid !== context.req.param('studyInstanceUid')
        ) {
          return context.json({ code: 'other-study', text: 'The note is of another study.' }, 400);
        }
        const saved = await services.notes.save(note, condition);
        if (!saved.ok) return refused(context, saved.refusal);
        context.header('ETag', saved.value.etag);
        return context.json(saved.value, saved.value.created ? 201 : 200);
      },
    );
}

/** Undefined when neither header says what may be replaced; `If-Match: *` would replace anything, and does not count. */
function saveCondition(
  ifMatch: string | undefined,
  ifNoneMatch: string | undefined,
): SaveCondition | undefined {
  if (ifMatch !== undefined) {
    const etags = ifMatch.match(/"[^"]*"/g) ?? [];
    return etags.length === 0 ? undefined : { kind: 'unchanged', etags };
  }
  return ifNoneMatch?.trim() === '*' ? { kind: 'absent' } : undefined;
}

import { z } from 'zod';

const text = z.string();
/** SHA-256, 64 hexadecimal digits. */
const sha256 = text.regex(/^[0-9a-f]{64}$/);

/** Who verified the note and when, with the SHA-256 over the canonical JSON of all else that it holds. */
export const SealSchema = z.object({ by: text.regex(/\S/), at: text, sha256 });

/** A verified note that was opened again: by whom, when and why, with the whole note as it was sealed. */
export const AmendmentSchema = z.object({
  by: text.regex(/\S/),
  at: text,
  why: text.regex(/\S/),
  before: z.record(text, z.unknown()),
});

/** A frame that values rest on, with the SHA-256 of its stored values: 16 bit little endian, row after row. */
export const FrameDigestSchema = z.object({
  sopInstanceUid: text,
  frameNumber: z.number().int().positive().nullable(),
  sha256,
});

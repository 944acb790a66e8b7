import { z } from 'zod';
import { NoteSchema } from './schema.js';

/** The published JSON schema of what {@link parseNote} reads, JSON Schema draft 2020-12, as text with a final line end. */
export function noteJsonSchema(): string {
  const { $schema, ...schema } = z.toJSONSchema(NoteSchema, {
    target: 'draft-2020-12',
    io: 'input',
  });
  const published = {
    $schema,
    title: 'Diptych reading note, version 1',
    description:
      'Positions are patient coordinates (LPS) in mm. A value that could not be had is null, and a flag says why.',
    ...schema,
  };
  return `${JSON.stringify(published, null, 2)}\n`;
}

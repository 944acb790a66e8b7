// Writes assets/note.schema.json from the schema in core/note. Run after a change there: node assets/makeNoteSchema.mjs
import { writeFile } from 'node:fs/promises';
import { runnerImport } from 'vite';

const source = new URL('../core/note/noteJsonSchema.ts', import.meta.url);
const { module } = await runnerImport(source.pathname);
await writeFile(new URL('note.schema.json', import.meta.url), module.noteJsonSchema());

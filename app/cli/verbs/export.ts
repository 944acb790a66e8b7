import { basename, resolve } from 'node:path';
import { visibleText } from '../../../core/format/index.js';
import { type Note, parseNote, readJson } from '../../../core/note/index.js';
import { toCsv, toHtml, toTsv, toWideCsv } from '../../../core/report/index.js';
import { refuse, success } from '../../../core/result.js';
import { fileErrorReason } from '../../host/storage/fileError.js';
import { writeOwnerFile } from '../../host/storage/ownerFile.js';
import { nearest } from '../nearest.js';
import { readTextFile } from '../readTextFile.js';
import type { Verb } from '../verb.js';

const FORMS: Readonly<Record<string, (note: Note) => string>> = {
  csv: toCsv,
  tsv: toTsv,
  html: toHtml,
};

/** Forms of later versions: refused by name, so that nobody looks for a mistake of his own. */
const LATER_FORMS: readonly string[] = ['pdf', 'sr'];

/** `export NOTE --as FORM --to FILE`: writes an export of a note. */
export const exportVerb: Verb = {
  name: 'export',
  operands: ['NOTE'],
  options: [
    { name: 'as', value: 'csv|tsv|html', required: true, help: 'form of the export' },
    {
      name: 'to',
      value: 'FILE',
      required: true,
      help: 'file to write; one that is there is replaced',
    },
    { name: 'wide', help: 'with csv: one line a region, both kernels side by side' },
  ],
  summary: 'Write the measurements of a reading note as a table or a page',
  details: 'The file is for its owner alone: it says who the patient is. The note is not changed.',
  async run({ operands: [path = ''], values, switches }, { cwd }) {
    const form = values.as ?? '';
    const source = resolve(cwd, path);
    const target = resolve(cwd, values.to ?? '');
    if (LATER_FORMS.includes(form)) {
      return refuse(
        'later-form',
        `--as ${form} is not in this version. There are csv, tsv and html.`,
      );
    }
    const make = Object.hasOwn(FORMS, form) ? FORMS[form] : undefined;
    if (make === undefined) {
      const near = nearest(form, Object.keys(FORMS));
      const hint = near === undefined ? 'There are csv, tsv and html.' : `Did you mean ${near}?`;
      return refuse('unknown-form', `There is no form “${visibleText(form)}”. ${hint}`);
    }
    const wide = switches.has('wide');
    if (wide && form !== 'csv') return refuse('bad-usage', '--wide goes with --as csv only.');
    if (source === target) return refuse('same-file', 'The export would replace the note itself.');
    const text = await readTextFile(source);
    if (!text.ok) return text;
    const json = readJson(text.value);
    if (!json.ok) return json;
    const note = parseNote(json.value);
    if (!note.ok) return note;
    const content = wide ? toWideCsv(note.value) : make(note.value);
    try {
      await writeOwnerFile(target, content);
    } catch (error) {
      const reason = fileErrorReason(error);
      if (reason === undefined) throw error;
      return refuse('not-written', `${visibleText(basename(target))} can’t be written: ${reason}.`);
    }
    const bytes = Buffer.byteLength(content);
    return success({
      document: { file: target, form, bytes },
      text: `Wrote ${visibleText(target)} (${bytes} bytes).\n`,
      exitCode: 0,
    });
  },
};

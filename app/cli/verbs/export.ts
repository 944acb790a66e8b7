import { basename, resolve } from 'node:path';
import { visibleText } from '../../../core/format/index.js';
import { type Note, parseNote, readJson } from '../../../core/note/index.js';
import { imageLookup, renamedLookup, toWideCsv } from '../../../core/report/index.js';
import { type Result, refuse, success } from '../../../core/result.js';
import { indexFolder } from '../../host/library/indexFolder.js';
import { fileErrorReason } from '../../host/storage/fileError.js';
import { writeOwnerFile } from '../../host/storage/ownerFile.js';
import { deidentifyForExport } from '../deidentifyForExport.js';
import { EXPORT_FORMS, type ExportInput } from '../exportForms.js';
import { keyImages } from '../keyImages.js';
import { nearest } from '../nearest.js';
import { readTextFile } from '../readTextFile.js';
import type { Verb, VerbArguments, VerbContext } from '../verb.js';

const FORM_NAMES = Object.keys(EXPORT_FORMS);
/** Forms that hold something of the images. */
const WITH_IMAGES: ReadonlySet<string> = new Set(['html', 'pdf', 'sr']);
const WITH_PICTURES: ReadonlySet<string> = new Set(['html', 'pdf']);

/** `export NOTE --as FORM --to FILE`: writes an export of a note. */
export const exportVerb: Verb = {
  name: 'export',
  operands: ['NOTE'],
  options: [
    { name: 'as', value: FORM_NAMES.join('|'), required: true, help: 'form of the export' },
    {
      name: 'to',
      value: 'FILE',
      required: true,
      help: 'file to write; one that is there is replaced',
    },
    { name: 'wide', help: 'with csv: one line a region, both kernels side by side' },
    {
      name: 'in',
      value: 'DIR',
      help: 'folder with the images: contours for sr, key images for html and pdf',
    },
    { name: 'deidentify', help: 'without identity, for research: names, dates, texts, UIDs' },
    {
      name: 'salt',
      value: 'FILE',
      help: 'with --deidentify: secret that makes the new UIDs; the same one gives the same',
    },
  ],
  summary: 'Write the measurements of a reading note as a table, a page or a structured report',
  details: `The file is for its owner alone. It says who the patient is, unless --deidentify takes that out; either way it says
which. sr is DICOM: Comprehensive SR with a Measurement Report. The note is not changed.`,
  async run(given, context) {
    const { operands, values, switches } = given;
    const form = values.as ?? '';
    const source = resolve(context.cwd, operands[0] ?? '');
    const target = resolve(context.cwd, values.to ?? '');
    const make = isForm(form) ? EXPORT_FORMS[form] : undefined;
    if (make === undefined) return unknownForm(form);
    const misuse = misuseOf(given, form);
    if (misuse !== undefined) return refuse('bad-usage', misuse);
    if (source === target) return refuse('same-file', 'The export would replace the note itself.');
    const read = await readNote(source);
    if (!read.ok) return read;
    const prepared = await prepare(read.value, given, context);
    if (!prepared.ok) return prepared;
    const { note, input } = prepared.value;
    const content = switches.has('wide') ? toWideCsv(note) : await make(note, input);
    try {
      await writeOwnerFile(target, content);
    } catch (error) {
      const reason = fileErrorReason(error);
      if (reason === undefined) throw error;
      return refuse('not-written', `${visibleText(basename(target))} can’t be written: ${reason}.`);
    }
    const bytes = typeof content === 'string' ? Buffer.byteLength(content) : content.length;
    const deidentified = note.deidentified !== undefined;
    const identity = deidentified ? 'without identity' : 'with identity';
    return success({
      document: { file: target, form, bytes, deidentified },
      text: `Wrote ${visibleText(target)} (${bytes} bytes, ${identity}).\n`,
      exitCode: 0,
    });
  },
};

function isForm(form: string): form is keyof typeof EXPORT_FORMS {
  return Object.hasOwn(EXPORT_FORMS, form);
}

function unknownForm(form: string): Result<never> {
  const near = nearest(form, FORM_NAMES);
  const list = `${FORM_NAMES.slice(0, -1).join(', ')} and ${FORM_NAMES.at(-1)}`;
  const hint = near === undefined ? `There are ${list}.` : `Did you mean ${near}?`;
  return refuse('unknown-form', `There is no form “${visibleText(form)}”. ${hint}`);
}

/** Options that would have no effect are a misunderstanding, and are told. */
function misuseOf({ values, switches }: VerbArguments, form: string): string | undefined {
  if (switches.has('wide') && form !== 'csv') return '--wide goes with --as csv only.';
  if (values.in !== undefined && !WITH_IMAGES.has(form)) {
    return '--in goes with --as html, pdf and sr only.';
  }
  if (values.salt !== undefined && !switches.has('deidentify')) {
    return '--salt goes with --deidentify only.';
  }
  return undefined;
}

interface ReadNote {
  readonly note: Note;
  readonly source: unknown;
}

async function readNote(path: string): Promise<Result<ReadNote>> {
  const text = await readTextFile(path);
  if (!text.ok) return text;
  const json = readJson(text.value);
  if (!json.ok) return json;
  const note = parseNote(json.value);
  return note.ok ? success({ note: note.value, source: json.value }) : note;
}

/** The note with or without identity, and what is made for it from the images. */
async function prepare(
  { note, source }: ReadNote,
  { values, switches }: VerbArguments,
  context: VerbContext,
): Promise<Result<{ readonly note: Note; readonly input: ExportInput }>> {
  const { cwd, job } = context;
  const folder =
    values.in === undefined ? undefined : await indexFolder(resolve(cwd, values.in), job);
  if (folder && !folder.ok) return folder;
  const saltFile = values.salt === undefined ? undefined : resolve(cwd, values.salt);
  const clean = switches.has('deidentify') ? await deidentifyForExport(note, saltFile) : undefined;
  if (clean && !clean.ok) return clean;
  const exported = clean?.value.note ?? note;
  const pictures =
    folder && WITH_PICTURES.has(values.as ?? '')
      ? await keyImages(exported, note, folder.value, context)
      : undefined;
  if (pictures && !pictures.ok) return pictures;
  const lookup = folder && imageLookup(folder.value.stacks);
  const images = lookup && clean ? renamedLookup(lookup, clean.value.originalUid) : lookup;
  return success({
    note: exported,
    input: {
      ...(clean === undefined && { source }),
      ...(images && { images }),
      ...(pictures && { pictures: pictures.value }),
    },
  });
}

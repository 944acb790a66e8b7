import type { Note } from '../../core/note/index.js';
import { encodePng } from '../../core/raster/index.js';
import {
  deidentifyNote,
  type ExportForm,
  exportFileName,
  type ImageLookup,
  imageLookup,
  renamedLookup,
  toCsv,
  toHtml,
  toStructuredReport,
  toTsv,
  toWideCsv,
} from '../../core/report/index.js';
import { type Result, refuse, success } from '../../core/result.js';
import type { HostClient } from '../host/client.js';
import type { Store } from '../state/store.js';
import { drawKeyImage, type KeyImageSource } from './keyImages.js';
import { pageDigest } from './pageDigest.js';

/** What the reader chose in the export dialog. */
export interface ExportChoice {
  readonly form: ExportForm | 'csv-wide';
  readonly identity: 'with' | 'without';
  /** Key images, in the forms that can hold them. */
  readonly pictures: boolean;
  /** The patient ID in the file name; never without identity. */
  readonly named: boolean;
}

/** A file that is ready to be saved. */
export interface ExportFile {
  readonly name: string;
  readonly bytes: Uint8Array;
}

export interface ExportOptions {
  readonly store: Store;
  readonly source: KeyImageSource;
  readonly client: Pick<HostClient, 'writePdf'>;
  readonly now: () => string;
  readonly onProgress: (text: string) => void;
  readonly signal: AbortSignal;
}

/** Forms that can hold key images. */
export function holdsPictures(form: ExportChoice['form']): boolean {
  return form === 'html' || form === 'pdf';
}

/** Makes an export of the note. Its numbers are the note's own: nothing is measured anew. */
export async function makeExport(
  note: Note,
  choice: ExportChoice,
  options: ExportOptions,
): Promise<Result<ExportFile>> {
  const clean =
    choice.identity === 'without'
      ? await deidentifyNote(note, { salt: newSalt(), digest: pageDigest })
      : undefined;
  const exported = clean?.note ?? note;
  const pictures =
    choice.pictures && holdsPictures(choice.form)
      ? await drawPictures(exported, options)
      : new Map<string, string>();
  if (options.signal.aborted) return refuse('cancelled', 'Nothing was exported.');
  const lookup = lookupOf(options.store);
  const images = lookup && clean ? renamedLookup(lookup, clean.originalUid) : lookup;
  const content = await contentOf(exported, choice.form, { pictures, images, options });
  if (!content.ok) return content;
  const form = choice.form === 'csv-wide' ? 'csv' : choice.form;
  const name = exportFileName(exported, form);
  const patientId = exported.study.patientId?.replace(/[^A-Za-z0-9-]+/g, '-') ?? '';
  const isNamed = choice.named && choice.identity === 'with' && patientId !== '';
  return success({ name: isNamed ? `${patientId}-${name}` : name, bytes: content.value });
}

interface Parts {
  readonly pictures: ReadonlyMap<string, string>;
  readonly images: ImageLookup | undefined;
  readonly options: ExportOptions;
}

async function contentOf(
  note: Note,
  form: ExportChoice['form'],
  { pictures, images, options }: Parts,
): Promise<Result<Uint8Array>> {
  const text = (written: string): Result<Uint8Array> => success(new TextEncoder().encode(written));
  switch (form) {
    case 'csv':
      return text(toCsv(note));
    case 'csv-wide':
      return text(toWideCsv(note));
    case 'tsv':
      return text(toTsv(note));
    case 'html':
      return text(toHtml(note, pictures));
    case 'json':
      return text(`${JSON.stringify(note, null, 2)}\n`);
    case 'sr':
      return success(toStructuredReport(note, { now: options.now(), ...images }));
    case 'pdf':
      options.onProgress('Making the PDF');
      return options.client.writePdf(
        note,
        [...pictures].map(([regionId, png]) => ({ regionId, png })),
        options.signal,
      );
  }
}

async function drawPictures(
  note: Note,
  { store, source, onProgress, signal }: ExportOptions,
): Promise<ReadonlyMap<string, string>> {
  const pictures = new Map<string, string>();
  for (const [done, region] of note.regions.entries()) {
    if (signal.aborted) break;
    onProgress(`Drawing key images, ${done + 1} of ${note.regions.length}`);
    const raster = await drawKeyImage(store, source, note, region, signal);
    pictures.set(region.id, base64(encodePng(raster)));
  }
  return pictures;
}

function lookupOf(store: Store): ImageLookup | undefined {
  const { pair } = store.now();
  if (pair === undefined) return undefined;
  return imageLookup(pair.sharp === undefined ? [pair.soft] : [pair.soft, pair.sharp]);
}

/** A secret of this export alone, kept nowhere: new UIDs can't be traced back. */
function newSalt(): string {
  return [...crypto.getRandomValues(new Uint8Array(32))]
    .map((byte) => byte.toString(16).padStart(2, '0'))
    .join('');
}

function base64(bytes: Uint8Array): string {
  let text = '';
  for (let at = 0; at < bytes.length; at += 0x8000) {
    text += String.fromCharCode(...bytes.subarray(at, at + 0x8000));
  }
  return btoa(text);
}

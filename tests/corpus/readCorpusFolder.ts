import { mkdir, mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { nodeCodecs } from '../../app/host/codecs/nodeCodecs.js';
import { indexFolder } from '../../app/host/library/indexFolder.js';
import { decodeImage, type StoredValues } from '../../core/dicom/index.js';
import type { Finding, Refusal } from '../../core/result.js';
import type { FolderIndex } from '../../core/stack/index.js';
import type { RowCase } from './row.js';

/** What came of a folder: its index, and the stored values of the first slice of the first stack. */
export interface CorpusReading {
  readonly index: FolderIndex;
  readonly stored?: StoredValues;
  /** What only the pixels of the first slice tell. */
  readonly pixelFindings?: readonly Finding[];
  /** Why the first slice's pixels could not be decoded. */
  readonly refusal?: Refusal;
}

/** Lays a case's files in a folder of its own, indexes it as the host does and decodes the first slice. */
export async function readCorpusFolder(
  one: Pick<RowCase, 'build' | 'arrange'>,
): Promise<CorpusReading> {
  const folder = await mkdtemp(join(tmpdir(), 'diptych-corpus-'));
  try {
    for (const [name, bytes] of Object.entries(one.build())) {
      await mkdir(dirname(join(folder, name)), { recursive: true });
      await writeFile(join(folder, name), bytes);
    }
    await one.arrange?.(folder);
    const indexed = await indexFolder(folder, { threads: 0 });
    if (!indexed.ok) throw new Error(`corpus folder not read: ${indexed.refusal.text}`);
    const { stacks, leftOut, files, root } = indexed.value;
    const index = { stacks, leftOut, files };
    const slice = stacks[0]?.slices[0];
    if (slice === undefined) return { index };
    const bytes = new Uint8Array(await readFile(join(root, slice.file)));
    const decoded = await decodeImage(bytes, { frame: slice.image.frame, codecs: nodeCodecs });
    if (!decoded.ok) return { index, refusal: decoded.refusal };
    const known = new Set(slice.image.findings.map(({ text }) => text));
    const pixelFindings = decoded.value.image.findings.filter(({ text }) => !known.has(text));
    return { index, stored: decoded.value.stored, pixelFindings };
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}

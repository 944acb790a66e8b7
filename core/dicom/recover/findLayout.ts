import { type Result, refuse, success } from '../../result.js';
import { inflateRaw } from '../inflate.js';
import { isNative, TRANSFER_SYNTAX, transferSyntaxInWords } from '../uids.js';
import type { Layout } from './elementHead.js';
import type { Irregularities } from './irregularities.js';
import { probeLayout } from './probeLayout.js';
import { type FileMeta, readMeta } from './readMeta.js';

/** Where the data set of a file begins and how it is really laid out. */
export interface FoundLayout {
  /** The bytes that offsets point into: the file, or the file up to its data set and that inflated. */
  readonly bytes: Uint8Array;
  readonly start: number;
  readonly layout: Layout;
  readonly meta: FileMeta;
}

/** Implicit VR with big-endian pixels, a maker's own (1.2.840.113619.5.2): never guessed at. */
const PRIVATE_IMPLICIT_BIG_ENDIAN = '1.2.840.113619.5.2';

/**
 * Finds the data set: behind preamble and File Meta Information where they are, whatever their lengths say, and
 * in the encoding that its first elements show.
 */
export function findLayout(
  file: Uint8Array,
  hasPreamble: boolean,
  irregular: Irregularities,
): Result<FoundLayout> {
  const fileView = new DataView(file.buffer, file.byteOffset, file.length);
  const meta = readMeta(fileView, hasPreamble ? 132 : 0, irregular);
  const syntax = meta.transferSyntaxUid;
  if (!hasPreamble) irregular.note('no-preamble');
  if (syntax === undefined) irregular.note('no-transfer-syntax');
  if (syntax === PRIVATE_IMPLICIT_BIG_ENDIAN) return refuseSyntax(syntax);
  let bytes = file;
  if (syntax === TRANSFER_SYNTAX.deflated) {
    const inflated = inflateRaw(file.subarray(meta.end));
    if (!inflated.ok) return inflated;
    bytes = new Uint8Array(meta.end + inflated.value.length);
    bytes.set(file.subarray(0, meta.end));
    bytes.set(inflated.value, meta.end);
  }
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  const start = meta.end;
  const endsInMeta = start + 2 <= bytes.length && view.getUint16(start, true) === 2;
  if (endsInMeta || start + 8 > bytes.length) {
    return refuse('cut-header', `The file ends at byte ${bytes.length}, before its data set.`, {
      offset: start,
    });
  }
  const stated = syntax === undefined ? undefined : statedLayout(syntax);
  const shown = probeLayout(view, start, stated);
  if (shown === undefined && !hasPreamble) {
    return refuse('not-dicom', 'Not a DICOM file: it does not begin with a data element.');
  }
  if (shown === undefined && syntax === undefined) {
    return refuse(
      'no-transfer-syntax',
      'The file does not say how it is encoded, and its first elements do not show it.',
      { offset: start },
    );
  }
  if (shown === undefined && syntax !== undefined && !isNative(syntax) && !isListed(syntax)) {
    return refuseSyntax(syntax);
  }
  const layout = shown ?? stated ?? { explicitVr: true, littleEndian: true };
  const differs =
    stated !== undefined &&
    (stated.explicitVr !== layout.explicitVr || stated.littleEndian !== layout.littleEndian);
  if (differs) irregular.note('syntax-mismatch');
  return success({ bytes, start, layout, meta });
}

function isListed(syntax: string): boolean {
  return transferSyntaxInWords(syntax) !== syntax;
}

function refuseSyntax(syntax: string): Result<never> {
  return refuse(
    'unsupported-transfer-syntax',
    `An encoding that can't be read: ${transferSyntaxInWords(syntax)}.`,
    { tag: '(0002,0010)' },
  );
}

function statedLayout(syntax: string): Layout {
  return {
    explicitVr: syntax !== TRANSFER_SYNTAX.implicitLittleEndian,
    littleEndian: syntax !== TRANSFER_SYNTAX.explicitBigEndian,
  };
}

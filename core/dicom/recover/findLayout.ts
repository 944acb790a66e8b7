import { type Finding, type Result, refuse, success } from '../../result.js';
import { inflateRaw } from '../inflate.js';
import { TRANSFER_SYNTAX } from '../uids.js';
import { type Layout, readHead, UNDEFINED_LENGTH } from './elementHead.js';
import { isKnownVr } from './vr.js';

/** Where the data set of a file begins and how it is really laid out. */
export interface FoundLayout {
  /** The bytes that the offsets below point into: the file, or its inflated form. */
  readonly bytes: Uint8Array;
  readonly start: number;
  readonly layout: Layout;
  /** As the file says; undefined when it does not. */
  readonly statedSyntax?: string;
  readonly findings: readonly Finding[];
}

const FINDINGS = {
  noPreamble: {
    code: 'no-preamble',
    text: 'The file lacks the DICOM preamble; it was read as a bare data set.',
  },
  noSyntax: {
    code: 'no-transfer-syntax',
    text: 'The file does not say how it is encoded; its first element told.',
  },
  otherSyntax: {
    code: 'syntax-mismatch',
    text: 'The file is encoded otherwise than it says; its first element told.',
  },
} as const;

/**
 * Finds the data set: behind preamble and File Meta Information where they are, whatever their lengths say, and
 * in the encoding that its first element shows.
 */
export function findLayout(file: Uint8Array, hasPreamble: boolean): Result<FoundLayout> {
  const view = new DataView(file.buffer, file.byteOffset, file.length);
  const meta = readMeta(view, hasPreamble ? 132 : 0);
  const findings: Finding[] = hasPreamble ? [] : [FINDINGS.noPreamble];
  if (meta.syntax === undefined) findings.push(FINDINGS.noSyntax);
  let bytes = file;
  if (meta.syntax === TRANSFER_SYNTAX.deflated) {
    const inflated = inflateRaw(file.subarray(meta.end));
    if (!inflated.ok) return inflated;
    bytes = inflated.value;
  }
  const start = bytes === file ? meta.end : 0;
  const endsInMeta =
    bytes === file && start + 2 <= bytes.length && view.getUint16(start, true) === 2;
  if (endsInMeta || start + 8 > bytes.length) {
    return refuse('cut-header', `The file ends at byte ${bytes.length}, before its data set.`, {
      offset: start,
    });
  }
  const layout = probe(bytes, start);
  if (layout === undefined) {
    return refuse('not-dicom', 'Not a DICOM file: it does not begin with a data element.');
  }
  const stated = meta.syntax === undefined ? undefined : statedLayout(meta.syntax);
  const differs =
    stated !== undefined &&
    (stated.explicitVr !== layout.explicitVr || stated.littleEndian !== layout.littleEndian);
  if (differs) findings.push(FINDINGS.otherSyntax);
  return success({
    bytes,
    start,
    layout,
    ...(meta.syntax !== undefined && { statedSyntax: meta.syntax }),
    findings,
  });
}

function statedLayout(syntax: string): Layout {
  return {
    explicitVr: syntax !== TRANSFER_SYNTAX.implicitLittleEndian,
    littleEndian: syntax !== TRANSFER_SYNTAX.explicitBigEndian,
  };
}

/** Reads on while the group is 0002, whatever its group length says, in explicit or implicit VR. */
function readMeta(view: DataView, start: number): { end: number; syntax?: string } {
  let at = start;
  let syntax: string | undefined;
  while (at + 8 <= view.byteLength && view.getUint16(at, true) === 0x0002) {
    const letters = String.fromCharCode(view.getUint8(at + 4), view.getUint8(at + 5));
    const head = readHead(view, at, { explicitVr: isKnownVr(letters), littleEndian: true });
    if (head === undefined || head.length === UNDEFINED_LENGTH) break;
    const end = head.valueAt + head.length;
    if (end > view.byteLength) break;
    if (head.tag === 0x00020010) syntax = asciiOf(view, head.valueAt, head.length);
    at = end;
  }
  return { end: at, ...(syntax !== undefined && { syntax }) };
}

function asciiOf(view: DataView, at: number, length: number): string {
  let text = '';
  for (let i = 0; i < length; i++) text += String.fromCharCode(view.getUint8(at + i));
  return text.replace(/[\0 ]+$/, '').trim();
}

/** A data set begins in group 0008 (or 0002 to 0010 in odd files); byte order and VR show in its first element. */
function probe(bytes: Uint8Array, start: number): Layout | undefined {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  const isFirstGroup = (group: number): boolean => group >= 0x0004 && group <= 0x0010;
  const letters = String.fromCharCode(view.getUint8(start + 4), view.getUint8(start + 5));
  const explicitVr = isKnownVr(letters);
  if (isFirstGroup(view.getUint16(start, true))) {
    return explicitVr || plausibleLength(view, start)
      ? { explicitVr, littleEndian: true }
      : undefined;
  }
  if (isFirstGroup(view.getUint16(start, false)) && explicitVr) {
    return { explicitVr: true, littleEndian: false };
  }
  return undefined;
}

function plausibleLength(view: DataView, at: number): boolean {
  return view.getUint32(at + 4, true) <= view.byteLength - at - 8;
}

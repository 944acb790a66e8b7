import { type Result, refuse, success } from '../result.js';
import type { DataSet } from './dataSet.js';
import { parseDataSet } from './parseDataSet.js';
import { type RecoveredDataSet, recoverDataSet } from './recover/recoverDataSet.js';
import { DICOMDIR, isNative, TRANSFER_SYNTAX } from './uids.js';
import { walkDataSet } from './walkDataSet.js';

/** True when the bytes begin like a DICOM file: 128 free bytes and 'DICM' (PS3.10 7.1). */
export function hasPreamble(bytes: Uint8Array): boolean {
  return bytes[128] === 0x44 && bytes[129] === 0x49 && bytes[130] === 0x43 && bytes[131] === 0x4d;
}

export const NOT_DICOM = refuse('not-dicom', 'Not a DICOM file: “DICM” is not at byte 128.');

const IS_DICOMDIR = refuse(
  'dicomdir',
  'A DICOMDIR, an index of a folder: the files themselves are read instead.',
);

/** True when more bytes of the file can't change that it is refused. */
export function isFinalRefusal(code: string): boolean {
  return (
    code === NOT_DICOM.refusal.code ||
    code === IS_DICOMDIR.refusal.code ||
    code === 'nested-too-deep' ||
    code === 'unsupported-transfer-syntax'
  );
}

/**
 * Opens the data set of a file, or of its beginning: in one walk where it follows the standard to the letter, else with
 * the ordinary parser, and where that fails or the file breaks the rules with the one that forgives what can be
 * forgiven. What was forgiven is among the findings.
 */
export function openDataSet(bytes: Uint8Array): Result<DataSet> {
  const regular = hasPreamble(bytes);
  // Its records may be broken, and point at files that are not there: none of it is looked at.
  if (regular && statesDicomdir(bytes)) return IS_DICOMDIR;
  const walked = regular ? walkDataSet(bytes) : undefined;
  if (walked !== undefined) return success(walked);
  const parsed = regular ? parseDataSet(bytes) : NOT_DICOM;
  if (parsed.ok && parsed.value.transferSyntaxUid !== undefined) return parsed;
  const recovered = recoverDataSet(bytes, regular);
  if (recovered.ok) {
    const reachesImage = regular || recovered.value.find('x00280010') !== undefined;
    return reachesImage ? withShownSyntax(recovered.value) : NO_IMAGE_TAGS;
  }
  if (!parsed.ok && parsed.refusal.code === 'cut-header') {
    return recovered.refusal.code === 'cut-header' ? parsed : recovered;
  }
  return recovered;
}

/** Bare data sets alone: they begin like one, but do not show an image. More of the file may. */
const NO_IMAGE_TAGS = refuse('no-image-tags', 'No image: the data set has no Rows.');

/** Media Storage SOP Class UID (0002,0002) among the first elements of the meta information. */
function statesDicomdir(bytes: Uint8Array): boolean {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  let at = 132;
  while (at + 12 <= bytes.length && view.getUint16(at, true) === 2) {
    const element = view.getUint16(at + 2, true);
    const isLong = view.getUint8(at + 4) === 0x4f && view.getUint8(at + 5) === 0x42;
    const valueAt = at + (isLong ? 12 : 8);
    const length = isLong ? view.getUint32(at + 8, true) : view.getUint16(at + 6, true);
    if (element === 2) return startsWith(bytes, valueAt, length, DICOMDIR);
    if (element > 2) return false;
    at = valueAt + length;
  }
  return false;
}

function startsWith(bytes: Uint8Array, at: number, length: number, text: string): boolean {
  if (length < text.length || length > text.length + 1) return false;
  for (let i = 0; i < text.length; i++) if (bytes[at + i] !== text.charCodeAt(i)) return false;
  return true;
}

/** The transfer syntax is the stated one where the bytes agree with it, else the one that they show. */
function withShownSyntax({ layout, ...dataSet }: RecoveredDataSet): Result<DataSet> {
  const { transferSyntaxUid: stated, pixelData } = dataSet;
  if (pixelData?.inFragments === true && (stated === undefined || isNative(stated))) {
    return refuse(
      'no-transfer-syntax',
      'The pixels are compressed and the file does not say how: they can’t be read.',
      { tag: '(0002,0010)' },
    );
  }
  const shown = !layout.explicitVr
    ? TRANSFER_SYNTAX.implicitLittleEndian
    : layout.littleEndian
      ? TRANSFER_SYNTAX.explicitLittleEndian
      : TRANSFER_SYNTAX.explicitBigEndian;
  const agrees = stated === shown || stated === TRANSFER_SYNTAX.deflated;
  const keepsStated = stated !== undefined && (agrees || !isNative(stated));
  return success({ ...dataSet, transferSyntaxUid: keepsStated ? stated : shown });
}

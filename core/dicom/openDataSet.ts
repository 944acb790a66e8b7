import { type Result, refuse, success } from '../result.js';
import type { DataSet } from './dataSet.js';
import { parseDataSet } from './parseDataSet.js';
import { type RecoveredDataSet, recoverDataSet } from './recover/recoverDataSet.js';
import { isNative, TRANSFER_SYNTAX } from './uids.js';

/** True when the bytes begin like a DICOM file: 128 free bytes and 'DICM' (PS3.10 7.1). */
export function hasPreamble(bytes: Uint8Array): boolean {
  return bytes[128] === 0x44 && bytes[129] === 0x49 && bytes[130] === 0x43 && bytes[131] === 0x4d;
}

export const NOT_DICOM = refuse('not-dicom', 'Not a DICOM file: “DICM” is not at byte 128.');

/**
 * Opens the data set of a file, or of its beginning: with the ordinary parser, and where that fails with the one
 * that forgives what can be forgiven. What was forgiven is among the findings.
 */
export function openDataSet(bytes: Uint8Array): Result<DataSet> {
  const regular = hasPreamble(bytes);
  const parsed = regular ? parseDataSet(bytes) : NOT_DICOM;
  if (parsed.ok && parsed.value.transferSyntaxUid !== undefined) return parsed;
  const recovered = recoverDataSet(bytes, regular);
  if (recovered.ok) {
    const reachesImage = regular || recovered.value.elements.some(({ tag }) => tag === 0x00280010);
    return reachesImage ? checkSyntax(recovered.value) : NOT_DICOM;
  }
  // Without a preamble only the first element tells; when the bytes end too early, more of them may show it.
  if (!regular) return recovered.refusal.code === 'cut-header' ? recovered : NOT_DICOM;
  return recovered.refusal.code === 'cut-header' && !parsed.ok ? parsed : recovered;
}

/** The transfer syntax is the stated one where the bytes agree with it, else the one that they show. */
function checkSyntax(recovered: RecoveredDataSet): Result<DataSet> {
  const { layout, statedSyntax, pixelData } = recovered;
  const shown = !layout.explicitVr
    ? TRANSFER_SYNTAX.implicitLittleEndian
    : layout.littleEndian
      ? TRANSFER_SYNTAX.explicitLittleEndian
      : TRANSFER_SYNTAX.explicitBigEndian;
  const inFragments = pixelData?.length === 0xffffffff;
  if (inFragments && (statedSyntax === undefined || isNative(statedSyntax))) {
    return refuse(
      'no-transfer-syntax',
      'The pixels are compressed and the file does not say how: they can’t be read.',
    );
  }
  const keepsStated = statedSyntax !== undefined && !isNative(statedSyntax);
  return success(fromRecovered(recovered, keepsStated ? statedSyntax : shown));
}

function fromRecovered(recovered: RecoveredDataSet, transferSyntaxUid: string): DataSet {
  const { bytes, layout, elements, pixelData, findings } = recovered;
  const places = new Map(
    elements.map(({ tag, valueAt, length }) => [
      `x${tag.toString(16).padStart(8, '0')}`,
      { offset: valueAt, length },
    ]),
  );
  return {
    bytes,
    littleEndian: layout.littleEndian,
    transferSyntaxUid,
    find: (tag) => places.get(tag),
    // Sequences are stepped over by the forgiving reader.
    items: () => undefined,
    ...(pixelData && {
      pixelData: {
        offset: pixelData.valueAt,
        length: pixelData.length,
        inFragments: pixelData.length === 0xffffffff,
      },
    }),
    findings,
  };
}

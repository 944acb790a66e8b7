import { type Finding, type Result, refuse, success } from '../result.js';
import { type Attributes, attributesOf } from './attributes.js';
import type { CtImage } from './ctImage.js';
import type { DataSet } from './dataSet.js';
import { readAcquisition, readIdentity } from './readAcquisition.js';
import { readGeometry } from './readGeometry.js';
import { readPixels } from './readPixels.js';
import { readWindows } from './readWindows.js';
import { isNative, SOP_CLASS, sopClassInWords, transferSyntaxInWords } from './uids.js';

/** Texts in which a file may say that it is synthetic: study, series, derivation, image comments. */
const TELLING_TAGS = ['x00081030', 'x0008103e', 'x00082111', 'x00204000'] as const;

/** A CT slice from its data set, or why the file is no slice that the bench can use. Pixels are not touched. */
export function readImage(dataSet: DataSet): Result<CtImage> {
  const attributes = attributesOf(dataSet);
  const kind = checkKind(attributes, dataSet.transferSyntaxUid);
  if (!kind.ok) return kind;
  const geometry = readGeometry(attributes);
  if (!geometry.ok) return geometry;
  const pixels = readPixels(attributes);
  if (!pixels.ok) return pixels;
  const { grid } = geometry.value;
  const place = checkPixelData(dataSet, grid.rows * grid.columns * 2);
  if (!place.ok) return place;

  const studyInstanceUid = attributes.text('x0020000d');
  const seriesInstanceUid = attributes.text('x0020000e');
  const sopInstanceUid = attributes.text('x00080018');
  if (!studyInstanceUid || !seriesInstanceUid || !sopInstanceUid) {
    return refuse(
      'no-uid',
      'The study, series or instance UID is missing: the slice has no place.',
    );
  }
  const windows = readWindows(attributes);
  const acquisition = readAcquisition(attributes, seriesInstanceUid);
  const instanceNumber = attributes.integer('x00200013');
  const lossy: Finding[] = acquisition.lossy
    ? [
        {
          code: 'lossy',
          text: 'The image was compressed with loss: noise and edges are not the scanner’s.',
        },
      ]
    : [];
  return success({
    sopClassUid: SOP_CLASS.ctImage,
    sopInstanceUid,
    transferSyntaxUid: kind.value.transferSyntaxUid,
    ...(instanceNumber !== undefined && { instanceNumber }),
    imageType: attributes.texts('x00080008') ?? [],
    synthetic: TELLING_TAGS.some((tag) => /\bsynthetic\b/i.test(attributes.text(tag) ?? '')),
    identity: readIdentity(attributes, studyInstanceUid),
    acquisition,
    grid,
    pixels: pixels.value.pixels,
    windows: windows.windows,
    findings: [
      ...dataSet.findings,
      ...geometry.value.findings,
      ...pixels.value.findings,
      ...windows.findings,
      ...lossy,
    ],
  });
}

function checkKind(
  attributes: Attributes,
  transferSyntaxUid: string | undefined,
): Result<{ transferSyntaxUid: string }> {
  const sopClassUid = attributes.text('x00080016') ?? attributes.text('x00020002');
  if (sopClassUid === undefined) return refuse('not-an-image', 'Not an image: no SOP Class.');
  if (sopClassUid === SOP_CLASS.enhancedCtImage) {
    return refuse(
      'enhanced-ct',
      'An enhanced multi-frame CT image: this version does not read it yet.',
    );
  }
  if (sopClassUid !== SOP_CLASS.ctImage) {
    return refuse('not-a-ct-image', `Not a CT image: ${sopClassInWords(sopClassUid)}.`);
  }
  if (attributes.texts('x00080008')?.[2] === 'LOCALIZER') {
    return refuse('localizer', 'A localizer, not a slice.');
  }
  if (transferSyntaxUid === undefined) {
    return refuse(
      'no-transfer-syntax',
      'The file does not say how it is encoded: no Transfer Syntax UID.',
    );
  }
  if (!isNative(transferSyntaxUid)) {
    return refuse(
      'unsupported-transfer-syntax',
      `Compressed pixels that this version does not read: ${transferSyntaxInWords(transferSyntaxUid)}.`,
    );
  }
  return success({ transferSyntaxUid });
}

/** Pixel Data must be there and long enough; whether the file holds all of it, {@link pixelDataPlace} tells. */
function checkPixelData({ pixelData }: DataSet, bytesNeeded: number): Result<undefined> {
  if (pixelData === undefined) return refuse('no-image', 'No image: the file has no Pixel Data.');
  const where = { tag: '(7FE0,0010)', offset: pixelData.offset };
  if (pixelData.inFragments) {
    return refuse(
      'bad-pixel-data',
      'Pixel Data is in fragments although the file says that it is not compressed.',
      where,
    );
  }
  if (pixelData.length < bytesNeeded) {
    return refuse(
      'short-pixel-data',
      `Pixel Data has ${pixelData.length} bytes; ${bytesNeeded} are needed.`,
      where,
    );
  }
  return success(undefined);
}

/** Where the pixels that an image needs begin and end in its bytes. */
export function pixelDataPlace(
  { pixelData }: DataSet,
  image: CtImage,
): { start: number; end: number } {
  const start = pixelData?.offset ?? 0;
  return { start, end: start + image.grid.rows * image.grid.columns * 2 };
}

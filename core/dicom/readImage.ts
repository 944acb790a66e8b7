import { type Finding, type Result, refuse, success } from '../result.js';
import { type Attributes, attributesOf } from './attributes.js';
import { characterSetOf } from './characterSet.js';
import { type CheckedPixels, checkPixelData } from './checkPixelData.js';
import { correctEncoding } from './correctEncoding.js';
import type { CtImage } from './ctImage.js';
import type { DataSet } from './dataSet.js';
import { frameRemarks } from './frameRemarks.js';
import { readAcquisition, readIdentity } from './readAcquisition.js';
import { readFrameList } from './readFrameList.js';
import { type GeometryReading, readGeometry } from './readGeometry.js';
import { type ImageKind, readKind } from './readKind.js';
import { type PixelsReading, readPixels } from './readPixels.js';
import { readWindows } from './readWindows.js';

/** Texts in which a file may say that it is synthetic: study, series, derivation, image comments. */
const TELLING_TAGS = ['x00081030', 'x0008103e', 'x00082111', 'x00204000'] as const;

/** What a file holds: one slice, or the frames of a multi-frame image, and how their pixels are encoded. */
export interface ImageFile {
  readonly images: readonly [CtImage, ...CtImage[]];
  readonly inFragments: boolean;
  /** Frames that the file states, those left out among them. */
  readonly frameCount: number;
  /** Frames that are no slices, and why. */
  readonly leftOut: readonly Finding[];
}

/** How a file is to be read, where the reader decided against what it says. */
export interface ReadOptions {
  /** Values of Specific Character Set to read all texts in; see {@link CHARACTER_SET_CHOICES}. */
  readonly characterSet?: string | undefined;
}

/** The CT slices of a data set, or why the file has none that the bench can use. Pixels are not touched. */
export function readImages(
  dataSet: DataSet,
  { characterSet }: ReadOptions = {},
): Result<ImageFile> {
  const chosen = characterSet === undefined ? undefined : characterSetOf(characterSet);
  const attributes = attributesOf(dataSet, { chosen });
  const choice =
    characterSet === undefined ? [] : [chosenSet(characterSet, attributes.text('x00080005'))];
  const kind = readKind(attributes, dataSet);
  if (!kind.ok) return kind;
  const frames = readFrameList(dataSet, attributes, kind.value);
  if (!frames.ok) return frames;
  const { number } = frames.value;
  const remarks = frameRemarks();
  let checked: CheckedPixels | undefined;
  const images: CtImage[] = [];
  for (let index = 0; index < number; index++) {
    const frame = frames.value.attributes[index];
    if (frame === undefined) {
      remarks.add(index, {
        code: 'frame-missing',
        text: 'The file has no functional groups for it.',
      });
      continue;
    }
    const slice = readSlice(frame);
    if (!slice.ok) {
      if (!kind.value.enhanced) return slice;
      remarks.add(index, slice.refusal);
      continue;
    }
    if (checked === undefined) {
      const { rows, columns } = slice.value.geometry.grid;
      const { transferSyntaxUid } = kind.value;
      const pixels = checkPixelData(dataSet, transferSyntaxUid, rows * columns * 2, number);
      if (!pixels.ok) return pixels;
      checked = pixels.value;
    }
    if (index >= checked.framesPresent) {
      remarks.add(index, { code: 'frame-missing', text: 'Pixel Data ends before it.' });
      continue;
    }
    const shared = [...dataSet.findings, ...frames.value.findings, ...choice];
    const image = imageOf(frame, slice.value, kind.value, checked, shared);
    images.push(kind.value.enhanced ? { ...image, frame: index } : image);
  }
  const [first, ...rest] = images;
  if (first === undefined || checked === undefined) {
    return remarks.refusal() ?? refuse('no-image', 'No image: the file has no frames.');
  }
  return success({
    images: [first, ...rest],
    inFragments: checked.inFragments,
    frameCount: number,
    leftOut: remarks.findings(),
  });
}

interface Slice {
  readonly geometry: GeometryReading;
  readonly encoding: PixelsReading;
}

function readSlice(attributes: Attributes): Result<Slice> {
  if (isLocalizer(attributes)) return refuse('localizer', 'A localizer, not a slice.');
  const geometry = readGeometry(attributes);
  if (!geometry.ok) return geometry;
  const encoding = readPixels(attributes);
  if (!encoding.ok) return encoding;
  return success({ geometry: geometry.value, encoding: encoding.value });
}

function imageOf(
  attributes: Attributes,
  { geometry, encoding }: Slice,
  { sopClassUid }: ImageKind,
  checked: CheckedPixels,
  shared: readonly Finding[],
): CtImage {
  const { codeStream } = checked;
  const corrected = codeStream && correctEncoding(encoding.pixels, codeStream);
  const pixels = corrected?.pixels ?? encoding.pixels;
  const uids = readUids(attributes);
  const windows = readWindows(attributes, pixels);
  const stated = readAcquisition(attributes, uids.series);
  const lossy = stated.lossy || checked.lossy;
  const instanceNumber = attributes.integer('x00200013');
  return {
    sopClassUid,
    sopInstanceUid: uids.instance,
    transferSyntaxUid: checked.transferSyntaxUid,
    ...(instanceNumber !== undefined && { instanceNumber }),
    imageType: attributes.texts('x00089007') ?? attributes.texts('x00080008') ?? [],
    synthetic: TELLING_TAGS.some((tag) => /\bsynthetic\b/i.test(attributes.text(tag) ?? '')),
    identity: readIdentity(attributes, uids.study),
    acquisition: { ...stated, lossy },
    grid: geometry.grid,
    pixels,
    windows: windows.windows,
    findings: [
      ...shared,
      ...geometry.findings,
      ...encoding.findings,
      ...checked.findings,
      ...(corrected ? [corrected.finding] : []),
      ...windows.findings,
      ...(lossy ? [LOSSY] : []),
      ...attributes.findings(),
    ],
  };
}

function chosenSet(chosen: string, stated: string | undefined): Finding {
  const says = stated === undefined ? 'none' : `“${stated}”`;
  return {
    code: 'character-set-chosen',
    text: `Texts were read in the character set “${chosen}”, as the reader chose; the file states ${says}.`,
  };
}

const LOSSY: Finding = {
  code: 'lossy',
  text: 'The image was compressed with loss: noise and edges are not the scanner’s.',
};

/** Value 3 of the image's or the frame's type (PS3.3 C.8.2.1.1.1, C.8.15.3.1.1). */
function isLocalizer(attributes: Attributes): boolean {
  const type = attributes.texts('x00089007') ?? attributes.texts('x00080008');
  return type?.[2] === 'LOCALIZER';
}

/** Empty where the file has none: stacks give it one, with a finding (AWKWARD row 88). */
function readUids(attributes: Attributes): { study: string; series: string; instance: string } {
  return {
    study: attributes.text('x0020000d') ?? '',
    series: attributes.text('x0020000e') ?? '',
    instance: attributes.text('x00080018') ?? '',
  };
}

import { type Finding, type Result, refuse, success } from '../result.js';
import { type Attributes, attributesOf } from './attributes.js';
import { checkPixelData } from './checkPixelData.js';
import type { CtImage } from './ctImage.js';
import type { DataSet } from './dataSet.js';
import { frameAttributes } from './functionalGroups.js';
import { readAcquisition, readIdentity } from './readAcquisition.js';
import { readGeometry } from './readGeometry.js';
import { type ImageKind, readKind } from './readKind.js';
import { readPixels } from './readPixels.js';
import { readWindows } from './readWindows.js';

/** Texts in which a file may say that it is synthetic: study, series, derivation, image comments. */
const TELLING_TAGS = ['x00081030', 'x0008103e', 'x00082111', 'x00204000'] as const;

/** What a file holds: one slice, or the frames of a multi-frame image, and how their pixels are encoded. */
export interface ImageFile {
  readonly images: readonly [CtImage, ...CtImage[]];
  readonly inFragments: boolean;
}

/** The CT slices of a data set, or why the file has none that the bench can use. Pixels are not touched. */
export function readImages(dataSet: DataSet): Result<ImageFile> {
  const attributes = attributesOf(dataSet);
  const kind = readKind(attributes, dataSet);
  if (!kind.ok) return kind;
  const frames = readFrameList(dataSet, attributes, kind.value);
  if (!frames.ok) return frames;
  const images: CtImage[] = [];
  let inFragments = false;
  for (const [index, frame] of frames.value.attributes.entries()) {
    const image = readOne(dataSet, frame, kind.value, frames.value);
    if (!image.ok) return image;
    inFragments = image.value.inFragments;
    images.push(kind.value.enhanced ? { ...image.value.image, frame: index } : image.value.image);
  }
  const [first, ...rest] = images;
  if (first === undefined) return refuse('no-image', 'No image: the file has no frames.');
  return success({ images: [first, ...rest], inFragments });
}

interface FrameList {
  readonly attributes: readonly Attributes[];
  readonly findings: readonly Finding[];
}

/** One set of attributes a frame. Number of Frames is 1 when it is empty or zero. */
function readFrameList(
  dataSet: DataSet,
  attributes: Attributes,
  { enhanced }: ImageKind,
): Result<FrameList> {
  const stated = attributes.integer('x00280008');
  const number = stated === undefined || stated < 1 ? 1 : stated;
  if (!enhanced) {
    if (number > 1) {
      return refuse(
        'frames-without-geometry',
        `${number} frames in a single-frame CT image: there is no position for each of them.`,
        { tag: '(0028,0008)' },
      );
    }
    return success({ attributes: [attributes], findings: [] });
  }
  const frames = frameAttributes(dataSet);
  if (frames === undefined || frames.length === 0) {
    return refuse('no-geometry', 'No geometry: the functional groups of the frames are missing.', {
      tag: '(5200,9230)',
    });
  }
  if (frames.length < number) {
    return refuse(
      'frame-missing',
      `${number} frames are stated, but only ${frames.length} have functional groups.`,
      { tag: '(5200,9230)' },
    );
  }
  const more: Finding[] =
    stated !== number
      ? [{ code: 'frames-not-stated', text: 'Number of Frames is empty or zero; 1 was read.' }]
      : [];
  return success({ attributes: frames.slice(0, number), findings: more });
}

function readOne(
  dataSet: DataSet,
  attributes: Attributes,
  kind: ImageKind,
  frames: FrameList,
): Result<{ image: CtImage; inFragments: boolean }> {
  if (isLocalizer(attributes)) return refuse('localizer', 'A localizer, not a slice.');
  const geometry = readGeometry(attributes);
  if (!geometry.ok) return geometry;
  const encoding = readPixels(attributes);
  if (!encoding.ok) return encoding;
  const { grid } = geometry.value;
  const checked = checkPixelData(
    dataSet,
    kind.transferSyntaxUid,
    encoding.value.pixels,
    grid.rows * grid.columns * 2 * frames.attributes.length,
  );
  if (!checked.ok) return checked;
  const uids = readUids(attributes);
  if (!uids.ok) return uids;
  const windows = readWindows(attributes);
  const stated = readAcquisition(attributes, uids.value.series);
  const lossy = stated.lossy || checked.value.lossy;
  const instanceNumber = attributes.integer('x00200013');
  const image: CtImage = {
    sopClassUid: kind.sopClassUid,
    sopInstanceUid: uids.value.instance,
    transferSyntaxUid: kind.transferSyntaxUid,
    ...(instanceNumber !== undefined && { instanceNumber }),
    imageType: attributes.texts('x00089007') ?? attributes.texts('x00080008') ?? [],
    synthetic: TELLING_TAGS.some((tag) => /\bsynthetic\b/i.test(attributes.text(tag) ?? '')),
    identity: readIdentity(attributes, uids.value.study),
    acquisition: { ...stated, lossy },
    grid,
    pixels: checked.value.pixels,
    windows: windows.windows,
    findings: [
      ...dataSet.findings,
      ...frames.findings,
      ...geometry.value.findings,
      ...encoding.value.findings,
      ...checked.value.findings,
      ...windows.findings,
      ...(lossy ? [LOSSY] : []),
    ],
  };
  return success({ image, inFragments: checked.value.inFragments });
}

const LOSSY: Finding = {
  code: 'lossy',
  text: 'The image was compressed with loss: noise and edges are not the scanner’s.',
};

function isLocalizer(attributes: Attributes): boolean {
  const type = attributes.texts('x00089007') ?? attributes.texts('x00080008');
  return type?.[2] === 'LOCALIZER';
}

function readUids(
  attributes: Attributes,
): Result<{ study: string; series: string; instance: string }> {
  const study = attributes.text('x0020000d');
  const series = attributes.text('x0020000e');
  const instance = attributes.text('x00080018');
  if (!study || !series || !instance) {
    return refuse(
      'no-uid',
      'The study, series or instance UID is missing: the slice has no place.',
    );
  }
  return success({ study, series, instance });
}

import { frameKey } from '../../note/life/index.js';
import type { Note } from '../../note/schema.js';
import type { Shape } from '../../region/index.js';
import { resamplingOf } from '../placeText.js';
import { imagesOf, type KernelValues, type TableRow, type ValuesImage } from '../tableRow.js';
import { dcm } from './code.js';
import { type ContentItem, imageItem, textItem } from './contentItem.js';
import { imageReference, type ReportContext } from './context.js';
import { graphicOf, imageRegionItem } from './imageRegion.js';
import { OWN } from './ownCodes.js';

/** Images of a group: a contour selected from its image, or images alone, with the reason why there is no more. */
export interface GroupPlace {
  readonly template: '1410' | '1501';
  readonly items: readonly ContentItem[];
}

/** Where the values of a row lie: on images, as the contour of a region where it has one, or on an oblique plane. */
export function groupPlace(
  context: ReportContext,
  row: TableRow,
  values: KernelValues,
): GroupPlace {
  const { note } = context;
  const resampled = resampledItems(note, row, values);
  const shape =
    row.item === 'region' ? note.regions.find(({ id }) => id === row.id)?.shape : undefined;
  const [image] = imagesOf(values);
  if (shape !== undefined && image !== undefined) return regionPlace(context, shape, values, image);
  return {
    template: '1501',
    items: [
      ...resampled,
      ...imagesOf(values).flatMap((one) => [
        sourceItem(context, one),
        ...sliceItems(one, values.sliceOffsetMm),
      ]),
    ],
  };
}

function regionPlace(
  context: ReportContext,
  shape: Shape,
  { sliceOffsetMm }: KernelValues,
  image: ValuesImage,
): GroupPlace {
  const { sopInstanceUid, frameNumber } = image;
  const reference = imageReference(context, sopInstanceUid, frameNumber);
  const slice = sliceItems(image, sliceOffsetMm);
  const graphic = graphicOf(shape, (pointMm) =>
    context.pixelOf?.(sopInstanceUid, frameNumber, pointMm),
  );
  if (graphic !== undefined) {
    return { template: '1410', items: [imageRegionItem(graphic, reference), ...slice] };
  }
  return {
    template: '1501',
    items: [
      sourceItem(context, image),
      ...slice,
      textItem(
        'CONTAINS',
        OWN.noContour,
        `The image ${frameKey(reference)} was not at hand when this document was made: its contour in pixels could not be given.`,
      ),
    ],
  };
}

function sourceItem(
  context: ReportContext,
  { sopInstanceUid, frameNumber }: ValuesImage,
): ContentItem {
  return imageItem(
    'CONTAINS',
    dcm('121112', 'Source of Measurement'),
    imageReference(context, sopInstanceUid, frameNumber),
  );
}

function sliceItems(
  { kernel, sliceIndex, slices }: ValuesImage,
  sliceOffsetMm: number | null,
): readonly ContentItem[] {
  if (sliceIndex === null) return [];
  const place = `Slice ${sliceIndex + 1} of ${slices}, counted from 1`;
  const distance =
    sliceOffsetMm === null
      ? `${kernel} kernel`
      : `${sliceOffsetMm.toFixed(2)} mm from the plane of the measurement`;
  return [textItem('CONTAINS', OWN.slice, `${place}; ${distance}.`)];
}

/** Of what is measured on an oblique plane: that it is resampled, how, and from which series. It has no image of its own. */
function resampledItems(
  note: Note,
  row: TableRow,
  { kernel, seriesInstanceUid }: KernelValues,
): readonly ContentItem[] {
  const { regions, edges, profiles, stents, planes } = note;
  const lists = {
    region: regions,
    contrast: [],
    'edge line': edges,
    profile: profiles,
    'fitted stent': stents,
  };
  const item = lists[row.item].find(({ id }) => id === row.id);
  if (item?.plane === undefined) return [];
  const cut = planes.find(({ id }) => id === item.plane);
  const how =
    cut === undefined ? '' : `, ${cut.label} (${cut.id}), resampled by ${resamplingOf(cut)}`;
  const series = kernel === 'both' ? 'both series' : `the ${kernel} series`;
  return [
    textItem(
      'CONTAINS',
      OWN.resampled,
      `Measured on an oblique plane${how} from ${series} ${seriesInstanceUid}: no image of the study shows it.`,
    ),
  ];
}

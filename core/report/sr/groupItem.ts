import { frameKey } from '../../note/life/index.js';
import type { NoteFinding } from '../../note/schema.js';
import type { Shape } from '../../region/index.js';
import { stableUid } from '../../stableUid.js';
import type { KernelValues, TableRow } from '../measurementTable.js';
import { dcm, sct } from './code.js';
import {
  type ContentItem,
  codeItem,
  containerItem,
  imageItem,
  textIfAny,
  textItem,
  uidItem,
} from './contentItem.js';
import { imageReference, type ReportContext } from './context.js';
import { graphicOf, imageRegionItem } from './imageRegion.js';
import { OWN } from './ownCodes.js';
import { ASSESSABILITY_CODES, KERNEL_CODES, KIND_CODES, ROLE_CODES } from './readingCodes.js';
import { siteCodes } from './siteCodes.js';
import { valuesItems } from './valuesItems.js';

/** Images of a group: a contour selected from its image, or the image alone with the reason why there is none. */
interface Place {
  readonly template: '1410' | '1501';
  readonly items: readonly ContentItem[];
}

/**
 * A measurement group (125007 DCM) of one row of the table on one kernel. With a contour it follows TID 1410 (planar
 * region), without one TID 1501. Soft and sharp have groups of their own, told apart by their tracking identifiers.
 */
export function groupItem(
  context: ReportContext,
  row: TableRow,
  values: KernelValues,
): ContentItem {
  const { note } = context;
  const region = note.regions.find(({ id }) => row.item === 'region' && id === row.id);
  const contrast = note.contrasts.find(({ id }) => row.item === 'contrast' && id === row.id);
  const findingId =
    region?.findingId ?? note.regions.find(({ id }) => id === contrast?.lumen)?.findingId;
  const finding = note.findings.find(({ id }) => id === findingId);
  const { template, items: place } = placeOf(context, region?.shape, values);
  return containerItem(
    dcm('125007', 'Measurement Group'),
    [
      textItem('HAS OBS CONTEXT', dcm('112039', 'Tracking Identifier'), trackingName(row, values)),
      uidItem(
        'HAS OBS CONTEXT',
        dcm('112040', 'Tracking Unique Identifier'),
        stableUid(`${note.id}\n${row.id}\n${values.kernel}`),
      ),
      ...(finding === undefined
        ? []
        : [codeItem('CONTAINS', dcm('121071', 'Finding'), KIND_CODES[finding.kind])]),
      ...siteCodes(finding?.segment ?? null).map((site) =>
        codeItem('HAS CONCEPT MOD', sct('363698007', 'Finding Site'), site),
      ),
      ...place,
      ...valuesItems(values),
      codeItem('CONTAINS', OWN.kernel, KERNEL_CODES[values.kernel]),
      ...textIfAny('CONTAINS', OWN.kernelLabel, values.kernelLabel ?? ''),
      ...(region === undefined ? [] : [codeItem('CONTAINS', OWN.role, ROLE_CODES[region.role])]),
      ...(contrast === undefined ? [] : [textItem('CONTAINS', OWN.operands, row.label)]),
      ...(finding === undefined ? [] : findingItems(finding)),
      ...textIfAny('CONTAINS', OWN.place, row.place),
      ...(values.quoted ? [textItem('CONTAINS', OWN.quoted, row.quote.sentence)] : []),
      ...(row.quote.kernel === 'neither'
        ? [textItem('CONTAINS', OWN.remark, row.quote.sentence)]
        : []),
      ...[...values.flags, ...row.flags].map((flag) => textItem('CONTAINS', OWN.remark, flag)),
    ],
    template,
  );
}

function trackingName({ id, label }: TableRow, { kernel }: KernelValues): string {
  return `${id}, ${label}, ${kernel}`;
}

function placeOf(context: ReportContext, shape: Shape | undefined, values: KernelValues): Place {
  const { sopInstanceUid, frameNumber, sliceIndex, slices, sliceOffsetMm } = values;
  if (shape === undefined || sopInstanceUid === null) return { template: '1501', items: [] };
  const image = imageReference(context, sopInstanceUid, frameNumber);
  const slice =
    sliceIndex === null
      ? []
      : [
          textItem(
            'CONTAINS',
            OWN.slice,
            `Slice ${sliceIndex + 1} of ${slices}, counted from 1; ${sliceOffsetMm === null ? 'its distance' : `${sliceOffsetMm.toFixed(2)} mm`} from the plane of the region${sliceOffsetMm === null ? ' is not known' : ''}.`,
          ),
        ];
  const graphic = graphicOf(shape, (pointMm) =>
    context.pixelOf?.(sopInstanceUid, frameNumber, pointMm),
  );
  if (graphic !== undefined) {
    return { template: '1410', items: [imageRegionItem(graphic, image), ...slice] };
  }
  return {
    template: '1501',
    items: [
      imageItem('CONTAINS', dcm('121112', 'Source of Measurement'), image),
      ...slice,
      textItem(
        'CONTAINS',
        OWN.noContour,
        `The image ${frameKey(image)} was not at hand when this document was made: its contour in pixels could not be given.`,
      ),
    ],
  };
}

function findingItems(finding: NoteFinding): readonly ContentItem[] {
  const { assessability, reason, nominalMm, lengthMm, overlap, location } = finding;
  const details = [
    nominalMm === null ? '' : `nominal diameter ${nominalMm} mm`,
    lengthMm === null ? '' : `nominal length ${lengthMm} mm`,
    overlap === null ? '' : overlap ? 'overlaps another stent' : 'overlaps no other stent',
    location,
  ].filter((part) => part.trim() !== '');
  return [
    ...(assessability === null
      ? []
      : [codeItem('CONTAINS', OWN.assessability, ASSESSABILITY_CODES[assessability])]),
    ...textIfAny('CONTAINS', OWN.reason, reason),
    ...textIfAny('CONTAINS', OWN.detail, details.join('; ')),
  ];
}

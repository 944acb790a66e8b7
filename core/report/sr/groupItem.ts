import type { Note, NoteFinding } from '../../note/schema.js';
import { stableUid } from '../../stableUid.js';
import { STENT_CAUTION } from '../stentSentence.js';
import type { KernelValues, TableRow } from '../tableRow.js';
import { dcm, sct } from './code.js';
import {
  type ContentItem,
  codeItem,
  containerItem,
  textIfAny,
  textItem,
  uidItem,
} from './contentItem.js';
import type { ReportContext } from './context.js';
import { groupPlace } from './groupPlace.js';
import { OWN } from './ownCodes.js';
import { ASSESSABILITY_CODES, KERNEL_CODES, KIND_CODES, ROLE_CODES } from './readingCodes.js';
import { siteCodes } from './siteCodes.js';
import { valuesItems } from './valuesItems.js';

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
  const finding = findingOf(note, row);
  const isLine = row.item !== 'region' && row.item !== 'contrast';
  const { template, items: place } = groupPlace(context, row, values);
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
      ...textIfAny('CONTAINS', isLine ? OWN.where : OWN.place, row.place),
      ...(isLine && row.nominalMm !== null
        ? [textItem('CONTAINS', OWN.nominal, `${row.nominalMm} mm`)]
        : []),
      ...textIfAny('CONTAINS', OWN.definition, row.definition),
      ...(row.item === 'fitted stent' ? [textItem('CONTAINS', OWN.caution, STENT_CAUTION)] : []),
      ...(values.quoted ? [textItem('CONTAINS', OWN.quoted, row.quote.sentence)] : []),
      ...(row.quote.kernel === 'neither'
        ? [textItem('CONTAINS', OWN.remark, row.quote.sentence)]
        : []),
      ...[...values.flags, ...row.flags].map((flag) => textItem('CONTAINS', OWN.remark, flag)),
    ],
    template,
  );
}

/** The finding that a row belongs to: a contrast to that of its lumen. */
function findingOf(note: Note, { item, id }: TableRow): NoteFinding | undefined {
  const { regions, contrasts, stents, findings } = note;
  const lumen = contrasts.find((contrast) => contrast.id === id)?.lumen;
  const findingId =
    item === 'fitted stent'
      ? stents.find((stent) => stent.id === id)?.findingId
      : item === 'region'
        ? regions.find((region) => region.id === id)?.findingId
        : item === 'contrast'
          ? regions.find((region) => region.id === lumen)?.findingId
          : undefined;
  return findings.find((finding) => finding.id === findingId);
}

function trackingName({ id, label }: TableRow, { kernel }: KernelValues): string {
  return `${id}, ${label}, ${kernel}`;
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

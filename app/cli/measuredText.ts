import { formatCount, formatQuantity, visibleText } from '../../core/format/index.js';
import type { MeasuredPlan } from '../../core/note/index.js';
import { isQuiet, type RegionValue } from '../../core/region/index.js';
import { edgesText } from './edgesText.js';
import { planesText } from './planesText.js';
import { profilesText } from './profilesText.js';
import { stentsText } from './stentsText.js';
import { textTable } from './textTable.js';

/** A measured plan for people: tables of what was measured, then every flag and reason. */
export function measuredText({
  regions,
  contrasts,
  profiles,
  stents,
  edges = [],
  planes = [],
}: MeasuredPlan): string {
  const values = regions.flatMap(({ id, role, soft, sharp }) => [
    { id, role, kernel: 'soft', value: soft },
    ...(sharp === null ? [] : [{ id, role, kernel: 'sharp', value: sharp }]),
  ]);
  const parts: string[] = [];
  if (values.length > 0) {
    parts.push(
      textTable(
        [
          'Region',
          'Role',
          'Kernel',
          'Mean',
          'SE',
          'SD',
          'Placement',
          'Median',
          'Min',
          'Max',
          'Pixels',
          'mm²',
          'SNR',
          'Slice',
        ],
        values.map(({ id, role, kernel, value }) => [id, role, kernel, ...cellsOf(value)]),
      ),
    );
  }
  if (contrasts.length > 0) {
    parts.push(
      textTable(
        ['Contrast', 'Soft', 'Sharp', 'Formula'],
        contrasts.map(({ id, soft, sharp, formula }) => [
          id,
          formatQuantity(soft, 'ratio'),
          formatQuantity(sharp, 'ratio'),
          formula,
        ]),
      ),
    );
  }
  if (edges.length > 0) parts.push(edgesText(edges));
  const across = profilesText(profiles);
  if (profiles.length > 0) parts.push(across.table);
  const fitted = stentsText(stents);
  if (fitted.table !== '') parts.push(fitted.table);
  const remarks = [
    ...values.flatMap(({ id, kernel, value }) =>
      value.flags.filter((flag) => !isQuiet(flag)).map(({ text }) => `${id}, ${kernel}: ${text}`),
    ),
    ...contrasts.flatMap(({ id, flags }) => flags.map(({ text }) => `${id}: ${text}`)),
    ...across.remarks,
    ...fitted.remarks,
    ...planesText(planes),
  ];
  if (remarks.length > 0) parts.push(`${remarks.map(visibleText).join('\n')}\n`);
  if (parts.length === 0) return 'The plan asks for nothing.\n';
  return parts.join('\n');
}

/** Numbers in HU and mm² as the exports print them; slices counted from 1. */
function cellsOf(value: RegionValue): readonly string[] {
  return [
    formatQuantity(value.meanHu, 'hu'),
    formatQuantity(value.standardErrorHu, 'hu'),
    formatQuantity(value.sdHu, 'hu'),
    formatQuantity(value.placementHu, 'hu'),
    formatQuantity(value.medianHu, 'hu'),
    formatQuantity(value.minHu, 'pixelHu'),
    formatQuantity(value.maxHu, 'pixelHu'),
    formatCount(value.n),
    formatQuantity(value.sampledAreaMm2, 'areaMm2'),
    formatQuantity(value.snr, 'ratio'),
    formatCount(value.sliceIndex === null ? null : value.sliceIndex + 1),
  ];
}

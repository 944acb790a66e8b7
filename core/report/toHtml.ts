import { formatFixed, formatPosition } from '../format/index.js';
import type { Note } from '../note/schema.js';
import { densityHtml } from './densityHtml.js';
import { edgeLineHtml } from './edgeLineHtml.js';
import { escapeHtml } from './escapeHtml.js';
import { lifeHtml } from './lifeHtml.js';
import { type MeasurementTable, measurementTable } from './measurementTable.js';
import { PAGE_STYLE } from './pageStyle.js';
import { type PagePictures, pictureHtml } from './pictureHtml.js';
import { profileHtml } from './profileHtml.js';
import { stentHtml } from './stentHtml.js';
import { type KernelValues, kernelName, sliceText, type TableRow } from './tableRow.js';
import { flagsText } from './wideTable.js';

/**
 * One page that needs nothing else: no script, no address, and no picture but those that it holds itself. The policy in
 * it forbids all others, so that text from a file could do no harm even if it were not escaped.
 */
export function toHtml(note: Note, pictures: PagePictures = new Map()): string {
  const table = measurementTable(note);
  const title = `Measurements, ${note.study.patientId ?? 'patient ID not stated'}`;
  return `<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta http-equiv="Content-Security-Policy" content="default-src 'none'; style-src 'unsafe-inline'${pictures.size > 0 ? '; img-src data:' : ''}">
<meta name="viewport" content="width=device-width">
<title>${escapeHtml(title)}</title>
<style>${PAGE_STYLE}</style>
</head>
<body>
${banner(table)}<h1>${escapeHtml(title)}</h1>
${cautions(table)}
<h2>Regions</h2>
${regions(table)}
<h2>Contrasts</h2>
${contrasts(table)}
${densityHtml(table)}${edgeLineHtml(table)}${profileHtml(table)}${stentHtml(table)}${pictureHtml(table, pictures)}${lifeHtml(note)}<h2>Where the numbers come from</h2>
${facts(table)}
${cautions(table)}
${banner(table)}</body>
</html>
`;
}

function banner({ synthetic }: MeasurementTable): string {
  return synthetic
    ? '<p class="synthetic">SYNTHETIC STUDY: computed images of no patient</p>\n'
    : '';
}

function cautions(table: MeasurementTable): string {
  const items = table.cautions.map((text) => `<li>${escapeHtml(text)}</li>`).join('');
  return `<ul class="cautions">${items}</ul>`;
}

const REGION_COLUMNS = [
  'mean',
  'SD',
  'median',
  'minimum',
  'maximum',
  'n',
  'area',
  'sampled area',
  'SNR',
  'standard error',
  'placement',
];

function regions({ rows, remarks }: MeasurementTable): string {
  const ofRegions = rows.filter(({ item }) => item === 'region');
  if (ofRegions.length === 0) return '<p>No region was measured.</p>';
  const quantities = ofRegions.flatMap((row) => row.kernels.flatMap((k) => k.quantities));
  const heads = REGION_COLUMNS.map((name) => {
    const unit = quantities.find(({ quantity }) => quantity === name)?.unit;
    return `<th scope="col" class="number">${escapeHtml(unit ? `${name}, ${unit}` : name)}</th>`;
  });
  return `<table>
<thead><tr><th scope="col">Region</th><th scope="col">Kernel</th>${heads.join('')}<th scope="col" class="number">Slice</th><th scope="col">Quoted</th></tr></thead>
${ofRegions.map(regionBody).join('\n')}
</table>
<p class="small">Mean: sum / n. SD: sample SD, divisor n − 1. n: pixels with their centre inside, edge included. Area: of the shape; sampled area: n times the area of a pixel. SNR: mean / SD of the same region. Standard error: of the mean, from the autocorrelation of the noise on that kernel. Placement: largest change of the mean when the region moves by half a pixel in eight directions or its edge by 0.25 mm. Slices are counted from 1.${remarks.map((text) => ` ${escapeHtml(text)}`).join('')}</p>`;
}

function regionBody(row: TableRow): string {
  const lines = row.kernels.map((values, index) => {
    const first =
      index === 0
        ? `<th scope="rowgroup" rowspan="${row.kernels.length}">${escapeHtml(row.label)}<br><span class="small">${escapeHtml(placeText(row))}</span></th>`
        : '';
    const numbers = REGION_COLUMNS.map((name) => {
      const printed = values.quantities.find(({ quantity }) => quantity === name)?.printed ?? '–';
      return `<td class="number">${escapeHtml(printed)}</td>`;
    });
    const kernel = kernelName(values);
    const slice = sliceText(values) || '–';
    return `<tr>${first}<td>${escapeHtml(kernel)}</td>${numbers.join('')}<td class="number">${escapeHtml(slice)}</td><td>${values.quoted ? 'yes' : ''}</td></tr>`;
  });
  return `<tbody>${lines.join('')}${remarkLine(row, REGION_COLUMNS.length + 4)}</tbody>`;
}

function contrasts({ rows }: MeasurementTable): string {
  const ofContrasts = rows.filter(({ item }) => item === 'contrast');
  if (ofContrasts.length === 0) return '<p>No contrast was computed.</p>';
  const bodies = ofContrasts.map((row) => {
    const lines = row.kernels.map((values, index) => {
      const first =
        index === 0
          ? `<th scope="rowgroup" rowspan="${row.kernels.length}">${escapeHtml(row.id)}: ${escapeHtml(row.label)}${row.place === '' ? '' : `<br><span class="small">${escapeHtml(row.place)}</span>`}</th>`
          : '';
      const name = kernelName(values);
      const cells = values.quantities.map(
        ({ printed, formula }) =>
          `<td class="number">${escapeHtml(printed)}</td><td>${escapeHtml(formula)}</td>`,
      );
      return `<tr>${first}<td>${escapeHtml(name)}</td>${cells.join('')}</tr>`;
    });
    return `<tbody>${lines.join('')}${remarkLine(row, 4)}</tbody>`;
  });
  return `<table>
<thead><tr><th scope="col">Contrast</th><th scope="col">Kernel</th><th scope="col" class="number">CNR</th><th scope="col">Formula</th></tr></thead>
${bodies.join('\n')}
</table>`;
}

function placeText(row: TableRow): string {
  const nominal = row.nominalMm === null ? '' : `nominal ${row.nominalMm} mm`;
  const centre = row.centreMm === null ? '' : formatPosition(row.centreMm);
  const parts = [row.id, row.role, row.segment, row.finding, nominal, row.place, centre];
  return parts.filter((part) => part !== '').join(' · ');
}

function remarkLine(row: TableRow, columns: number): string {
  const parts = [
    row.assessability === '' ? '' : `Assessability: ${row.assessability}`,
    row.reason === '' ? '' : `Reason: ${row.reason}`,
    row.quote.sentence,
    ...row.kernels.map(imageText),
    flagsText(row),
  ].filter((part) => part !== '');
  if (parts.length === 0) return '';
  return `<tr><td class="small" colspan="${columns}">${parts.map(escapeHtml).join('<br>')}</td></tr>`;
}

/** Which image a kernel's values are from. */
function imageText({ kernel, sliceOffsetMm, sopInstanceUid, frameNumber }: KernelValues): string {
  if (sopInstanceUid === null) return '';
  const offset = formatFixed(sliceOffsetMm, 2);
  const frame = frameNumber === null ? '' : `, frame ${frameNumber}`;
  return `Image, ${kernel}: SOP Instance UID ${sopInstanceUid}${frame}, ${offset} mm from the region’s plane`;
}

function facts({ facts: all }: MeasurementTable): string {
  const groups = [...new Set(all.map(({ group }) => group))];
  return groups
    .map((group) => {
      const lines = all
        .filter((fact) => fact.group === group)
        .map(({ name, text }) => `<dt>${escapeHtml(name)}</dt><dd>${escapeHtml(text)}</dd>`);
      return `<h3>${escapeHtml(group)}</h3>\n<dl>${lines.join('')}</dl>`;
    })
    .join('\n');
}

import { escapeHtml } from './escapeHtml.js';
import { remarkRow } from './kernelSectionHtml.js';
import type { MeasurementTable } from './measurementTable.js';
import { STENT_CAUTION } from './stentSentence.js';
import { kernelName, sliceText, type TableRow } from './tableRow.js';

/** The section of fitted stents in the page: the fit once for both kernels, plain readings under each; empty without any. */
export function stentHtml({ rows }: Pick<MeasurementTable, 'rows'>): string {
  const stents = rows.filter(({ item }) => item === 'fitted stent');
  if (stents.length === 0) return '';
  return `<h2>Fitted stents</h2>
<p>${escapeHtml(STENT_CAUTION)}</p>
<table>
<thead><tr><th scope="col">Kernel</th><th scope="col">Quantity</th><th scope="col" class="number">Value</th><th scope="col">Unit</th><th scope="col">How</th></tr></thead>
${stents.map(stentBody).join('\n')}
</table>
`;
}

function stentBody(row: TableRow): string {
  const { id, label, segment, finding, nominalMm, place } = row;
  const nominal = nominalMm === null ? '' : `nominal ${nominalMm} mm`;
  const small = [id, segment, finding, nominal, place].filter((part) => part !== '').join(' · ');
  const lines = row.kernels.flatMap((values) => {
    const slice = sliceText(values);
    const name = `${kernelName(values)}${slice === '' ? '' : `, slice ${slice}`}`;
    return values.quantities.map(
      ({ quantity, printed, unit, formula }, index) =>
        `<tr>${index === 0 ? `<td rowspan="${values.quantities.length}">${escapeHtml(name)}</td>` : ''}<td>${escapeHtml(quantity)}</td><td class="number">${escapeHtml(printed)}</td><td>${escapeHtml(unit)}</td><td>${escapeHtml(formula)}</td></tr>`,
    );
  });
  return `<tbody><tr><th scope="rowgroup" colspan="5">${escapeHtml(label)}<br><span class="small">${escapeHtml(small)}</span></th></tr>${lines.join('')}${remarkRow(row, 5)}</tbody>`;
}

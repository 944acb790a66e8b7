import type { Note } from '../note/schema.js';
import { edgeLineRows } from './edgeLineRows.js';
import { escapeHtml } from './escapeHtml.js';

const COLUMNS = [
  ['edge rise', 'rise 10–90 %, mm'],
  ['edge rise standard error', 'standard error, mm'],
  ['edge crossings', 'crossings, mm'],
  ['blur FWHM', 'blur FWHM, mm'],
  ['edge step', 'step, HU'],
  ['edge pixels', 'n'],
] as const;

/** The section of edge lines in the page; empty where the note has none. */
export function edgeLineHtml(note: Note): string {
  const rows = edgeLineRows(note);
  if (rows.length === 0) return '';
  const heads = COLUMNS.map(
    ([, name]) => `<th scope="col" class="number">${escapeHtml(name)}</th>`,
  ).join('');
  const bodies = rows.map((row) => {
    const lines = row.kernels.map((values, index) => {
      const first =
        index === 0
          ? `<th scope="rowgroup" rowspan="${row.kernels.length}">${escapeHtml(row.label)}<br><span class="small">${escapeHtml(`${row.id} · ${row.place}`)}</span></th>`
          : '';
      const cells = COLUMNS.map(([quantity]) => {
        const printed = values.quantities.find((one) => one.quantity === quantity)?.printed ?? '–';
        return `<td class="number">${escapeHtml(printed)}</td>`;
      });
      const name = `${values.kernel}, ${values.kernelLabel ?? 'no kernel label'}`;
      const slice =
        values.sliceIndex === null ? '–' : `${values.sliceIndex + 1} of ${values.slices}`;
      return `<tr>${first}<td>${escapeHtml(name)}</td>${cells.join('')}<td class="number">${escapeHtml(slice)}</td></tr>`;
    });
    const quote = row.quote.sentence === '' ? [] : [escapeHtml(row.quote.sentence)];
    const flags = row.kernels.flatMap((of) =>
      of.flags.map((text) => escapeHtml(`${of.kernel}: ${text}`)),
    );
    const remarks = [...quote, ...flags];
    const remark =
      remarks.length === 0
        ? ''
        : `<tr><td class="small" colspan="${COLUMNS.length + 3}">${remarks.join('<br>')}</td></tr>`;
    return `<tbody>${lines.join('')}${remark}</tbody>`;
  });
  return `<h2>Edge lines</h2>
<table>
<thead><tr><th scope="col">Edge</th><th scope="col">Kernel</th>${heads}<th scope="col" class="number">Slice</th></tr></thead>
${bodies.join('\n')}
</table>
<p class="small">Rise: 10–90 % distance of the Gaussian-blurred step that fits the pixels of the band best, at right angles to the edge. Crossings: the same read off the measured profile. Blur FWHM: of the Gaussian with that rise, rise / 2.5631 × 2.3548. Step: level behind the edge less the level before it, from the start of the line on.</p>
`;
}

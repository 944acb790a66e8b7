import { escapeHtml } from './escapeHtml.js';
import { type KernelValues, kernelName, sliceText, type TableRow } from './tableRow.js';

/** A section of the page with a line for each kernel of a row. */
export interface KernelSection {
  readonly title: string;
  /** Head of the column of names. */
  readonly first: string;
  /** Quantity and the head of its column. */
  readonly columns: readonly (readonly [quantity: string, head: string])[];
  /** Sentences under the table. */
  readonly notes: readonly string[];
}

/** The section as HTML; empty without rows. */
export function kernelSectionHtml(
  { title, first, columns, notes }: KernelSection,
  rows: readonly TableRow[],
): string {
  if (rows.length === 0) return '';
  const heads = columns.map(
    ([, name]) => `<th scope="col" class="number">${escapeHtml(name)}</th>`,
  );
  const bodies = rows.map((row) => {
    const lines = row.kernels.map((values, index) => {
      const cells = columns.map(([quantity]) => {
        const printed = values.quantities.find((one) => one.quantity === quantity)?.printed ?? '–';
        return `<td class="number">${escapeHtml(printed)}</td>`;
      });
      const slice = sliceText(values) || '–';
      return `<tr>${index === 0 ? rowHead(row) : ''}<td>${escapeHtml(kernelName(values))}</td>${cells.join('')}<td class="number">${escapeHtml(slice)}</td></tr>`;
    });
    return `<tbody>${lines.join('')}${remarkRow(row, columns.length + 3)}</tbody>`;
  });
  return `<h2>${escapeHtml(title)}</h2>
<table>
<thead><tr><th scope="col">${escapeHtml(first)}</th><th scope="col">Kernel</th>${heads.join('')}<th scope="col" class="number">Slice</th></tr></thead>
${bodies.join('\n')}
</table>
<p class="small">${notes.map(escapeHtml).join(' ')}</p>
`;
}

function rowHead({ label, id, nominalMm, place, kernels }: TableRow): string {
  const nominal = nominalMm === null ? '' : `nominal ${nominalMm} mm`;
  const small = [id, nominal, place].filter((part) => part !== '').join(' · ');
  return `<th scope="rowgroup" rowspan="${kernels.length}">${escapeHtml(label)}<br><span class="small">${escapeHtml(small)}</span></th>`;
}

/** Quote and flags of a row in a line of its own; empty where there is nothing to say. */
export function remarkRow({ quote, kernels, flags }: TableRow, columns: number): string {
  const remarks = [
    quote.sentence,
    ...kernels.flatMap((of) =>
      // What holds for both at once needs no name of a kernel.
      of.flags.map((text) => (of.kernel === 'both' ? text : `${of.kernel}: ${text}`)),
    ),
    ...kernels.flatMap(imageSentences),
    ...flags,
  ].filter((part) => part !== '');
  return remarks.length === 0
    ? ''
    : `<tr><td class="small" colspan="${columns}">${remarks.map(escapeHtml).join('<br>')}</td></tr>`;
}

/** The images of values of both kernels at once. */
function imageSentences({ images = [] }: KernelValues): readonly string[] {
  return images.map(
    ({ kernel, sopInstanceUid, frameNumber }) =>
      `Image, ${kernel}: SOP Instance UID ${sopInstanceUid}${frameNumber === null ? '' : `, frame ${frameNumber}`}`,
  );
}

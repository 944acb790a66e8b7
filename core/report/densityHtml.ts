import { BAND_SHARE } from './densityQuantities.js';
import { escapeHtml } from './escapeHtml.js';
import type { MeasurementTable } from './measurementTable.js';

/** Shares of the density bands of every plaque, on the soft kernel; empty without any. */
export function densityHtml({ rows }: MeasurementTable): string {
  const bodies = rows.flatMap(({ label, kernels }) => {
    const shares = kernels
      .flatMap(({ quantities }) => quantities)
      .filter(({ quantity }) => quantity.startsWith(BAND_SHARE));
    if (shares.length === 0) return [];
    const lines = shares.map(
      ({ quantity, printed, formula }, index) =>
        `<tr>${index === 0 ? `<th scope="rowgroup" rowspan="${shares.length}">${escapeHtml(label)}</th>` : ''}<td>${escapeHtml(quantity)}</td><td class="number">${escapeHtml(printed)}</td><td>${escapeHtml(formula)}</td></tr>`,
    );
    return [`<tbody>${lines.join('')}</tbody>`];
  });
  if (bodies.length === 0) return '';
  return `<h2>Plaque density, soft kernel</h2>
<table>
<thead><tr><th scope="col">Region</th><th scope="col">Band</th><th scope="col" class="number">%</th><th scope="col">How</th></tr></thead>
${bodies.join('\n')}
</table>
`;
}

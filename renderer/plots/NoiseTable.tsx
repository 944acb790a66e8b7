import type { NoiseTableCell, NoiseTableRow } from './noiseTableRows.js';

/** Numbers of both kernels beside each other; each says on hover what it is, or why it is not there. */
export function NoiseTable({
  rows,
  caption,
}: {
  readonly rows: readonly NoiseTableRow[];
  readonly caption: string;
}) {
  return (
    <table class="noise-table">
      <caption class="visually-hidden">{caption}</caption>
      <thead>
        <tr>
          <td />
          <th scope="col">soft</th>
          <th scope="col">sharp</th>
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <tr key={row.name} title={row.title}>
            <th scope="row">
              {row.name}, {row.unit}
            </th>
            <Cell of={row.soft} row={row} kernel="soft" />
            <Cell of={row.sharp} row={row} kernel="sharp" />
          </tr>
        ))}
      </tbody>
    </table>
  );
}

function Cell({
  of,
  row,
  kernel,
}: {
  readonly of: NoiseTableCell;
  readonly row: NoiseTableRow;
  readonly kernel: 'soft' | 'sharp';
}) {
  return (
    <td title={of.reason === '' ? `${row.title} On the ${kernel} kernel.` : of.reason}>
      {of.text}
      {of.reason !== '' && <span class="visually-hidden"> {of.reason}</span>}
    </td>
  );
}

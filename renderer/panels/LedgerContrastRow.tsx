import { formatQuantity } from '../../core/format/index.js';
import type { NoteContrast, NoteRegion } from '../../core/note/index.js';
import { contrastText } from './ledgerGroups.js';

export interface LedgerContrastRowProps {
  readonly contrast: NoteContrast;
  readonly regions: readonly NoteRegion[];
  readonly frozen: boolean;
  readonly onDelete: (contrastId: string) => void;
}

/** A contrast's row: what it is made of, its value on both kernels, and its removal. */
export function LedgerContrastRow(props: LedgerContrastRowProps) {
  const { contrast } = props;
  const reason = contrast.flags.map(({ text }) => text).join(' ') || undefined;
  return (
    <tr class="contrast">
      <th scope="row">{contrast.id}</th>
      <td class="text" colSpan={4} title={contrast.formula}>
        {contrastText(contrast, props.regions)}
      </td>
      <td class="soft" title={reason}>
        {formatQuantity(contrast.soft, 'ratio')}
      </td>
      <td colSpan={2} />
      <td class="sharp" title={reason}>
        {formatQuantity(contrast.sharp, 'ratio')}
      </td>
      <td class="text">
        <button
          type="button"
          class="button icon-button"
          disabled={props.frozen}
          onClick={() => props.onDelete(contrast.id)}
        >
          Remove<span class="visually-hidden"> contrast {contrast.id}</span>
        </button>
      </td>
    </tr>
  );
}

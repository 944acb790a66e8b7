import { formatQuantity } from '../../core/format/index.js';
import {
  type ContrastParts,
  type NoiseSource,
  NoiseSourceSchema,
  type NoteContrast,
  type NoteRegion,
} from '../../core/note/index.js';
import { Choice, type ChoiceOption } from './parts/Choice.js';
import { FlagSign } from './parts/StateSign.js';

export interface LedgerContrastRowProps {
  readonly contrast: NoteContrast;
  readonly regions: readonly NoteRegion[];
  readonly frozen: boolean;
  readonly onChange: (contrastId: string, change: Partial<ContrastParts>) => void;
  readonly onDelete: (contrastId: string) => void;
}

const NOISES: readonly ChoiceOption<NoiseSource>[] = NoiseSourceSchema.options.map((noise) => ({
  value: noise,
  text: noise === 'pooled' ? 'pooled SD' : `SD of ${noise}`,
}));

/** A contrast's row: what it is made of, each part to be changed in place, its value on both kernels, its removal. */
export function LedgerContrastRow(props: LedgerContrastRowProps) {
  const { contrast, regions, frozen } = props;
  const reason = contrast.flags.map(({ text }) => text).join(' ') || undefined;
  const name = (part: string): string => `${part} of contrast ${contrast.id}`;
  const others = (id: string): readonly ChoiceOption<string>[] =>
    regions
      .filter((region) => region.id !== id)
      .map(({ id, label }) => ({ value: id, text: label }));
  const references = regions
    .filter(({ role, id }) => role === 'reference' || id === contrast.reference)
    .map(({ id, label }) => ({ value: id, text: label }));
  const change = (parts: Partial<ContrastParts>): void => props.onChange(contrast.id, parts);
  return (
    <tr class="contrast">
      <th scope="row">{contrast.id}</th>
      <td class="text" colSpan={4} title={contrast.formula}>
        <Choice
          bare
          look="quiet"
          label={name('Lumen')}
          value={contrast.lumen}
          options={others(contrast.wall)}
          disabled={frozen}
          onChange={(lumen) => change({ lumen })}
        />
        <span aria-hidden="true"> − </span>
        <Choice
          bare
          look="quiet"
          label={name('Wall')}
          value={contrast.wall}
          options={others(contrast.lumen)}
          disabled={frozen}
          onChange={(wall) => change({ wall })}
        />
        <span aria-hidden="true"> / </span>
        <Choice
          bare
          look="quiet"
          label={name('Noise')}
          value={contrast.noise}
          options={NOISES}
          disabled={frozen}
          onChange={(noise) => change({ noise })}
        />
        {contrast.noise === 'reference' && references.length > 0 && (
          <Choice
            bare
            look="quiet"
            label={name('Reference')}
            value={contrast.reference ?? ''}
            options={references}
            disabled={frozen}
            onChange={(reference) => change({ reference })}
          />
        )}
      </td>
      <td class="soft" title={reason}>
        {reason !== undefined && (
          <span class="flag">
            <FlagSign />
            <span class="visually-hidden">{reason}</span>
          </span>
        )}
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
          disabled={frozen}
          onClick={() => props.onDelete(contrast.id)}
        >
          Remove<span class="visually-hidden"> contrast {contrast.id}</span>
        </button>
      </td>
    </tr>
  );
}

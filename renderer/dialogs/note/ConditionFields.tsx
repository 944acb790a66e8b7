import { mayState, type Note, type StatedCondition } from '../../../core/note/index.js';
import { TextField } from '../../panels/parts/TextField.js';

export interface ConditionFieldsProps {
  readonly note: Note;
  readonly frozen: boolean;
  readonly onCondition: (condition: StatedCondition, text: string) => void;
}

const CONDITIONS: readonly {
  readonly condition: StatedCondition;
  readonly name: string;
  readonly unit: string;
}[] = [
  { condition: 'kvp', name: 'Tube voltage', unit: 'kV' },
  { condition: 'phasePercent', name: 'Cardiac phase', unit: '%' },
  { condition: 'thicknessMm', name: 'Slice thickness', unit: 'mm' },
  { condition: 'contrastAgent', name: 'Contrast agent', unit: '' },
];

/** Conditions of the acquisition: what the files state is shown, what they don't may be stated here. */
export function ConditionFields({ note, frozen, onCondition }: ConditionFieldsProps) {
  return (
    <section class="settings" aria-label="Conditions">
      <h3>Conditions</h3>
      <dl class="conditions">
        {CONDITIONS.map(({ condition, name, unit }) => {
          const value = note.conditions[condition];
          const text = value === null ? '' : String(value);
          const label = unit === '' ? name : `${name}, ${unit}`;
          return (
            <div key={condition}>
              <dt>{label}</dt>
              <dd>
                {mayState(note, condition) ? (
                  <TextField
                    bare
                    label={label}
                    value={text}
                    numeric={unit !== ''}
                    placeholder="not stated in the files"
                    disabled={frozen}
                    onCommit={(typed) => onCondition(condition, typed)}
                  />
                ) : (
                  text
                )}
                <span class="hint">
                  {value === null
                    ? ''
                    : note.conditionsByReader.includes(condition)
                      ? 'stated by the reader'
                      : 'from the files'}
                </span>
              </dd>
            </div>
          );
        })}
      </dl>
    </section>
  );
}

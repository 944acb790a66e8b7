import { type Anatomy, type Dominance, SEGMENTS } from '../../../core/note/index.js';
import { Choice } from '../../panels/parts/Choice.js';

export interface TreeFieldsProps {
  readonly anatomy: Anatomy;
  readonly frozen: boolean;
  readonly onAnatomy: (change: Partial<Anatomy>) => void;
}

const DOMINANCES: readonly { readonly value: Dominance | 'none'; readonly text: string }[] = [
  { value: 'none', text: 'not said' },
  { value: 'right', text: 'right' },
  { value: 'left', text: 'left' },
  { value: 'co-dominant', text: 'co-dominant' },
];

/** Dominance, and the segments that this heart does not have. */
export function TreeFields({ anatomy, frozen, onAnatomy }: TreeFieldsProps) {
  const { dominance, absentSegments } = anatomy;
  const turn = (segment: number, isAbsent: boolean): void => {
    const others = absentSegments.filter((number) => number !== segment);
    onAnatomy({ absentSegments: isAbsent ? [...others, segment] : others });
  };
  return (
    <section class="settings" aria-label="Coronary tree">
      <h3>Coronary tree</h3>
      <Choice
        label="Dominance"
        value={dominance ?? 'none'}
        options={DOMINANCES}
        disabled={frozen}
        onChange={(value) => onAnatomy({ dominance: value === 'none' ? null : value })}
      />
      <details>
        <summary>
          Absent segments{absentSegments.length > 0 && `: ${absentSegments.join(', ')}`}
        </summary>
        <fieldset class="segments" disabled={frozen}>
          <legend class="visually-hidden">Segments that this heart does not have</legend>
          {SEGMENTS.map(({ number, abbreviation, name }) => (
            <label key={number} class="choice" title={name}>
              <input
                type="checkbox"
                checked={absentSegments.includes(number)}
                onChange={(event) => turn(number, event.currentTarget.checked)}
              />
              {number} {abbreviation}
            </label>
          ))}
        </fieldset>
      </details>
    </section>
  );
}

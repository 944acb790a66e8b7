import { useId } from 'preact/hooks';
import type { Stack } from '../../core/stack/index.js';
import { stackDetails, stackName } from './stackLists.js';

export interface StackOptionsProps {
  readonly name: 'Soft' | 'Sharp';
  readonly stacks: readonly Stack[];
  readonly chosen: string | undefined;
  readonly disabled?: boolean;
  readonly onChoose: (key: string) => void;
  /** Offers to choose none. */
  readonly onNone?: () => void;
}

/** The stacks of a study, one of which lies on a plate. */
export function StackOptions(props: StackOptionsProps) {
  const group = useId();
  const { onNone } = props;
  return (
    <fieldset disabled={props.disabled ?? false}>
      <legend>{props.name}</legend>
      <div class="options">
        {onNone && (
          <label class="option">
            <input
              type="radio"
              name={group}
              checked={props.chosen === undefined}
              onChange={onNone}
            />
            <span>None: read one stack alone</span>
          </label>
        )}
        {props.stacks.map((stack) => (
          <label key={stack.key} class="option">
            <input
              type="radio"
              name={group}
              checked={stack.key === props.chosen}
              onChange={() => props.onChoose(stack.key)}
            />
            <span>{stackName(stack)}</span>
            <span class="dim">{stackDetails(stack).join(' · ')}</span>
          </label>
        ))}
      </div>
    </fieldset>
  );
}

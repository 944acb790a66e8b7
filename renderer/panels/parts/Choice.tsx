export interface ChoiceOption<T extends string> {
  readonly value: T;
  readonly text: string;
}

export interface ChoiceProps<T extends string> {
  readonly label: string;
  /** The label is said but not shown. */
  readonly bare?: boolean;
  readonly value: T;
  readonly options: readonly ChoiceOption<T>[];
  readonly disabled?: boolean;
  readonly title?: string | undefined;
  /** Further class names: 'quiet', or one for its width. */
  readonly look?: string;
  readonly onChange: (value: T) => void;
}

/** A labelled select over a fixed list of values. */
export function Choice<T extends string>(props: ChoiceProps<T>) {
  const select = (
    <select
      class={`field ${props.look ?? ''}`}
      value={props.value}
      disabled={props.disabled ?? false}
      title={props.title}
      aria-label={props.bare ? props.label : undefined}
      onChange={(event) => {
        const chosen = props.options.find((option) => option.value === event.currentTarget.value);
        if (chosen !== undefined) props.onChange(chosen.value);
      }}
    >
      {props.options.map((option) => (
        <option key={option.value} value={option.value} selected={option.value === props.value}>
          {option.text}
        </option>
      ))}
    </select>
  );
  if (props.bare) return select;
  return (
    // biome-ignore lint/a11y/noLabelWithoutControl: the select is inside
    <label class="labelled">
      <span>{props.label}</span>
      {select}
    </label>
  );
}

/** Options whose text is their value. */
export function plainOptions<T extends string>(values: readonly T[]): readonly ChoiceOption<T>[] {
  return values.map((value) => ({ value, text: value }));
}

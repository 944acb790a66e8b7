import { useState } from 'preact/hooks';

export interface TextFieldProps {
  readonly label: string;
  /** The label is said but not shown. */
  readonly bare?: boolean;
  readonly value: string;
  readonly placeholder?: string;
  readonly look?: string;
  readonly numeric?: boolean;
  readonly disabled?: boolean;
  /** Called when the reader leaves the field or presses Enter, if the text is another one. */
  readonly onCommit: (text: string) => void;
}

/** A field that gives its text when it is done with; Esc puts back what was there. */
export function TextField(props: TextFieldProps) {
  // What is being typed lives here, so that a change elsewhere does not overwrite it.
  const [draft, setDraft] = useState<string>();
  const commit = () => {
    setDraft(undefined);
    if (draft !== undefined && draft !== props.value) props.onCommit(draft);
  };
  const onKeyDown = (event: KeyboardEvent) => {
    if (event.key === 'Enter') commit();
    if (event.key !== 'Escape' || draft === undefined) return;
    // Esc undoes the typing first; only then may it close what lies around.
    event.stopPropagation();
    event.preventDefault();
    setDraft(undefined);
  };
  const input = (
    <input
      class={`field ${props.look ?? ''}`}
      type="text"
      inputMode={props.numeric ? 'decimal' : 'text'}
      autocomplete="off"
      spellcheck={false}
      value={draft ?? props.value}
      placeholder={props.placeholder}
      disabled={props.disabled ?? false}
      aria-label={props.bare ? props.label : undefined}
      onInput={(event) => setDraft(event.currentTarget.value)}
      onBlur={commit}
      onKeyDown={onKeyDown}
    />
  );
  if (props.bare) return input;
  return (
    // biome-ignore lint/a11y/noLabelWithoutControl: the field is inside
    <label class="labelled grow">
      <span>{props.label}</span>
      {input}
    </label>
  );
}

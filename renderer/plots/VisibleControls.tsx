import { ROSE_CRITERIA, type RoseCriterion } from '../../core/note/index.js';
import { Choice } from '../panels/parts/Choice.js';
import { TextField } from '../panels/parts/TextField.js';

/** A contrast of the note that can be asked about. */
export interface ContrastOption {
  readonly id: string;
  readonly text: string;
}

export interface VisibleControlsProps {
  readonly contrasts: readonly ContrastOption[];
  /** The contrast asked about; undefined where one is typed or none is there yet. */
  readonly contrastId: string | undefined;
  /** The typed contrast, HU; undefined where it is that of the note or none yet. */
  readonly typedHu: number | undefined;
  readonly k: RoseCriterion;
  readonly disabled: boolean;
  readonly onContrast: (id: string) => void;
  /** The text of the field, when the reader is done with it. */
  readonly onTyped: (text: string) => void;
  readonly onCriterion: (k: RoseCriterion) => void;
}

const TYPED = 'typed';

/** Which contrast is asked about, and how far it has to stand out. */
export function VisibleControls(props: VisibleControlsProps) {
  const { contrasts, contrastId, typedHu, k, disabled } = props;
  return (
    <div class="visible-controls">
      <Choice
        bare
        label="Contrast of"
        title="The contrast that is asked about: |lumen − wall| as each kernel shows it, or one that you type"
        look="visible-contrast"
        value={contrastId ?? TYPED}
        disabled={disabled}
        options={[
          ...contrasts.map(({ id, text }) => ({ value: id, text })),
          { value: TYPED, text: 'Typed contrast' },
        ]}
        onChange={(id) => (id === TYPED ? props.onTyped('') : props.onContrast(id))}
      />
      {contrastId === undefined && (
        <span class="labelled">
          <TextField
            bare
            numeric
            label="Contrast, HU"
            look="visible-hu"
            placeholder="60"
            value={typedHu === undefined ? '' : String(typedHu)}
            disabled={disabled}
            onCommit={props.onTyped}
          />
          <span>HU</span>
        </span>
      )}
      <Choice
        label="k"
        title="Rose’s criterion: how many times its noise a disc has to stand out. 5 is the classic value"
        value={String(k)}
        disabled={disabled}
        options={ROSE_CRITERIA.map((one) => ({ value: String(one), text: String(one) }))}
        onChange={(text) => {
          const chosen = ROSE_CRITERIA.find((one) => String(one) === text);
          if (chosen !== undefined) props.onCriterion(chosen);
        }}
      />
    </div>
  );
}

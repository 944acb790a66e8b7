import { useState } from 'preact/hooks';
import { formatPersonName, visibleText } from '../../core/format/index.js';
import type { Stack } from '../../core/stack/index.js';
import { Choice } from '../panels/parts/Choice.js';
import { Verdict, type VerdictProps } from '../panels/Verdict.js';
import { Dialog } from './Dialog.js';
import { StackOptions } from './StackOptions.js';
import { type StudyContents, studiesOf } from './stackLists.js';

/** The two stacks as they would lie on the plates. */
export interface PairChoice {
  readonly softKey: string;
  /** Undefined to read one stack alone. */
  readonly sharpKey: string | undefined;
}

export interface ChoosePairProps {
  readonly stacks: readonly Stack[];
  readonly choice: PairChoice | undefined;
  /** Verdict on the choice; undefined while it is being looked at. */
  readonly preview: VerdictProps | undefined;
  /** False when this choice can't be read as a pair. */
  readonly allowed: boolean;
  /** Asks for the verdict on another choice. */
  readonly onChange: (choice: PairChoice) => void;
  readonly onConfirm: (choice: PairChoice) => void;
  readonly onClose: () => void;
}

/** Choosing the two stacks by hand, with the evidence for and against them. */
export function ChoosePair(props: ChoosePairProps) {
  const { choice } = props;
  const studies = studiesOf(props);
  const chosenAt = studies.findIndex((study) => holds(study, choice?.softKey));
  const [wantedAt, setWantedAt] = useState(Math.max(0, chosenAt));
  const study = studies[wantedAt];
  const stacks = study?.stacks ?? [];
  const soft = holds(study, choice?.softKey) ? choice?.softKey : undefined;
  const sharp = holds(study, choice?.sharpKey) ? choice?.sharpKey : undefined;

  const setSoft = (softKey: string) =>
    props.onChange({ softKey, sharpKey: sharp === softKey ? soft : sharp });
  const setSharp = (sharpKey: string | undefined) => {
    const softKey = soft === sharpKey ? sharp : soft;
    if (softKey !== undefined) props.onChange({ softKey, sharpKey });
  };
  const canSwap = soft !== undefined && sharp !== undefined;

  return (
    <Dialog
      title="Choose pair"
      size="wide"
      onClose={props.onClose}
      foot={
        <>
          <span class="note">
            {soft !== undefined && sharp === undefined && 'One stack alone will be read.'}
          </span>
          <button type="button" class="button" onClick={props.onClose}>
            Cancel
          </button>
          <button
            type="button"
            class="button primary"
            disabled={soft === undefined || !props.allowed}
            onClick={() =>
              soft !== undefined && props.onConfirm({ softKey: soft, sharpKey: sharp })
            }
          >
            {sharp === undefined ? 'Read one stack' : 'Read as a pair'}
          </button>
        </>
      }
    >
      {studies.length > 1 && (
        <Choice
          label="Study"
          value={String(wantedAt)}
          options={studies.map((one, i) => ({ value: String(i), text: studyText(one) }))}
          onChange={(value) => setWantedAt(Number(value))}
        />
      )}
      <div class="pair-lists">
        <StackOptions name="Soft" stacks={stacks} chosen={soft} onChoose={setSoft} />
        <button
          type="button"
          class="button outlined swap"
          disabled={!canSwap}
          onClick={() => canSwap && props.onChange({ softKey: sharp, sharpKey: soft })}
        >
          ⇄ Swap
        </button>
        <StackOptions
          name="Sharp"
          stacks={stacks}
          chosen={sharp}
          disabled={soft === undefined}
          onChoose={setSharp}
          onNone={() => setSharp(undefined)}
        />
      </div>
      <div class="pair-preview" aria-live="polite">
        {soft === undefined && <p>Choose the soft stack first, then the sharp one.</p>}
        {soft !== undefined && props.preview === undefined && <p>Looking at both stacks…</p>}
        {soft !== undefined && props.preview !== undefined && <Verdict {...props.preview} open />}
      </div>
    </Dialog>
  );
}

function holds(study: StudyContents | undefined, key: string | undefined): boolean {
  return key !== undefined && (study?.stacks.some((stack) => stack.key === key) ?? false);
}

function studyText({ identity }: StudyContents): string {
  const name = formatPersonName(identity.patientName ?? '') || 'No patient name';
  return [name, identity.patientId, identity.studyDescription]
    .filter((text) => text !== undefined && text !== '')
    .map((text) => visibleText(text ?? ''))
    .join(' · ');
}

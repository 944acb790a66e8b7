import { useEffect, useRef, useState } from 'preact/hooks';
import type { Progress } from '../../app/host/contract.js';
import { formatPersonName, visibleText } from '../../core/format/index.js';
import type { Stack } from '../../core/stack/index.js';
import { Choice } from '../panels/parts/Choice.js';
import { Verdict, type VerdictProps, VerdictSign } from '../panels/Verdict.js';
import { Dialog } from './Dialog.js';
import { ProgressLine } from './ProgressLine.js';
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
  /** Pairs that were found, best first; undefined while they were not looked for. */
  readonly proposals: readonly ProposedPair[] | undefined;
  /** What the files differ in and the reader can answer for with a reason. */
  readonly needsReason: readonly string[];
  /** The reader's reason for each of those. */
  readonly reasons: Readonly<Record<string, string>>;
  readonly onReason: (check: string, reason: string) => void;
  /** How far the looking for pairs is; undefined while nothing is looked for. */
  readonly progress: Progress | undefined;
  readonly onCancel: () => void;
  /** Looks for pairs. */
  readonly onPropose: () => void;
  /** Asks for the verdict on another choice. */
  readonly onChange: (choice: PairChoice) => void;
  readonly onConfirm: (choice: PairChoice) => void;
  readonly onClose: () => void;
}

/** A pair that was found, in words. */
export interface ProposedPair {
  readonly softKey: string;
  readonly sharpKey: string;
  readonly verdict: VerdictProps['verdict'];
  /** 'Series 3 · “Bs-1”  →  Series 4 · “Sh-2”'. */
  readonly name: string;
  readonly reason: string;
}

/** Choosing the two stacks, from the pairs that were found or by hand, with the evidence for and against them. */
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
      <Proposals {...props} />
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
      {sharp !== undefined && props.needsReason.length > 0 && (
        <fieldset class="pair-reasons">
          <legend>Read them together all the same</legend>
          <p class="dim">
            Say why these are one acquisition. The note keeps your words and says so in every
            export.
          </p>
          {props.needsReason.map((check) => (
            <label key={check} class="labelled">
              <span>Reason although the {check} differs</span>
              <input
                class="field"
                type="text"
                autocomplete="off"
                value={props.reasons[check] ?? ''}
                onInput={(event) => props.onReason(check, event.currentTarget.value)}
              />
            </label>
          ))}
        </fieldset>
      )}
    </Dialog>
  );
}

/** The pairs that were found, best first; the first one is chosen by Enter alone. */
function Proposals(props: ChoosePairProps) {
  const { proposals, choice } = props;
  const list = useRef<HTMLFieldSetElement>(null);
  // They come while the dialog stands there: the best one takes the focus, so that one key is enough.
  useEffect(() => {
    list.current?.querySelector<HTMLElement>('input:checked')?.focus();
  }, [proposals === undefined]);
  if (props.stacks.length < 2) return null;
  if (proposals === undefined && props.progress !== undefined) {
    return <ProgressLine progress={props.progress} onCancel={props.onCancel} />;
  }
  if (proposals === undefined) {
    return (
      <p class="dim">
        <button type="button" class="button outlined" onClick={props.onPropose}>
          Look for pairs
        </button>{' '}
        measures a few slices of each stack and lists the pairs that it finds, best first.
      </p>
    );
  }
  if (proposals.length === 0) return <p>No two stacks of this folder are a pair.</p>;
  return (
    <fieldset class="proposals" ref={list}>
      <legend>Pairs found, best first</legend>
      {proposals.map((one) => (
        <label key={`${one.softKey} ${one.sharpKey}`} class="proposal" data-verdict={one.verdict}>
          <input
            type="radio"
            name="proposal"
            checked={choice?.softKey === one.softKey && choice.sharpKey === one.sharpKey}
            onChange={() => props.onChange({ softKey: one.softKey, sharpKey: one.sharpKey })}
            onKeyDown={(event) => {
              if (event.key !== 'Enter' || !props.allowed) return;
              event.preventDefault();
              props.onConfirm({ softKey: one.softKey, sharpKey: one.sharpKey });
            }}
          />
          <VerdictSign verdict={one.verdict} />
          <span>
            {one.name}
            <span class="dim"> {one.reason}</span>
          </span>
        </label>
      ))}
    </fieldset>
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

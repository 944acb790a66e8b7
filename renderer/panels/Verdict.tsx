import { useId, useState } from 'preact/hooks';
import type { Evidence } from '../../core/note/index.js';
import { StateSign } from './parts/StateSign.js';

export interface VerdictProps {
  /** 'single' when one stack alone is read; 'measuring' until the measure is there; 'none' before anything is chosen. */
  readonly verdict: 'pair' | 'reservations' | 'refused' | 'measuring' | 'single' | 'none';
  /** A few lines under the title, reservations first: what was compared and measured. */
  readonly lines: readonly string[];
  readonly evidence: readonly Evidence[];
  /** The evidence is shown from the start. */
  readonly open?: boolean;
  /** What can be done about it. */
  readonly actions?: readonly { readonly label: string; readonly onClick: () => void }[];
}

const TITLES: Readonly<Record<VerdictProps['verdict'], string>> = {
  pair: 'One acquisition',
  reservations: 'One acquisition, with reservations',
  refused: 'Not one acquisition',
  measuring: 'Being measured…',
  single: 'One reconstruction',
  none: 'No pair chosen',
};

const STATES = ['agrees', 'differs', 'unknown'] as const;

/** Whether the two stacks are one acquisition, and what says so. */
export function Verdict(props: VerdictProps) {
  const [open, setOpen] = useState(props.open ?? false);
  const listId = useId();
  const counts = STATES.map((state) => ({
    state,
    count: props.evidence.filter((one) => one.state === state).length,
  })).filter(({ count }) => count > 0);
  return (
    <section class="verdict" data-verdict={props.verdict}>
      <h2>
        <VerdictSign verdict={props.verdict} />
        {TITLES[props.verdict]}
      </h2>
      {props.lines.map((line) => (
        <p key={line} title={line}>
          {line}
        </p>
      ))}
      {(props.actions?.length ?? 0) > 0 && (
        <div class="actions">
          {props.actions?.map(({ label, onClick }) => (
            <button key={label} type="button" class="button outlined" onClick={onClick}>
              {label}
            </button>
          ))}
        </div>
      )}
      {props.evidence.length > 0 && (
        <button
          type="button"
          class="evidence-toggle"
          aria-expanded={open}
          aria-controls={open ? listId : undefined}
          onClick={() => setOpen(!open)}
        >
          <span>Evidence</span>
          {counts.map(({ state, count }) => (
            <span key={state} class="count">
              <StateSign state={state} /> {count}
            </span>
          ))}
          <span class="caret" aria-hidden="true">
            {open ? '▴' : '▾'}
          </span>
        </button>
      )}
      {open && (
        <ul class="evidence" id={listId}>
          {props.evidence.map((one) => (
            <li key={one.check}>
              <StateSign state={one.state} />
              <span>
                <span class="check">{one.check}</span> <span class="detail">{one.text}</span>
              </span>
            </li>
          ))}
        </ul>
      )}
    </section>
  );
}

/** Two leaves joined, joined with a break, or apart; one still in dashes while it is being measured. */
export function VerdictSign({ verdict }: { readonly verdict: VerdictProps['verdict'] }) {
  const path = {
    pair: 'M1.5 2.5H5.5V11.5H1.5ZM7.5 2.5H11.5V11.5H7.5ZM5.5 7H7.5',
    reservations: 'M1.5 2.5H5.5V11.5H1.5ZM7.5 2.5H11.5V11.5H7.5Z',
    refused: 'M2 2.5 11 11.5M11 2.5 2 11.5',
    measuring:
      'M1.5 2.5H5.5V11.5H1.5ZM7.5 2.5h1.2m1.6 0h1.2v1.3m0 2v2m0 2v1.7h-1.2m-1.6 0h-1.2v-1.7m0-2v-2m0-2v-1.3',
    single: 'M3.5 2.5H9.5V11.5H3.5Z',
    none: 'M2.5 7H10.5',
  }[verdict];
  return (
    <svg class="sign" width={13} height={14} viewBox="0 0 13 14" aria-hidden="true">
      <path d={path} fill="none" stroke="currentColor" stroke-width={1.5} />
    </svg>
  );
}

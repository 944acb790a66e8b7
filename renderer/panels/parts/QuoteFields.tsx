import type { Quoted, QuoteProposal } from '../../../core/note/index.js';
import { Choice, type ChoiceOption, plainOptions } from './Choice.js';
import { FlagSign } from './StateSign.js';
import { TextField } from './TextField.js';

export interface QuoteFieldsProps {
  readonly quoted: Quoted;
  /** What is measured: 'Lumen 2'. */
  readonly label: string;
  /** What would be quoted by the rules. */
  readonly proposal: QuoteProposal;
  readonly frozen: boolean;
  /** The reader's choice, with his reason. */
  readonly onQuote: (quote: Quoted['quote'], reason: string) => void;
  /** Takes the reader's choice back: the proposal is in force. */
  readonly onProposed: () => void;
}

const CHOSEN = ['soft', 'sharp', 'both', 'neither'] as const;

type QuoteChoice = 'proposal' | 'none' | (typeof CHOSEN)[number];

/** Which kernel is quoted: as proposed, with the reason on hover, or the reader's choice with a reason of his own. */
export function QuoteFields(props: QuoteFieldsProps) {
  const { quoted, proposal, frozen } = props;
  const isProposed = quoted.quoteBy === 'proposal';
  const proposed = proposal.quote ?? 'nothing';
  const options: readonly ChoiceOption<QuoteChoice>[] = [
    { value: 'proposal', text: `${proposed} (proposed)` },
    ...plainOptions(CHOSEN),
    { value: 'none', text: 'nothing' },
  ];
  const differs = !isProposed && proposal.quote !== quoted.quote;
  const told = `The rules propose ${proposed}: ${proposal.reason}`;
  return (
    <>
      <Choice
        label="Quote"
        value={isProposed ? 'proposal' : (quoted.quote ?? 'none')}
        options={options}
        disabled={frozen}
        title={told}
        onChange={(choice) => {
          if (choice === 'proposal') props.onProposed();
          else props.onQuote(choice === 'none' ? null : choice, '');
        }}
      />
      {!isProposed && quoted.quote !== null && (
        <TextField
          bare
          look="why"
          label={`Why this kernel is quoted, ${props.label}`}
          placeholder="because…"
          value={quoted.quoteReason}
          disabled={frozen}
          onCommit={(reason) => props.onQuote(quoted.quote, reason)}
        />
      )}
      {differs && (
        <span class="differs" title={told}>
          <FlagSign />
          <span class="visually-hidden">{told}</span>
        </span>
      )}
    </>
  );
}

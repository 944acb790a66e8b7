import {
  FINDING_KINDS,
  type FindingKind,
  type NoteFinding,
  type NoteRegion,
  type NoteStent,
  type QuoteProposal,
  SEGMENTS,
} from '../../core/note/index.js';
import { ROLES } from '../../core/region/index.js';
import type { LedgerActions } from './ledgerActions.js';
import { Choice, type ChoiceOption, plainOptions } from './parts/Choice.js';
import { QuoteFields } from './parts/QuoteFields.js';
import { RoleKey } from './parts/RoleSignView.js';
import { TextField } from './parts/TextField.js';

export interface InspectorProps {
  readonly region: NoteRegion;
  readonly finding: NoteFinding | undefined;
  /** What would be quoted by the rules. */
  readonly proposal: QuoteProposal;
  /** The stent that was fitted where the region lies. */
  readonly fitted: NoteStent | undefined;
  readonly frozen: boolean;
  readonly actions: LedgerActions;
}

const KINDS: readonly ChoiceOption<FindingKind | 'none'>[] = [
  { value: 'none', text: 'none yet' },
  ...plainOptions(FINDING_KINDS),
];

const SEGMENT_OPTIONS: readonly ChoiceOption<string>[] = [
  { value: '', text: 'no segment' },
  ...SEGMENTS.map(({ number, abbreviation, name }) => ({
    value: String(number),
    text: `${number} ${abbreviation} · ${name}`,
  })),
];

/** The line under the ledger in which the selected region's words are changed. */
export function Inspector(props: InspectorProps) {
  const { region, finding, frozen, actions } = props;
  const { id } = region;
  return (
    <div class="inspector">
      <span class="name">
        <RoleKey role={region.role} />
        {region.label}
      </span>
      <Choice
        label="Role"
        value={region.role}
        options={plainOptions(ROLES)}
        disabled={frozen}
        onChange={(role) => actions.onRole(id, role)}
      />
      <TextField
        label="Place"
        placeholder="in stent, outer edge…"
        value={region.place}
        disabled={frozen}
        onCommit={(place) => actions.onPlace(id, place)}
      />

      <Choice
        label="Finding"
        value={finding?.kind ?? 'none'}
        options={KINDS}
        disabled={frozen}
        onChange={(kind) =>
          kind === 'none' ? actions.onClearFinding(id) : actions.onFinding(id, { kind })
        }
      />

      <Choice
        label="Segment"
        value={finding?.segment ? String(finding.segment) : ''}
        options={SEGMENT_OPTIONS}
        disabled={frozen || finding === undefined}
        title={finding === undefined ? 'Choose a finding first' : undefined}
        onChange={(value) =>
          actions.onFinding(id, { segment: value === '' ? null : Number(value) })
        }
      />
      <QuoteFields
        quoted={region}
        label={region.label}
        proposal={props.proposal}
        frozen={frozen}
        onQuote={(quote, reason) => actions.onQuote(id, quote, reason)}
        onProposed={() => actions.onProposedQuote(id)}
      />
      {region.role === 'lumen' && (finding?.kind === 'stent' || props.fitted !== undefined) && (
        <button
          type="button"
          class="button"
          disabled={frozen && props.fitted === undefined}
          title="The lumen’s density with the blooming of the struts taken away, fitted on both kernels"
          onClick={() => actions.onFittedStent(id)}
        >
          {props.fitted === undefined ? 'Fit stent' : `Fitted: ${props.fitted.label}`}
        </button>
      )}
      <button
        type="button"
        class="button icon-button"
        disabled={frozen}
        onClick={() => actions.onDelete(id)}
      >
        Delete<span class="visually-hidden"> {region.label}</span>
      </button>
    </div>
  );
}

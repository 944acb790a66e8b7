import {
  type NoteFinding,
  type NoteProfile,
  type NoteStent,
  profileQuote,
} from '../../core/note/index.js';
import { stentSentence } from '../../core/report/stentSentence.js';
import { groupTitle } from './ledgerGroups.js';
import { Choice } from './parts/Choice.js';
import { QuoteFields, type QuoteFieldsProps } from './parts/QuoteFields.js';

export interface StentInspectorProps {
  readonly stent: NoteStent;
  /** Findings that a stent can belong to. */
  readonly findings: readonly NoteFinding[];
  readonly frozen: boolean;
  readonly residuals: boolean;
  readonly onFinding: (findingId: string | null) => void;
  readonly onResiduals: () => void;
}

/** The line under the ledger for the selected stent: its result in a sentence, its finding, and what the fit leaves over. */
export function StentInspector(props: StentInspectorProps) {
  const { stent, findings, frozen } = props;
  const isFitted = stent.fit !== null && stent.fit.reason === null;
  return (
    <div class="inspector">
      <span class="name">{stent.label}</span>
      <Choice
        label="Finding"
        value={stent.findingId ?? ''}
        options={[
          { value: '', text: 'none yet' },
          ...findings.map((finding) => ({ value: finding.id, text: groupTitle(finding) })),
        ]}
        disabled={frozen}
        onChange={(id) => props.onFinding(id === '' ? null : id)}
      />
      <span class="sentence" title={stentSentence(stent)}>
        {stentSentence(stent)}
      </span>
      <button
        type="button"
        class="button outlined"
        aria-pressed={props.residuals}
        disabled={!isFitted}
        title="Image minus fitted model, in the colours of the difference, on both plates"
        onClick={props.onResiduals}
      >
        Left over
      </button>
    </div>
  );
}

export interface ProfileInspectorProps extends Pick<QuoteFieldsProps, 'onQuote' | 'onProposed'> {
  readonly profile: NoteProfile;
  readonly frozen: boolean;
}

/** The line under the ledger for the selected profile: which kernel's width is quoted. */
export function ProfileInspector({ profile, frozen, onQuote, onProposed }: ProfileInspectorProps) {
  return (
    <div class="inspector">
      <span class="name">{profile.label}</span>
      <span title={profile.definition}>Visible width at half height</span>
      <QuoteFields
        quoted={profile}
        label={profile.label}
        proposal={profileQuote(profile)}
        frozen={frozen}
        onQuote={onQuote}
        onProposed={onProposed}
      />
    </div>
  );
}

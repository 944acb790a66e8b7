import { useMemo } from 'preact/hooks';
import {
  assignStent,
  changeEdgeQuote,
  changeProfileQuote,
  type Note,
  type NoteEdge,
  type NoteProfile,
  type NoteStent,
  type Quoted,
} from '../../core/note/index.js';
import type { Result } from '../../core/result.js';
import { useEngine } from '../engine.js';
import { ProfileInspector, StentInspector } from '../panels/AcrossInspector.js';
import { EdgeInspector } from '../panels/EdgeInspector.js';
import { Ledger } from '../panels/Ledger.js';
import { editNote } from '../state/history.js';
import { selectedEdge, selectedProfile } from '../state/lineSelectors.js';
import { selectedStent } from '../state/stentSelectors.js';
import { createLedgerActions } from './ledgerActions.js';
import { useSelected } from './useSelected.js';

/** The ledger, from the note. */
export function LedgerView() {
  const engine = useEngine();
  const actions = useMemo(() => createLedgerActions(engine), [engine]);
  const note = useSelected((state) => state.note);
  const selectedId = useSelected((state) => state.selected);
  const edge = useSelected(selectedEdge);
  const profile = useSelected(selectedProfile);
  const stent = useSelected(selectedStent);
  const frozen = note?.verification === 'VERIFIED';
  return (
    <Ledger
      {...actions}
      note={note}
      selectedId={selectedId}
      frozen={frozen}
      foot={
        <>
          {edge && <EdgeInspectorView edge={edge} frozen={frozen} />}
          {profile && <ProfileInspectorView profile={profile} frozen={frozen} />}
          {stent && <StentInspectorView stent={stent} frozen={frozen} />}
        </>
      }
    />
  );
}

interface FrozenProps {
  readonly frozen: boolean;
}

/** A change of the note from the line under the ledger; one that is refused changes nothing. */
function useEdit(): (label: string, change: (note: Note) => Result<Note>) => void {
  const { store } = useEngine();
  return (label, change) =>
    store.change(
      label,
      editNote(label, (note) => {
        const changed = change(note);
        return changed.ok ? changed.value : note;
      }),
    );
}

function EdgeInspectorView({ edge, frozen }: FrozenProps & { readonly edge: NoteEdge }) {
  const { now } = useEngine();
  const edit = useEdit();
  const change = (quoted: Partial<Quoted>): void =>
    edit('Change quote', (note) => changeEdgeQuote(note, edge.id, quoted, now()));
  return (
    <EdgeInspector
      edge={edge}
      frozen={frozen}
      onQuote={(quote, quoteReason) => change({ quote, quoteReason, quoteBy: 'reader' })}
      onProposed={() => change({ quoteBy: 'proposal' })}
    />
  );
}

function ProfileInspectorView({
  profile,
  frozen,
}: FrozenProps & { readonly profile: NoteProfile }) {
  const { now } = useEngine();
  const edit = useEdit();
  const change = (quoted: Partial<Quoted>): void =>
    edit('Change quote', (note) => changeProfileQuote(note, profile.id, quoted, now()));
  return (
    <ProfileInspector
      profile={profile}
      frozen={frozen}
      onQuote={(quote, quoteReason) => change({ quote, quoteReason, quoteBy: 'reader' })}
      onProposed={() => change({ quoteBy: 'proposal' })}
    />
  );
}

function StentInspectorView({ stent, frozen }: FrozenProps & { readonly stent: NoteStent }) {
  const { now, run } = useEngine();
  const edit = useEdit();
  const findings = useSelected((state) => state.note?.findings) ?? [];
  const residuals = useSelected((state) => state.residuals);
  return (
    <StentInspector
      stent={stent}
      findings={findings.filter(({ kind }) => kind === 'stent')}
      frozen={frozen}
      residuals={residuals}
      onFinding={(findingId) =>
        edit('Change finding', (note) => assignStent(note, stent.id, findingId, now()))
      }
      onResiduals={() => run('view.residuals')}
    />
  );
}

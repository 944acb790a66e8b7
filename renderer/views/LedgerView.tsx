import { useMemo } from 'preact/hooks';
import { changeEdgeQuote, type NoteEdge, type Quoted } from '../../core/note/index.js';
import { useEngine } from '../engine.js';
import { EdgeInspector } from '../panels/EdgeInspector.js';
import { Ledger } from '../panels/Ledger.js';
import { editNote } from '../state/history.js';
import { selectedEdge } from '../state/lineSelectors.js';
import { createLedgerActions } from './ledgerActions.js';
import { useSelected } from './useSelected.js';

/** The ledger, from the note. */
export function LedgerView() {
  const engine = useEngine();
  const actions = useMemo(() => createLedgerActions(engine), [engine]);
  const note = useSelected((state) => state.note);
  const selectedId = useSelected((state) => state.selected);
  const edge = useSelected(selectedEdge);
  const frozen = note?.verification === 'VERIFIED';
  return (
    <Ledger
      {...actions}
      note={note}
      selectedId={selectedId}
      frozen={frozen}
      foot={edge && <EdgeInspectorView edge={edge} frozen={frozen} />}
    />
  );
}

function EdgeInspectorView({
  edge,
  frozen,
}: {
  readonly edge: NoteEdge;
  readonly frozen: boolean;
}) {
  const { store, now } = useEngine();
  const change = (quoted: Partial<Quoted>): void => {
    const edit = editNote('Change quote', (note) => {
      const changed = changeEdgeQuote(note, edge.id, quoted, now());
      return changed.ok ? changed.value : note;
    });
    store.change('Change quote', edit);
  };
  return (
    <EdgeInspector
      edge={edge}
      frozen={frozen}
      onQuote={(quote, quoteReason) => change({ quote, quoteReason, quoteBy: 'reader' })}
      onProposed={() => change({ quoteBy: 'proposal' })}
    />
  );
}

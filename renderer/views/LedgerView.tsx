import { useMemo } from 'preact/hooks';
import { useEngine } from '../engine.js';
import { Ledger } from '../panels/Ledger.js';
import { createLedgerActions } from './ledgerActions.js';
import { useSelected } from './useSelected.js';

/** The ledger, from the note. */
export function LedgerView() {
  const engine = useEngine();
  const actions = useMemo(() => createLedgerActions(engine), [engine]);
  const note = useSelected((state) => state.note);
  const selectedId = useSelected((state) => state.selected);
  return (
    <Ledger
      {...actions}
      note={note}
      selectedId={selectedId}
      frozen={note?.verification === 'VERIFIED'}
    />
  );
}

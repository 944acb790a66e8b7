import {
  changeContrast,
  changeRegion,
  clearFinding,
  contrastChanges,
  type Note,
  removeContrast,
  setFinding,
  setNoise,
  stentAtRegion,
} from '../../core/note/index.js';
import { shapeCentre } from '../../core/region/index.js';
import type { Result } from '../../core/result.js';
import type { Engine } from '../engine.js';
import type { LedgerActions } from '../panels/ledgerActions.js';
import { goToRegion } from '../state/changes/goToRegion.js';
import { removeSelected, selectRegion } from '../state/changes/regions.js';
import { editNote, withSelection } from '../state/history.js';

/** The ledger's actions as named changes of the note, each of which can be undone. */
export function createLedgerActions({ store, bench, port, run, now }: Engine): LedgerActions {
  const warn = (text: string): void =>
    store.change('Warn', (state) => ({ ...state, message: { tone: 'warning', text } }));

  /** Makes an edit that can be refused; the refusal is told and nothing changes. */
  const edit = (label: string, change: (note: Note) => Result<Note>): Note | undefined => {
    const { note } = store.now();
    if (note === undefined) return undefined;
    const changed = change(note);
    if (!changed.ok) {
      warn(changed.refusal.text);
      return undefined;
    }
    store.change(label, (state) => withSelection(editNote(label, () => changed.value)(state)));
    return changed.value;
  };
  const plain = (label: string, change: (note: Note) => Note): void => {
    edit(label, (note) => ({ ok: true, value: change(note) }));
  };
  const region = (label: string, id: string, change: Parameters<typeof changeRegion>[2]): void => {
    edit(label, (note) => {
      const changed = changeRegion(note, id, change, now());
      return changed.ok ? { ok: true, value: changed.value.note } : changed;
    });
  };

  /** Changes contrasts, and says what they were and are. */
  const contrast = (label: string, change: (note: Note) => Result<Note>): void => {
    const before = store.now().note;
    const after = edit(label, change);
    if (before === undefined || after === undefined || store.now().note !== after) return;
    const text = contrastChanges(before, after);
    store.change('Tell', (state) => ({ ...state, message: { tone: 'plain', text } }));
  };

  return {
    onSelect: (id) => {
      store.change('Select region', selectRegion(id));
      store.change('Go to region', goToRegion(bench.cuts));
    },
    onDelete: (id) => {
      store.change('Select region', selectRegion(id));
      store.change('Delete region', removeSelected(now()));
    },
    onRole: (id, role) => {
      const { note } = store.now();
      const changed = note === undefined ? undefined : changeRegion(note, id, { role }, now());
      if (changed === undefined) return;
      if (!changed.ok) return warn(changed.refusal.text);
      const { note: after, region: renamed, removedContrasts } = changed.value;
      store.change('Change role', (state) => ({
        ...editNote('Change role', () => after)(state),
        selected: renamed.id,
      }));
      if (removedContrasts.length > 0) {
        const ids = removedContrasts.map((contrast) => contrast.id).join(', ');
        warn(
          `The region is now ${renamed.label}. Contrast ${ids} used its old role and is gone; undo brings it back.`,
        );
      }
    },
    onPlace: (id, place) => region('Change place', id, { place }),
    onQuote: (id, quote, quoteReason) =>
      region('Change quote', id, { quote, quoteReason, quoteBy: 'reader' }),
    onProposedQuote: (id) => region('Quote as proposed', id, { quoteBy: 'proposal' }),
    onFinding: (id, fields) => {
      edit('Change finding', (note) => setFinding(note, id, fields, now()));
    },
    onClearFinding: (id) => plain('Clear finding', (note) => clearFinding(note, id, now())),
    onFittedStent: (id) => {
      const { note } = store.now();
      const region = note?.regions.find((one) => one.id === id);
      if (note === undefined || region === undefined) return;
      const stent = stentAtRegion(note, region);
      if (stent === undefined) {
        const finding = note.findings.find((one) => one.id === region.findingId);
        const of = finding && { findingId: finding.id, nominalMm: finding.nominalMm };
        port.placeStent(shapeCentre(region.shape), of);
        return;
      }
      store.change('Select stent', selectRegion(stent.id));
      store.change('Go to stent', goToRegion(bench.cuts));
      store.change('Choose plot', (state) => ({ ...state, plot: 'stent' }));
    },
    onNoise: (noise) =>
      contrast('Change noise', (note) => ({ ok: true, value: setNoise(note, noise, now()) })),
    onNewContrast: () => run('contrast.new'),
    onContrast: (id, change) =>
      contrast('Change contrast', (note) => changeContrast(note, id, change, now())),
    onDeleteContrast: (id) => plain('Delete contrast', (note) => removeContrast(note, id, now())),
  };
}

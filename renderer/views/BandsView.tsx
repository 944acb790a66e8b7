import { chooseBands } from '../../core/note/index.js';
import { useEngine } from '../engine.js';
import { Bands } from '../plots/Bands.js';
import { editNote } from '../state/history.js';
import { selectedRegion } from '../state/regionSelectors.js';
import { useSelected } from './useSelected.js';

/** The density bands of the selected plaque. */
export function BandsView() {
  const { store, now } = useEngine();
  const region = useSelected(selectedRegion);
  const note = useSelected((state) => state.note);
  if (note === undefined) return null;
  const plaque = region?.role === 'plaque' ? region : undefined;
  return (
    <Bands
      label={plaque?.label}
      density={note.densities.find(({ regionId }) => regionId === plaque?.id)}
      tableId={note.bandTable}
      frozen={note.verification === 'VERIFIED'}
      onTable={(id) =>
        store.change(
          'Choose bands',
          editNote('Choose bands', (before) => chooseBands(before, id, now())),
        )
      }
    />
  );
}

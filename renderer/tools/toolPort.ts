import type { StentPlacement } from '../../core/note/index.js';
import type { Bench } from '../services/bench.js';
import { movePlane, placePlane, showPlane } from '../state/changes/cut.js';
import { placeEdge, placeProfile, reshapeEdge, reshapeProfile } from '../state/changes/lines.js';
import { placeRegion, reshapeRegion } from '../state/changes/regions.js';
import { moveStent, placeStent } from '../state/changes/stents.js';
import type { Store } from '../state/store.js';
import type { ToolPort } from './tool.js';

/** What tools can do, on the page's own store. What is drawn on an oblique cut belongs to its plane. */
export function createToolPort(
  store: Store,
  bench: Pick<Bench, 'measure' | 'measureEdge' | 'measureProfile' | 'cuts' | 'fitting'>,
  now: () => string,
): ToolPort {
  const planeNow = (): string | undefined => store.now().cut?.planeId;
  const onPlane = (): { readonly plane?: string } => {
    const plane = planeNow();
    return plane === undefined ? {} : { plane };
  };
  /** Where something of the note lies: a line or region keeps its plane when it is changed. */
  const planeOf = (id: string): string | undefined => {
    const { note } = store.now();
    const items = note === undefined ? [] : [...note.regions, ...note.edges, ...note.profiles];
    return items.find((item) => item.id === id)?.plane;
  };
  const stentOf = (id: string) => store.now().note?.stents.find((stent) => stent.id === id);

  return {
    now: store.now,
    change: store.change,
    placeRegion: (role, shape) => {
      const values = bench.measure(shape, planeNow());
      store.change('Place region', placeRegion(role, shape, values, now(), planeNow()));
    },
    reshapeRegion: (id, shape, key) => {
      const values = bench.measure(shape, planeOf(id));
      store.change('Change region', reshapeRegion(id, shape, values, now(), key));
    },
    placeLine: (purpose, { fromMm, toMm, bandMm }) => {
      const line = { fromMm, toMm, bandMm, ...onPlane() };
      store.change(
        'Place line',
        purpose === 'edge'
          ? placeEdge(line, bench.measureEdge(line, line.plane), now())
          : placeProfile(line, bench.measureProfile(line), now()),
      );
    },
    reshapeLine: (purpose, id, line, key) => {
      const plane = planeOf(id);
      store.change(
        'Change line',
        purpose === 'edge'
          ? reshapeEdge(id, line, bench.measureEdge(line, plane), now(), key)
          : reshapeProfile(id, line, bench.measureProfile({ ...line, plane }), now(), key),
      );
    },
    placeStent: (pointMm, of) => {
      const proposal = bench.fitting.propose(pointMm, planeNow());
      if (proposal === undefined) return;
      if (!proposal.ok) {
        const { text } = proposal.refusal;
        store.change('Warn', (state) => ({ ...state, message: { tone: 'warning', text } }));
        return;
      }
      const nominalMm = of?.nominalMm ?? undefined;
      const place: StentPlacement = {
        centreMm: proposal.value.centreMm,
        ...(nominalMm === undefined ? {} : { nominalMm }),
        ...onPlane(),
      };
      store.change('Place stent', placeStent(place, now(), of?.findingId));
    },
    moveStent: (id, centreMm, key) => {
      const stent = stentOf(id);
      if (stent === undefined) return;
      const { nominalMm, plane } = stent;
      const place: StentPlacement = {
        centreMm,
        ...(nominalMm === undefined ? {} : { nominalMm }),
        ...(plane === undefined ? {} : { plane }),
      };
      store.change('Move stent', moveStent(id, place, null, now(), key));
    },
    movePlane: (id, courseMm) => {
      const plane = store.now().note?.planes.find((one) => one.id === id);
      if (plane === undefined) return;
      const { interpolation, slabMm } = plane;
      const placement = {
        courseMm,
        ...(interpolation === undefined ? {} : { interpolation }),
        ...(slabMm === undefined ? {} : { slabMm }),
      };
      store.change('Move the course', movePlane(id, placement, bench.cuts, now()));
    },
    showPlane: (id) => store.change('Show plane', showPlane(id, bench.cuts)),
    placePlane: (courseMm) => store.change('Cut', placePlane({ courseMm }, bench.cuts, now())),
  };
}

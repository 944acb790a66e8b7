import { useMemo } from 'preact/hooks';
import type { Kernel, NoteProfile, NoteStent, StentPlacement } from '../../core/note/index.js';
import { isSealed } from '../../core/note/life/index.js';
import { STENT_CAUTION, stentSentence } from '../../core/report/stentSentence.js';
import { measureProfile, type ProfileValue } from '../../core/stent/index.js';
import { useEngine } from '../engine.js';
import { AcrossPlot } from '../plots/AcrossPlot.js';
import { acrossProfile } from '../plots/acrossProfile.js';
import { acrossStent } from '../plots/acrossStent.js';
import { StentControls } from '../plots/StentControls.js';
import { StentFacts } from '../plots/StentFacts.js';
import { goToRegion } from '../state/changes/goToRegion.js';
import { selectRegion } from '../state/changes/regions.js';
import { moveStent } from '../state/changes/stents.js';
import { selectedProfile } from '../state/lineSelectors.js';
import { noiseOfKernel } from '../state/noiseOfKernel.js';
import { isOnSurface, takesMarks } from '../state/regionSelectors.js';
import { stackOf } from '../state/selectors.js';
import { selectedStent } from '../state/stentSelectors.js';
import { useSelected } from './useSelected.js';

const EMPTY =
  'Click into a stent’s lumen with the Stent tool to fit it, or draw a line across the vessel with the Profile tool.';

/** What lies across a vessel on both kernels: a profile, or a fitted stent. */
export function StentView() {
  const { store, bench, run, port, now } = useEngine();
  const note = useSelected((state) => state.note);
  const profile = useSelected(selectedProfile);
  const stent = useSelected(selectedStent);
  if (note === undefined)
    return (
      <div class="plot-area">
        <p class="empty">Open a study to look across its vessels.</p>
      </div>
    );
  const onNominal = (nominalMm: number | undefined): void => {
    if (profile !== undefined) port.reshapeLine('profile', profile.id, { ...profile, nominalMm });
    if (stent === undefined) return;
    const { centreMm, plane } = stent;
    const place: StentPlacement = {
      centreMm,
      ...(nominalMm === undefined ? {} : { nominalMm }),
      ...(plane === undefined ? {} : { plane }),
    };
    store.change('Nominal diameter', moveStent(stent.id, place, null, now()));
  };
  return (
    <div class="noise-panel">
      <StentControls
        profiles={note.profiles}
        stents={note.stents}
        shown={profile?.id ?? stent?.id ?? ''}
        onShow={(id) => {
          store.change('Show', selectRegion(id === '' ? undefined : id));
          store.change('Go there', goToRegion(bench.cuts));
        }}
        nominalMm={(profile ?? stent)?.nominalMm}
        onNominal={onNominal}
        onDelete={() => run('region.delete')}
        onProfile={() => run('tool.profile')}
        onStent={() => run('tool.stent')}
        disabled={isSealed(note)}
      />
      {profile !== undefined && <ProfileView profile={profile} />}
      {stent !== undefined && <FitView stent={stent} />}
      {profile === undefined && stent === undefined && (
        <AcrossPlot across={undefined} reason={EMPTY} />
      )}
    </div>
  );
}

function ProfileView({ profile }: { readonly profile: NoteProfile }) {
  const { store, bench } = useEngine();
  const loading = useSelected((state) => state.loading);
  const cut = useSelected((state) => state.cut);
  const assessment = useSelected((state) => state.assessment);
  const across = useMemo(() => {
    const on = (kernel: Kernel): ProfileValue | undefined => {
      const state = store.now();
      const stack = stackOf(state, kernel);
      if (stack === undefined || !takesMarks(state, kernel) || !isOnSurface(state, profile))
        return undefined;
      const noise = noiseOfKernel(state, kernel);
      return measureProfile(profile, stack, (index) => bench.shown(kernel, index), noise);
    };
    return acrossProfile(profile, { soft: on('soft'), sharp: on('sharp') });
  }, [profile, loading, cut, assessment]);
  const flags = [...(profile.soft?.flags ?? []), ...(profile.sharp?.flags ?? [])];
  return (
    <AcrossPlot
      across={across}
      reason={flags[0]?.text ?? 'The images of this slice are still to come.'}
    />
  );
}

function FitView({ stent }: { readonly stent: NoteStent }) {
  const { bench } = useEngine();
  useSelected((state) => state.fitsAnswered);
  const answer = bench.fitting.fitOf(stent);
  const across = useMemo(
    () => (answer === undefined ? undefined : acrossStent(stent, answer.fit)),
    [stent, answer],
  );
  const isFitted = stent.fit !== null && stent.fit.reason === null;
  return (
    <>
      <AcrossPlot across={across} reason={stent.fit === null ? 'Fitting…' : stentSentence(stent)} />
      {isFitted && stent.fit !== null && (
        <div>
          <StentFacts fit={stent.fit} />
          <p class="plot-caution" title={STENT_CAUTION}>
            {STENT_CAUTION}
          </p>
        </div>
      )}
    </>
  );
}

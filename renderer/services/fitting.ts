import { wrap } from 'comlink';
import type { SliceGrid, Vec3 } from '../../core/geometry/index.js';
import {
  fitOf as fitOnGround,
  type Kernel,
  type NotePlane,
  type NoteStent,
  noStentValue,
  type PlanCuts,
  type StentPlacement,
  withStentFits,
} from '../../core/note/index.js';
import { FLAGS, type NoiseOfStack } from '../../core/region/index.js';
import { stentSentence } from '../../core/report/stentSentence.js';
import { type Result, refuse } from '../../core/result.js';
import { findStentCentre, type StentProposal } from '../../core/stent/index.js';
import type { FitAnswer, FitRequest, FitWorker } from '../fitting/fitRequest.js';
import { type PartOfStack, stackPart } from '../fitting/stackPart.js';
import type { PairState } from '../state/appState.js';
import { noiseOfKernel } from '../state/noiseOfKernel.js';
import type { Store } from '../state/store.js';
import type { Cuts } from '../volumes/cuts.js';
import type { PairVolumes } from '../volumes/loadPair.js';
import type { Volume } from '../volumes/volume.js';

/** Fitting stents on the pixels of the page. */
export interface Fitting {
  /** What was fitted for a stent of the note, with curves and what is left over; undefined until it has been. */
  fitOf(stent: NoteStent): FitAnswer | undefined;
  /** Fits all stents of the note that were not fitted on what is there now. */
  refresh(): void;
  /** Centre and radius of the vessel next to a point. Refused where there is none; undefined while slices are missing. */
  propose(pointMm: Vec3, plane: string | undefined): Result<StentProposal> | undefined;
}

/** Slices around a place that a fit may look at: on slices a few, on an oblique plane as far as its square reaches, mm. */
const REACH_MM = { slices: 2, plane: 10 } as const;

interface Asked {
  readonly volumes: PairVolumes;
  readonly noise: readonly NoiseOfStack[];
  answer: FitAnswer | undefined;
}

export interface FittingOptions {
  readonly store: Store;
  readonly volumes: () => PairVolumes | undefined;
  readonly cuts: Cuts;
  readonly now: () => string;
  readonly signal: AbortSignal;
}

export function createFitting({ store, volumes, cuts, now, signal }: FittingOptions): Fitting {
  const asked = new Map<string, Asked>();
  const ask = createFitWorker(signal);

  const planeOf = ({ plane }: StentPlacement): NotePlane | undefined =>
    store.now().note?.planes.find(({ id }) => id === plane);
  const gridOf = (stent: StentPlacement): SliceGrid | undefined => {
    const plane = planeOf(stent);
    const cut = plane && cuts.of(plane);
    return cut?.ok === true ? cut.value.grid : undefined;
  };
  const keyOf = (stent: StentPlacement): string => {
    const { centreMm, nominalMm, plane } = stent;
    return JSON.stringify([centreMm, nominalMm, plane, planeOf(stent)?.courseMm]);
  };
  const noiseNow = (kernel: Kernel): NoiseOfStack => noiseOfKernel(store.now(), kernel);

  const put = (key: string, answer: FitAnswer): void => {
    store.change('Stent fitted', (state) => {
      const { note } = state;
      const answered = { ...state, fitsAnswered: state.fitsAnswered + 1 };
      if (note === undefined || note.verification === 'VERIFIED') return answered;
      const fitted = withStentFits(note, (s) => (keyOf(s) === key ? answer.value : null), now());
      if (fitted === note) return answered;
      const told = fitted.stents.find(({ id }) => id === state.selected);
      const isNew = told !== undefined && keyOf(told) === key;
      const text = isNew ? `${told.label}. ${stentSentence(told)}` : undefined;
      return {
        ...answered,
        note: fitted,
        message: text === undefined ? state.message : { tone: 'plain', text },
      };
    });
  };

  const request = (
    stent: StentPlacement,
    both: PairVolumes,
    noise: { readonly [K in Kernel]: NoiseOfStack },
  ): (FitRequest & { readonly soft: PartOfStack; readonly sharp: PartOfStack }) | undefined => {
    const plane = stent.plane === undefined ? undefined : gridOf(stent);
    if (both.sharp === undefined || (stent.plane !== undefined && plane === undefined))
      return undefined;
    const reachMm = stent.plane === undefined ? REACH_MM.slices : REACH_MM.plane;
    const partOf = (volume: Volume) => stackPart(volume, stent.centreMm, reachMm);
    const [soft, sharp] = [partOf(both.soft), partOf(both.sharp)];
    if (soft === undefined || sharp === undefined) return undefined;
    const { centreMm, nominalMm } = stent;
    const texture = { soft: textureOf(noise.soft), sharp: textureOf(noise.sharp) };
    return { place: { centreMm, nominalMm }, plane, soft, sharp, texture };
  };

  const fitNow = (stent: NoteStent, both: PairVolumes, pair: PairState): void => {
    const noise = { soft: noiseNow('soft'), sharp: noiseNow('sharp') };
    if (isStillToCome(noise.soft) || isStillToCome(noise.sharp)) return;
    const key = keyOf(stent);
    const known = asked.get(key);
    const isSame = known?.volumes === both && known.noise[0] === noise.soft;
    if (known !== undefined && isSame && known.noise[1] === noise.sharp) {
      if (known.answer !== undefined && stent.fit === null) put(key, known.answer);
      return;
    }
    const refused = refusalOf(pair, both, stent, noise);
    if (refused !== undefined) {
      if (stent.fit === null) put(key, refused);
      return;
    }
    const made = request(stent, both, noise);
    if (made === undefined) return;
    if (!arePixelsThere(both.soft, made.soft) || !arePixelsThere(both.sharp, made.sharp)) return;
    const mine: Asked = { volumes: both, noise: [noise.soft, noise.sharp], answer: undefined };
    asked.set(key, mine);
    ask(made).then(
      (answer) => {
        if (answer === undefined || asked.get(key) !== mine || volumes() !== both) return;
        mine.answer = made.plane === undefined ? withWholeIndices(answer, made) : answer;
        put(key, mine.answer);
      },
      (error: unknown) => {
        const text = `The fit of ${stent.label} stopped working: ${String(error)}`;
        store.change('Warn', (state) => ({ ...state, message: { tone: 'warning', text } }));
      },
    );
  };

  /** Whether all slices of a part have come or are known not to come; asks for those that a volume has let go. */
  const arePixelsThere = (volume: Volume | undefined, { lacking }: PartOfStack): boolean => {
    if (volume === undefined) return false;
    const kernel: Kernel = volume === volumes()?.soft ? 'soft' : 'sharp';
    const waiting = lacking.filter((index) => !store.now().loading[kernel].gaps.has(index));
    for (const index of waiting) volume.ask(index);
    return waiting.length === 0;
  };

  const refresh = (): void => {
    const { note, pair } = store.now();
    const both = volumes();
    if (note === undefined || pair === undefined || both === undefined) return;
    // Of a verified note too: its numbers stay, and the curves are drawn.
    for (const stent of note.stents) fitNow(stent, both, pair);
  };

  const stop = store.watch((_name, after, before) => {
    if (after.note?.stents !== before.note?.stents && after.note !== undefined)
      queueMicrotask(refresh);
  });
  signal.addEventListener('abort', stop, { once: true });

  return {
    fitOf: (stent) => asked.get(keyOf(stent))?.answer,
    refresh,
    propose: (pointMm, planeId) => {
      const both = volumes();
      if (both === undefined) return undefined;
      if (planeId === undefined)
        return findStentCentre(pointMm, both.soft.stack, (_stack, index) => both.soft.slice(index));
      const plane = store.now().note?.planes.find(({ id }) => id === planeId);
      const cut = plane && cuts.of(plane);
      if (cut === undefined || !cut.ok) return cut;
      const { soft } = cut.value;
      return findStentCentre(pointMm, soft.stack, (_stack, index) => soft.storedOf(index));
    },
  };
}

/** What has no fit for a reason that needs no pixels: one stack alone, two without a common space, a place beyond them. */
function refusalOf(
  pair: PairState,
  both: PairVolumes,
  stent: NoteStent,
  noise: { readonly [K in Kernel]: NoiseOfStack },
): FitAnswer | undefined {
  const notOnSharp = pair.link === 'index' ? FLAGS.positionsNotComparable : undefined;
  if (both.sharp !== undefined && notOnSharp === undefined) {
    const isHere = [both.soft, both.sharp].every(
      (volume) => stackPart(volume, stent.centreMm, REACH_MM.slices) !== undefined,
    );
    return isHere ? undefined : { fit: { reason: NO_SLICE }, value: noStentValue(NO_SLICE) };
  }
  const value = fitOnGround(stent, {
    soft: both.soft.stack,
    sharp: both.sharp?.stack,
    storedOf: () => undefined,
    noise,
    notOnSharp,
    cuts: NO_CUTS,
  });
  const reason = value.reason ?? refuse('not-fitted', 'No stent was fitted.').refusal;
  return { fit: { reason }, value };
}

const NO_SLICE = {
  code: 'no-slice',
  text: 'No slice lies at the point on one of the stacks: choose another.',
} as const;

/** A reason that needs no pixels needs no cut either. */
const NO_CUTS: PlanCuts = {
  gridOf: () => refuse('no-cut', 'Nothing was cut.'),
  cutOf: () => refuse('no-cut', 'Nothing was cut.'),
  factsOf: () => undefined,
};

function isStillToCome(noise: NoiseOfStack): boolean {
  return noise === FLAGS.noStandardErrorYet;
}

function textureOf(noise: NoiseOfStack) {
  return 'code' in noise ? null : noise;
}

/** The slices of parts are counted from the first of the part; the note counts from the first of the stack. */
function withWholeIndices(
  { fit, value }: FitAnswer,
  parts: { readonly soft: PartOfStack; readonly sharp: PartOfStack },
): FitAnswer {
  const images = value.images.map((image) => ({
    ...image,
    sliceIndex: image.sliceIndex + parts[image.kernel].from,
  }));
  if (fit.reason !== undefined) return { fit, value: { ...value, images } };
  const kernels = fit.kernels.map((result, index) => {
    const { from } = index === 0 ? parts.soft : parts.sharp;
    const sliceIndex = result.residual.sliceIndex + from;
    return { ...result, residual: { ...result.residual, sliceIndex } };
  });
  return { fit: { ...fit, kernels }, value: { ...value, images } };
}

/** The worker, made when the first fit is asked for; undefined from it when the page goes. */
function createFitWorker(
  signal: AbortSignal,
): (request: FitRequest) => Promise<FitAnswer | undefined> {
  let remote: ReturnType<typeof wrap<FitWorker>> | undefined;
  return async (request) => {
    if (signal.aborted) return undefined;
    if (remote === undefined) {
      const worker = new Worker(new URL('../fitting/fit.worker.ts', import.meta.url), {
        type: 'module',
      });
      signal.addEventListener('abort', () => worker.terminate(), { once: true });
      remote = wrap<FitWorker>(worker);
    }
    return remote.fit(request);
  };
}

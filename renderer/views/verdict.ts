import { formatFixed } from '../../core/format/index.js';
import type { Evidence } from '../../core/note/index.js';
import { pairVerdict } from '../../core/pairing/index.js';
import type { MeasuredPair } from '../pairing/measuredPair.js';
import { doubtWords, sharpnessWords, shiftWords } from '../pairing/pairWords.js';
import type { VerdictProps } from '../panels/Verdict.js';
import { isWrongOrder } from '../services/assessment.js';
import type { Assessment, PairState } from '../state/appState.js';

/** What the hinge can do about the verdict. */
export interface VerdictActions {
  readonly onSwap: () => void;
  readonly onCancel: () => void;
  readonly onMeasure: () => void;
}

/** The verdict on the pair that is shown: by the files alone while it is being measured, then by all of the evidence. */
export function verdictOf(
  pair: PairState | undefined,
  assessment: Assessment,
  actions: VerdictActions,
): VerdictProps {
  if (pair === undefined) return { verdict: 'none', lines: [], evidence: [] };
  if (pair.sharp === undefined) return { verdict: 'single', lines: [], evidence: [] };
  const { evidence } = pair;
  const judged = pairVerdict(evidence, pair.overrides);
  const doubts = [
    ...(pair.link === 'index' ? ['Linked by slice number: positions can’t be compared.'] : []),
    ...reservationLine([...judged.refusedFor, ...judged.reservations]),
  ];
  const byOrder =
    pair.chosenBy === 'order' ? ['Soft and sharp by series order: please check.'] : [];
  switch (assessment.kind) {
    case 'done': {
      const { measured } = assessment;
      return {
        verdict: judged.verdict,
        lines: [...doubts, ...orderLines(pair, measured), ...summaryLines(pair, measured)],
        evidence,
        actions: isWrongOrder(pair, measured)
          ? [{ label: 'Swap soft and sharp', onClick: actions.onSwap }]
          : [],
      };
    }
    case 'failed':
      return {
        verdict: judged.verdict,
        lines: [assessment.text, ...doubts, ...byOrder],
        evidence,
        actions: [{ label: 'Measure the pair', onClick: actions.onMeasure }],
      };
    default: {
      const isRunning = assessment.kind === 'running';
      const read = isRunning ? assessment.progress.done : 0;
      return {
        verdict: 'measuring',
        lines: [
          ...(judged.verdict === 'pair' ? ['One acquisition by the files.'] : doubts),
          ...byOrder,
          ...(read === 0 ? [] : [`${read} slices looked at`]),
        ],
        evidence,
        actions: isRunning ? [{ label: 'Cancel', onClick: actions.onCancel }] : [],
      };
    }
  }
}

/** 'thickness differs · phase unknown': what the reader must know first. */
function reservationLine(reservations: readonly Evidence[]): readonly string[] {
  if (reservations.length === 0) return [];
  return [sentence(doubtWords(reservations))];
}

/** Which is the sharper, where the measure contradicts the plates or can't tell. */
function orderLines(pair: PairState, measured: MeasuredPair): readonly string[] {
  if (isWrongOrder(pair, measured)) {
    return ['By the measure the other one is the sharper: soft and sharp look swapped.'];
  }
  if (measured.measuredSharpKey !== undefined) return [];
  return [`Which is the sharper was not told: ${measured.sharpness.text}.`];
}

/** 'same phase 75 % · same frame · shift 0.02 mm' and 'noise 6.1 → 26.9 HU · texture 0.21 → 0.47 /mm'. */
function summaryLines(pair: PairState, { sharpness, shift }: MeasuredPair): readonly string[] {
  const agrees = (check: string): boolean =>
    pair.evidence.some((one) => one.check === check && one.state === 'agrees');
  const { phasePercent } = pair.soft.slices[0].image.acquisition;
  const phase = phasePercent === undefined ? '' : ` ${formatFixed(phasePercent, 0)} %`;
  const same = [
    ...(agrees('phase') ? [`same phase${phase}`] : []),
    ...(agrees('frame of reference') ? ['same frame'] : []),
    shiftWords(shift) ?? [],
  ].flat();
  return [same, sharpnessWords(sharpness)]
    .filter((parts) => parts.length > 0)
    .map((parts) => parts.join(' · '));
}

function sentence(text: string): string {
  return `${text.charAt(0).toUpperCase()}${text.slice(1)}.`;
}

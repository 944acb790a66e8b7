import { useEffect, useState } from 'preact/hooks';
import type { PairOverride } from '../../core/note/index.js';
import { headerEvidence, pairVerdict } from '../../core/pairing/index.js';
import type { Stack } from '../../core/stack/index.js';
import { ChoosePair, type PairChoice, type ProposedPair } from '../dialogs/ChoosePair.js';
import { stackName } from '../dialogs/stackLists.js';
import { useEngine } from '../engine.js';
import type { Proposal } from '../pairing/proposal.js';
import type { VerdictProps } from '../panels/Verdict.js';
import { useSelected } from './useSelected.js';

/** The dialog that chooses the pair; it looks for pairs as it opens, where nothing has yet. */
export function ChoosePairView({ onClose }: { readonly onClose: () => void }) {
  const { store, bench } = useEngine();
  const { index, pair } = store.now();
  const proposals = useSelected((state) => state.proposals);
  const progress = useSelected((state) => state.job);
  const count = index?.stacks.length ?? 0;
  // Not asked for again when the reader gave it up: the button is there for that.
  useEffect(() => {
    if (proposals !== undefined || count < 2) return undefined;
    const looking = new AbortController();
    void bench.proposePairs(looking.signal);
    return () => looking.abort();
  }, []);
  const [chosen, setChoice] = useState<PairChoice | undefined>(
    pair && { softKey: pair.soft.key, sharpKey: pair.sharp?.key },
  );
  const [reasons, setReasons] = useState<Readonly<Record<string, string>>>(() =>
    Object.fromEntries((pair?.overrides ?? []).map(({ check, reason }) => [check, reason])),
  );
  const stacks = index?.stacks ?? [];
  // With nothing on the plates the best proposal is ready: Enter takes it.
  const choice = chosen ?? proposals?.find(({ verdict }) => verdict !== 'refused');
  const soft = stackByKey(stacks, choice?.softKey);
  const sharp = stackByKey(stacks, choice?.sharpKey);
  const overrides = overridesOf(reasons);
  const preview = previewOf(soft, sharp, overrides);
  return (
    <ChoosePair
      stacks={stacks}
      choice={choice}
      preview={preview}
      allowed={preview?.verdict !== 'refused'}
      proposals={proposals?.map((one) => proposedPair(one, stacks))}
      needsReason={
        soft && sharp ? headerEvidence(soft, sharp).needsReason.map(({ check }) => check) : []
      }
      reasons={reasons}
      onReason={(check, reason) => setReasons({ ...reasons, [check]: reason })}
      progress={progress}
      onCancel={bench.cancelJob}
      onPropose={() => {
        void bench.proposePairs();
      }}
      onChange={setChoice}
      onConfirm={() => {
        onClose();
        if (soft !== undefined)
          void bench.choosePair(soft, sharp, overridesFor(soft, sharp, overrides));
      }}
      onClose={onClose}
    />
  );
}

function stackByKey(stacks: readonly Stack[], key: string | undefined): Stack | undefined {
  return stacks.find((stack) => stack.key === key);
}

/** What the files say of the choice; what is measured comes when it is on the plates. */
function previewOf(
  soft: Stack | undefined,
  sharp: Stack | undefined,
  overrides: readonly PairOverride[],
): VerdictProps | undefined {
  if (soft === undefined) return undefined;
  if (sharp === undefined) return { verdict: 'single', lines: [], evidence: [] };
  const { evidence, refusal, needsReason } = headerEvidence(soft, sharp, overrides);
  const missing = needsReason.map(({ check }) => `The ${check} differs: this needs a reason.`);
  return {
    verdict: refusal === undefined ? pairVerdict(evidence, overrides).verdict : 'refused',
    lines: refusal === undefined ? missing : [refusal],
    evidence,
  };
}

const OVERRIDABLE = ['study', 'frame of reference'] as const;

function overridesOf(reasons: Readonly<Record<string, string>>): readonly PairOverride[] {
  return OVERRIDABLE.flatMap((check) => {
    const reason = reasons[check]?.trim() ?? '';
    return reason === '' ? [] : [{ check, reason }];
  });
}

/** Only the reasons that this pair needs: one that was typed for another choice is none of its. */
function overridesFor(
  soft: Stack,
  sharp: Stack | undefined,
  overrides: readonly PairOverride[],
): readonly PairOverride[] {
  if (sharp === undefined) return [];
  const needed = headerEvidence(soft, sharp).needsReason;
  return overrides.filter((one) => needed.some(({ check }) => check === one.check));
}

function proposedPair(proposal: Proposal, stacks: readonly Stack[]): ProposedPair {
  const [soft, sharp] = [proposal.softKey, proposal.sharpKey].map((key) => stackByKey(stacks, key));
  const name = [soft, sharp].map((stack) => (stack === undefined ? '?' : stackName(stack)));
  return { ...proposal, name: name.join('  +  ') };
}

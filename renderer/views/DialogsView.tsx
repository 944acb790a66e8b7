import { useEffect, useState } from 'preact/hooks';
import { COMMANDS } from '../../core/commands/index.js';
import { addContrast, type ContrastParts, type PairOverride } from '../../core/note/index.js';
import { headerEvidence, pairVerdict } from '../../core/pairing/index.js';
import type { Stack } from '../../core/stack/index.js';
import { Cautions } from '../dialogs/Cautions.js';
import { ChoosePair, type PairChoice, type ProposedPair } from '../dialogs/ChoosePair.js';
import { Contents } from '../dialogs/Contents.js';
import { Keys } from '../dialogs/Keys.js';
import { NewContrast } from '../dialogs/NewContrast.js';
import { Numbers } from '../dialogs/Numbers.js';
import { OpenFolder } from '../dialogs/OpenFolder.js';
import { SettingsDialog } from '../dialogs/SettingsDialog.js';
import { stackName } from '../dialogs/stackLists.js';
import { useEngine } from '../engine.js';
import type { Proposal } from '../pairing/proposal.js';
import type { VerdictProps } from '../panels/Verdict.js';
import { changeSettings } from '../services/start.js';
import { editNote } from '../state/history.js';
import { keyNames } from './keyNames.js';
import { useSelected } from './useSelected.js';

/** The dialog that is open, if any. */
export function DialogsView() {
  const engine = useEngine();
  const dialog = useSelected((state) => state.dialog);
  const settings = useSelected((state) => state.settings);
  // Before they are accepted the cautions stand before everything else; without a version nothing is known yet.
  const mustAccept = useSelected(
    (state) => state.version !== '' && !state.settings.cautionsAccepted,
  );
  const close = () =>
    engine.store.change('Close dialog', (state) => ({ ...state, dialog: undefined }));
  switch (mustAccept ? 'cautions' : dialog) {
    case undefined:
      return null;
    case 'openFolder':
      return <OpenFolderView />;
    case 'contents':
      return <ContentsView onClose={close} />;
    case 'choosePair':
      return <ChoosePairView onClose={close} />;
    case 'newContrast':
      return <NewContrastView onClose={close} />;
    case 'settings':
      return (
        <SettingsDialog
          settings={settings}
          onChange={(change) => void changeSettings(engine, change)}
          onClose={close}
        />
      );
    case 'cautions':
      return (
        <Cautions
          accepted={settings.cautionsAccepted}
          onAccept={() => {
            if (dialog === 'cautions') close();
            void changeSettings(engine, { cautionsAccepted: true });
          }}
          onClose={close}
        />
      );
    case 'keys':
      return (
        <Keys
          commands={COMMANDS}
          keyNames={keyNames()}
          letterKeys={settings.letterKeys}
          onClose={close}
        />
      );
    case 'numbers':
      return <Numbers onClose={close} />;
  }
}

interface ClosableProps {
  readonly onClose: () => void;
}

function OpenFolderView() {
  const { folderDialog, bench } = useEngine();
  const { level, problem } = folderDialog.state.value;
  const recent = useSelected((state) => state.recent);
  const progress = useSelected((state) => state.job);
  return (
    <OpenFolder
      level={level}
      recent={recent}
      progress={progress}
      problem={problem}
      onEnter={folderDialog.enter}
      onChoose={folderDialog.choose}
      onRecent={(id) => {
        void folderDialog.openRecent(id).then((folder) => folder && bench.openFolder(folder));
      }}
      onForget={folderDialog.forget}
      onDemonstration={() => {
        folderDialog.close();
        void bench.openDemonstration();
      }}
      onCancel={bench.cancelJob}
      onClose={folderDialog.close}
    />
  );
}

function ContentsView({ onClose }: ClosableProps) {
  const { store } = useEngine();
  const { index, folder, pair } = store.now();
  if (index === undefined || folder === undefined) return null;
  return (
    <Contents
      index={index}
      folderName={folder.name}
      softKey={pair?.soft.key}
      sharpKey={pair?.sharp?.key}
      onChoosePair={() =>
        store.change('Open dialog', (state) => ({ ...state, dialog: 'choosePair' }))
      }
      onClose={onClose}
    />
  );
}

function ChoosePairView({ onClose }: ClosableProps) {
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

function NewContrastView({ onClose }: ClosableProps) {
  const { store, now } = useEngine();
  const [problem, setProblem] = useState<string>();
  const { note, selected } = store.now();
  if (note === undefined) return null;
  const create = (parts: ContrastParts): void => {
    const added = addContrast(note, parts, now());
    if (!added.ok) {
      setProblem(added.refusal.text);
      return;
    }
    const { note: after } = added.value;
    store.change(
      'New contrast',
      editNote('New contrast', () => after),
    );
    onClose();
  };
  return (
    <NewContrast
      regions={note.regions}
      noise={note.noise}
      selectedId={selected}
      problem={problem}
      onCreate={create}
      onClose={onClose}
    />
  );
}

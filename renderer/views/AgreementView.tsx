import { useEffect, useState } from 'preact/hooks';
import type { ListedNote } from '../../app/host/contract.js';
import {
  type Compared,
  type Kernel,
  type Note,
  parseNote,
  type ReadingPair,
  readingsOfNotes,
  readingsOfRepeat,
  readJson,
} from '../../core/note/index.js';
import { AgreementDialog } from '../dialogs/AgreementDialog.js';
import { useEngine } from '../engine.js';
import { useSelected } from './useSelected.js';

const NONE = 'none';
const FILE = 'file';

/** Agreement of the note's first reading with a repeat of it, with another reader's note, or with one from a file. */
export function AgreementView({ onClose }: { readonly onClose: () => void }) {
  const { client, signal } = useEngine();
  const note = useSelected((state) => state.note);
  const finished = note?.repeats.filter(({ finishedAt }) => finishedAt !== null) ?? [];
  const [others, setOthers] = useState<readonly ListedNote[]>([]);
  const [other, setOther] = useState<Note>();
  const [chosen, setChosen] = useState<string>(finished.at(-1)?.id ?? NONE);
  const [kernel, setKernel] = useState<Kernel>('soft');
  const [compared, setCompared] = useState<Compared>('meanHu');
  const [problem, setProblem] = useState<string>();
  const study = note?.study.studyInstanceUid;
  useEffect(() => {
    if (study === undefined) return;
    void client.listNotes(study, signal).then((listed) => {
      if (listed.ok) setOthers(listed.value.filter(({ reader }) => reader !== note?.reader));
      else setProblem(listed.refusal.text);
    });
  }, [study]);
  if (note === undefined || study === undefined) return null;

  const choose = async (id: string): Promise<void> => {
    setChosen(id);
    setProblem(undefined);
    const reader = others.find((one) => readerId(one) === id)?.reader;
    if (reader === undefined) return;
    setOther(undefined);
    const read = await client.readNoteOf(study, reader, signal);
    if (!read.ok) setProblem(read.refusal.text);
    else if (read.value === undefined) setProblem('That note is not there any more.');
    else setOther(read.value.note);
  };
  const readFile = async (file: File): Promise<void> => {
    const json = readJson(await file.text());
    const parsed = json.ok ? parseNote(json.value) : json;
    if (!parsed.ok) return setProblem(parsed.refusal.text);
    if (parsed.value.study.studyInstanceUid !== study) {
      return setProblem('That note is of another study.');
    }
    setProblem(undefined);
    setOther(parsed.value);
    setChosen(FILE);
  };
  const repeat = finished.find(({ id }) => id === chosen);
  const readings: ReadingPair | undefined =
    repeat !== undefined
      ? readingsOfRepeat(note, repeat)
      : chosen !== NONE && other !== undefined
        ? readingsOfNotes(note, other)
        : undefined;
  return (
    <AgreementDialog
      comparisons={[
        { value: NONE, text: 'choose…' },
        ...finished.map(({ id, reader }) => ({
          value: id,
          text: `repeat ${id}${reader === '' ? '' : ` by ${reader}`}`,
        })),
        ...others.map((one) => ({
          value: readerId(one),
          text: `note of ${one.reader === '' ? 'an unnamed reader' : one.reader}, ${one.regions} regions`,
        })),
        ...(chosen === FILE ? [{ value: FILE, text: `note file of ${other?.reader ?? ''}` }] : []),
      ]}
      chosen={chosen}
      readings={readings}
      kernel={kernel}
      compared={compared}
      problem={problem}
      onChoose={(id) => void choose(id)}
      onKernel={setKernel}
      onCompared={setCompared}
      onFile={(file) => void readFile(file)}
      onClose={onClose}
    />
  );
}

function readerId({ reader }: ListedNote): string {
  return `reader ${reader}`;
}

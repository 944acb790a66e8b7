import { useRef, useState } from 'preact/hooks';
import { ExportDialog } from '../dialogs/ExportDialog.js';
import { useEngine } from '../engine.js';
import { type ExportChoice, makeExport } from '../services/exporting.js';
import { useSelected } from './useSelected.js';

/** The export dialog: makes the file, and hands it to the shell to be saved. */
export function ExportView({ onClose }: { readonly onClose: () => void }) {
  const { store, bench, client, shell, now, signal } = useEngine();
  const note = useSelected((state) => state.note);
  const [progress, setProgress] = useState<string>();
  const [message, setMessage] = useState<string>();
  const running = useRef(new AbortController());
  if (note === undefined) return null;

  const run = async (choice: ExportChoice): Promise<void> => {
    running.current = new AbortController();
    setMessage(undefined);
    setProgress('Making the export');
    const made = await makeExport(note, choice, {
      store,
      source: bench,
      client,
      now,
      onProgress: setProgress,
      signal: AbortSignal.any([running.current.signal, signal]),
    });
    setProgress(undefined);
    if (!made.ok) return setMessage(made.refusal.text);
    const { name, bytes } = made.value;
    const saved = await shell.saveFile(name, bytes);
    setMessage(saved ? `Exported as ${name}.` : 'Nothing was exported.');
  };
  return (
    <ExportDialog
      patientId={note.study.patientId}
      verified={note.verification === 'VERIFIED'}
      progress={progress}
      message={message}
      onExport={(choice) => void run(choice)}
      onCancel={() => running.current.abort()}
      onClose={() => {
        running.current.abort();
        onClose();
      }}
    />
  );
}

import { useEffect, useState } from 'preact/hooks';
import type { Note, NoteRegion } from '../../core/note/index.js';
import { encodePng, type Raster } from '../../core/raster/index.js';
import { readoutLines } from '../../core/report/keyImage/index.js';
import { KeyImage } from '../dialogs/KeyImage.js';
import { useEngine } from '../engine.js';
import { drawKeyImage } from '../services/keyImages.js';
import { selectedRegion } from '../state/regionSelectors.js';

/** The key image of the selected region, drawn when the dialog opens. */
export function KeyImageView({ onClose }: { readonly onClose: () => void }) {
  const { store, bench, shell, signal } = useEngine();
  const [picture, setPicture] = useState<Raster>();
  const [problem, setProblem] = useState<string>();
  const { note } = store.now();
  const region = selectedRegion(store.now());
  useEffect(() => {
    const mine = new AbortController();
    const life = AbortSignal.any([mine.signal, signal]);
    if (note !== undefined && region !== undefined) {
      void drawKeyImage(store, bench, note, region, life).then((drawn) => {
        if (!mine.signal.aborted) setPicture(drawn);
      });
    }
    return () => mine.abort();
  }, []);
  if (note === undefined || region === undefined) return null;
  const save = async (): Promise<void> => {
    if (picture === undefined) return;
    const saved = await shell.saveFile(`key-image-${region.id}.png`, encodePng(picture));
    setProblem(saved ? 'Saved.' : 'Nothing was saved.');
  };
  return (
    <KeyImage
      label={region.label}
      description={descriptionOf(note, region)}
      picture={picture}
      problem={problem}
      onSave={() => void save()}
      onClose={onClose}
    />
  );
}

function descriptionOf(note: Note, region: NoteRegion): string {
  const soft = readoutLines(note, region, 'soft').join(' ');
  const sharp =
    note.pair.sharp === null ? '' : ` Sharp: ${readoutLines(note, region, 'sharp').join(' ')}`;
  return `${region.label} on both kernels. Soft: ${soft}${sharp}`;
}

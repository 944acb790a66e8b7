import type { VoiWindow } from '../../dicom/index.js';
import { PRESETS } from '../../intensity/index.js';
import type { Note, NoteRegion } from '../../note/schema.js';

/**
 * The window of a region's key image: that for stent and calcium where its finding is one, else that for vessels. It
 * follows from the note alone, so that window, page and command line draw the same picture.
 */
export function keyWindow(note: Note, region: NoteRegion): VoiWindow {
  const finding = note.findings.find(({ id }) => id === region.findingId);
  const isBright = finding?.kind === 'stent' || finding?.kind === 'calcified plaque';
  const preset = PRESETS.find(({ id }) => id === (isBright ? 'stent' : 'vessel'));
  if (preset === undefined) throw new Error('there is no preset for key images');
  return preset.window;
}

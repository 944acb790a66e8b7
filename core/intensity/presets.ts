import type { CtImage, PixelEncoding, VoiTable, VoiWindow } from '../dicom/index.js';
import { formatFixed } from '../format/index.js';
import { rescaled } from './hounsfield.js';

/** A window of our own naming, in HU. */
export interface Preset {
  readonly id: 'vessel' | 'stent' | 'tissue' | 'lung';
  readonly title: string;
  readonly window: VoiWindow;
}

const preset = (id: Preset['id'], title: string, centre: number, width: number): Preset => ({
  id,
  title,
  window: { centre, width, function: 'LINEAR', explanation: title },
});

/** Common practice, no source: published widths differ, and low tube voltages need others. */
export const PRESETS: readonly Preset[] = [
  preset('vessel', 'Vessel', 300, 800),
  preset('stent', 'Stent and calcium', 300, 1500),
  preset('tissue', 'Soft tissue', 40, 400),
  preset('lung', 'Lung', -600, 1500),
];

const VESSEL: VoiWindow = { centre: 300, width: 800, function: 'LINEAR', explanation: 'Vessel' };

/** The window an image opens with: the file's first, or the vessel preset, or the full range when there are no HU. */
export function defaultWindow({ windows, pixels }: CtImage): VoiWindow {
  const [first] = windows;
  if (first !== undefined) return first;
  if (pixels.unit === 'HU') return VESSEL;
  const [low, high] = fullRange(pixels);
  // The window that takes x1 to black and x2 to white (PS3.3 C.11.2.1.2.1, notes).
  return {
    centre: (low + high + 1) / 2,
    width: Math.max(1, high - low + 1),
    function: 'LINEAR',
    explanation: 'Full range',
  };
}

/**
 * The file's window to be shown next: the one after that which is shown, round and round, the first when none of them
 * is shown.
 */
export function nextFileWindow(image: CtImage, shown: VoiWindow): VoiWindow {
  const { windows } = image;
  const at = windows.findIndex((one) => isSameWindow(one, shown));
  return windows[(at + 1) % windows.length] ?? defaultWindow(image);
}

/** True when both show the same, whatever they are called. */
export function isSameWindow(a: VoiWindow, b: VoiWindow): boolean {
  return (
    a.centre === b.centre &&
    a.width === b.width &&
    a.function === b.function &&
    isSameTable(a.table, b.table)
  );
}

function isSameTable(a: VoiTable | undefined, b: VoiTable | undefined): boolean {
  if (a === b) return true;
  if (a === undefined || b === undefined || a.length !== b.length) return false;
  return a.every(([input, level], index) => b[index]?.[0] === input && b[index]?.[1] === level);
}

/** A window in few words: 'C 300 W 1200', or the name of its table. Names come from the file: show them as text. */
export function windowWords({ centre, width, table, explanation }: VoiWindow): string {
  if (table !== undefined) return `LUT “${explanation ?? 'without name'}”`;
  return `C ${formatFixed(centre, 0)} W ${formatFixed(width, 0)}`;
}

/** Least and largest output of the Modality LUT: of its table, or of the rescaled ends of the stored range. */
function fullRange(pixels: PixelEncoding): readonly [number, number] {
  const { modalityLut, signed, bitsStored } = pixels;
  const lowest = signed ? -(2 ** (bitsStored - 1)) : 0;
  const ends = modalityLut?.values ?? [
    rescaled(lowest, pixels),
    rescaled(lowest + 2 ** bitsStored - 1, pixels),
  ];
  return ends.reduce<readonly [number, number]>(
    ([low, high], value) => [Math.min(low, value), Math.max(high, value)],
    [Infinity, -Infinity],
  );
}

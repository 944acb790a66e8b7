import type { CtImage, VoiWindow } from '../dicom/index.js';

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
  const slope = pixels.rescale?.slope ?? 1;
  const intercept = pixels.rescale?.intercept ?? 0;
  const lowest = pixels.signed ? -(2 ** (pixels.bitsStored - 1)) : 0;
  const levels = 2 ** pixels.bitsStored;
  return {
    centre: (lowest + levels / 2) * slope + intercept,
    width: Math.max(1, levels * Math.abs(slope)),
    function: 'LINEAR',
    explanation: 'Full range',
  };
}

import { formatFixed, formatQuantity, NO_VALUE } from '../../core/format/index.js';
import type { Kernel, NoteProfile, NoteProfileValue } from '../../core/note/index.js';
import type { NoiseTableCell, NoiseTableRow } from './noiseTableRows.js';

/** What a profile measured on both kernels. */
export function profileRows(profile: Pick<NoteProfile, Kernel>): readonly NoiseTableRow[] {
  const mm = (value: number | null): string => formatQuantity(value, 'lengthMm');
  const both = (text: (value: NoteProfileValue) => string): Pick<NoiseTableRow, Kernel> => ({
    soft: cellOf(profile.soft, text),
    sharp: cellOf(profile.sharp, text),
  });
  return [
    {
      name: 'Visible width',
      unit: 'mm',
      title:
        'Distance of the half-height points: between the struts, midway between a peak and the lumen’s level; of a lumen without struts, at half its height.',
      ...both(({ visibleWidthMm }) => mm(visibleWidthMm)),
    },
    {
      name: 'Strut peaks apart',
      unit: 'mm',
      title: 'Distance of the two strut peaks.',
      ...both(({ peakDistanceMm }) => mm(peakDistanceMm)),
    },
    {
      name: 'Strut width',
      unit: 'mm',
      title:
        'Full width of a strut at half its height, mean of both: mostly the blur of the kernel.',
      ...both(({ strutWidthMm }) => mm(strutWidthMm)),
    },
    {
      name: 'Narrowing',
      unit: '%',
      title:
        'Artificial lumen narrowing: 1 − visible width / nominal inner diameter. Type the nominal diameter above.',
      ...both(({ narrowing }) => formatFixed(narrowing === null ? null : 100 * narrowing, 0)),
    },
    {
      name: 'Edge rise 10–90 %',
      unit: 'mm',
      title: '10–90 % distance of the edge between lumen and strut, or lumen and surroundings.',
      ...both(({ riseMm }) => mm(riseMm)),
    },
    {
      name: 'Lumen level',
      unit: 'HU',
      title:
        'Level between the struts: median of the middle third of the line. Struts bloom into it; a fitted stent takes that away.',
      ...both(({ lumenHu }) => formatQuantity(lumenHu, 'hu')),
    },
  ];
}

function cellOf(
  value: NoteProfileValue | null,
  text: (value: NoteProfileValue) => string,
): NoiseTableCell {
  if (value === null) return { text: NO_VALUE, reason: 'Not measured on this kernel.' };
  const shown = text(value);
  const reason = value.flags.map((flag) => flag.text).join(' ');
  return { text: shown, reason: shown === NO_VALUE ? reason : '' };
}

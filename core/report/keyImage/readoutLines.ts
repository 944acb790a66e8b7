import { formatFixed, formatQuantity } from '../../format/index.js';
import type { Kernel, Note, NoteRegion } from '../../note/schema.js';
import { isQuiet } from '../../region/index.js';

/** What stands under a plate of a key image: the numbers of the region there, where they are from, and their flags. */
export function readoutLines(note: Note, region: NoteRegion, kernel: Kernel): readonly string[] {
  const value = region[kernel];
  const stack = note.pair[kernel];
  if (value === null || stack === null) return ['Not measured on this kernel.'];
  const hu = (number: number | null): string => formatQuantity(number, 'hu');
  const unit = stack.unit;
  const error = value.standardErrorHu === null ? '' : ` (SE ${hu(value.standardErrorHu)})`;
  const slice =
    value.sliceIndex === null ? 'on no slice' : `slice ${value.sliceIndex + 1} of ${stack.slices}`;
  const spoken = value.flags.filter((flag) => !isQuiet(flag));
  return [
    `Mean ${hu(value.meanHu)}${error} ${unit} · SD ${hu(value.sdHu)} · SNR ${formatQuantity(value.snr, 'ratio')}`,
    `${formatFixed(value.n, 0)} pixels · ${formatQuantity(value.areaMm2, 'areaMm2')} mm² · ${slice}`,
    ...spoken.slice(0, 2).map(({ text }) => text),
    ...(spoken.length > 2 ? [`and ${spoken.length - 2} more remarks in the table`] : []),
  ];
}

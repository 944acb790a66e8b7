import type { VoiTable, VoiWindow } from '../dicom/index.js';

/**
 * Display value 0 … 255, not rounded, of a Modality LUT output x through a window, exactly as PS3.3 states:
 * LINEAR C.11.2.1.2.1, SIGMOID C.11.2.1.3.1, LINEAR_EXACT C.11.2.1.3.2; or through its table, C.11.2.1.1.
 */
export function windowed(x: number, window: VoiWindow): number {
  const { centre: c, width: w, table } = window;
  if (table !== undefined) return levelOf(x, table);
  switch (window.function) {
    case 'LINEAR':
      if (x <= c - 0.5 - (w - 1) / 2) return 0;
      if (x > c - 0.5 + (w - 1) / 2) return 255;
      return ((x - (c - 0.5)) / (w - 1) + 0.5) * 255;
    case 'LINEAR_EXACT':
      if (x <= c - w / 2) return 0;
      if (x > c + w / 2) return 255;
      return ((x - c) / w + 0.5) * 255;
    case 'SIGMOID':
      return 255 / (1 + Math.exp((-4 * (x - c)) / w));
  }
}

/** The level of the last step at or before x, a table's inputs being whole numbers; of the first where x is before all. */
function levelOf(x: number, table: VoiTable): number {
  const input = Math.round(x);
  let low = 0;
  let high = table.length - 1;
  while (low < high) {
    const middle = (low + high + 1) >> 1;
    if ((table[middle]?.[0] ?? Infinity) <= input) low = middle;
    else high = middle - 1;
  }
  return table[low]?.[1] ?? 0;
}

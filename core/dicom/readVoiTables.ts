import type { Finding } from '../result.js';
import type { Attributes } from './attributes.js';
import type { VoiTable, VoiWindow } from './ctImage.js';
import { type LookupTable, readLookupTable } from './readLookupTable.js';

/** Tables that are looked at: files have one or a few. */
const MOST_TABLES = 16;

/** A table whose grey changes more often than this shows noise; the index carries every step of every slice. */
const MOST_STEPS = 4096;

/**
 * The tables of a VOI LUT Sequence (PS3.3 C.11.2.1.1), for display. One that can't be used is left out, with a finding.
 *
 * @param signed the Modality LUT's output can be negative: then the first input is a signed number
 */
export function readVoiTables(
  attributes: Attributes,
  signed: boolean,
): { windows: readonly VoiWindow[]; findings: readonly Finding[] } {
  const windows: VoiWindow[] = [];
  const findings: Finding[] = [];
  const items = attributes.items('x00283010')?.slice(0, MOST_TABLES) ?? [];
  items.forEach((item, index) => {
    const read = readLookupTable(item, signed);
    const table = read && stepsOf(read);
    if (read === undefined || table === undefined) {
      findings.push({
        code: 'bad-voi-lut',
        text: `Lookup table ${index + 1} for display can’t be used: its descriptor and its data do not make a table of grey levels.`,
      });
      return;
    }
    windows.push({
      // The window that takes the first input to black and the last to white (PS3.3 C.11.2.1.2.1, notes).
      centre: read.firstInput + read.values.length / 2,
      width: read.values.length,
      function: 'LINEAR',
      explanation: item.text('x00283003') ?? `Table ${index + 1}`,
      table,
    });
  });
  return { windows, findings };
}

/** Values run from 0 to 2ⁿ − 1, n bits each; undefined where they do not. */
function stepsOf({ firstInput, bits, values }: LookupTable): VoiTable | undefined {
  if (bits < 1 || bits > 16) return undefined;
  const most = 2 ** bits - 1;
  const steps: (readonly [number, number])[] = [];
  let before: number | undefined;
  for (const [index, value] of values.entries()) {
    if (value > most) return undefined;
    const level = Math.round((value / most) * 255);
    if (level !== before) steps.push([firstInput + index, level]);
    before = level;
  }
  return steps.length > MOST_STEPS ? undefined : steps;
}

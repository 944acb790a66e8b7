import type { Finding } from '../result.js';
import type { Attributes } from './attributes.js';
import type { PixelEncoding, VoiFunction, VoiWindow } from './ctImage.js';
import { readVoiTables } from './readVoiTables.js';

const FUNCTIONS: readonly VoiFunction[] = ['LINEAR', 'LINEAR_EXACT', 'SIGMOID'];

/**
 * The windows of a file, first one first (PS3.3 C.11.2.1.2), then its lookup tables (C.11.2.1.1); the standard leaves
 * the choice to the reader. A window that its function does not allow (LINEAR needs a width of at least 1, the others
 * one above 0) is left out with a finding.
 */
export function readWindows(
  attributes: Attributes,
  pixels: PixelEncoding,
): {
  windows: readonly VoiWindow[];
  findings: readonly Finding[];
} {
  const centres = attributes.decimals('x00281050') ?? [];
  const widths = attributes.decimals('x00281051') ?? [];
  const explanations = attributes.texts('x00281055') ?? [];
  const named = attributes.text('x00281056') ?? 'LINEAR';
  const findings: Finding[] = [];
  const voiFunction = FUNCTIONS.find((known) => known === named);
  if (voiFunction === undefined) {
    findings.push({
      code: 'unknown-window-function',
      text: `The window function “${named}” is not known; LINEAR is used.`,
    });
  }
  const windows: VoiWindow[] = [];
  for (let index = 0; index < Math.max(centres.length, widths.length); index++) {
    const centre = centres[index];
    const width = widths[index];
    const least = (voiFunction ?? 'LINEAR') === 'LINEAR' ? 1 : Number.MIN_VALUE;
    if (centre === undefined || width === undefined || width < least) {
      findings.push({
        code: 'bad-window',
        text: `Window ${index + 1} of the file can't be used: centre ${centre ?? 'missing'}, width ${width ?? 'missing'}.`,
      });
      continue;
    }
    const explanation = explanations[index];
    windows.push({
      centre,
      width,
      function: voiFunction ?? 'LINEAR',
      ...(explanation && { explanation }),
    });
  }
  const tables = readVoiTables(attributes, hasSignedOutput(pixels));
  return {
    windows: [...windows, ...tables.windows],
    findings: [...findings, ...tables.findings],
  };
}

/**
 * Whether what enters a table can be negative (PS3.3 C.11.2.1.1): HU always can; a rescale where an end of the stored
 * range comes out so; a Modality LUT never; without either, signed pixels.
 */
function hasSignedOutput({
  unit,
  rescale,
  modalityLut,
  signed,
  bitsStored,
}: PixelEncoding): boolean {
  if (unit === 'HU') return true;
  if (rescale === undefined) return modalityLut === undefined && signed;
  const low = signed ? -(2 ** (bitsStored - 1)) : 0;
  return [low, low + 2 ** bitsStored - 1].some(
    (stored) => stored * rescale.slope + rescale.intercept < 0,
  );
}

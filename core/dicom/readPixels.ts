import { type Finding, type Result, refuse, success } from '../result.js';
import type { Attributes } from './attributes.js';
import type { PixelEncoding } from './ctImage.js';
import { readModalityLut } from './readModalityLut.js';

/** How pixels are stored and what they mean, with what is odd about it. */
export interface PixelsReading {
  readonly pixels: PixelEncoding;
  readonly findings: readonly Finding[];
}

/** How the pixels of a CT slice are stored (PS3.3 C.7.6.3) and what they mean (C.11.1, C.7.5.1.1.2). */
export function readPixels(attributes: Attributes): Result<PixelsReading> {
  const isFloat = attributes.has('x7fe00008') || attributes.has('x7fe00009');
  if (isFloat) {
    return refuse('float-pixels', 'Not a CT slice: its pixels are floating-point numbers.', {
      tag: attributes.has('x7fe00008') ? '(7FE0,0008)' : '(7FE0,0009)',
    });
  }
  const samples = attributes.unsignedShort('x00280002') ?? 1;
  const bitsAllocated = attributes.unsignedShort('x00280100');
  const photometric = attributes.text('x00280004') ?? '';
  if (samples !== 1 || bitsAllocated !== 16 || !isGrey(photometric)) {
    return refuse(
      'not-a-ct-slice',
      `Not a CT slice: ${samples} sample(s) of ${bitsAllocated ?? 'unknown'} bits, ${photometric || 'no photometric interpretation'}.`,
    );
  }
  const bitsStored = attributes.unsignedShort('x00280101') ?? 16;
  const highBit = attributes.unsignedShort('x00280102') ?? bitsStored - 1;
  if (bitsStored < 1 || bitsStored > 16 || highBit > 15 || highBit < bitsStored - 1) {
    return refuse(
      'bad-pixel-encoding',
      `The pixels can't be read: ${bitsStored} bits stored with high bit ${highBit} do not fit into 16.`,
      { tag: '(0028,0101)' },
    );
  }
  const representation = attributes.unsignedShort('x00280103');
  if (representation !== 0 && representation !== 1) {
    return refuse(
      'bad-pixel-encoding',
      'The pixels can’t be read: Pixel Representation is missing.',
      {
        tag: '(0028,0103)',
      },
    );
  }
  const signed = representation === 1;
  const meaning = readRescale(attributes, signed);
  const padding = readPadding(attributes, signed);
  return success({
    pixels: {
      bitsAllocated,
      bitsStored,
      highBit,
      signed,
      photometric,
      ...meaning.encoding,
      ...(padding && { padding }),
    },
    findings: meaning.findings,
  });
}

function isGrey(photometric: string): photometric is PixelEncoding['photometric'] {
  return photometric === 'MONOCHROME1' || photometric === 'MONOCHROME2';
}

/** Rescale Slope and Intercept. An absent Rescale Type on a CT image means HU (PS3.3 C.8.2.1). */
function readRescale(
  attributes: Attributes,
  signed: boolean,
): {
  encoding: Pick<PixelEncoding, 'rescale' | 'modalityLut' | 'unit'>;
  findings: readonly Finding[];
} {
  const stored = (code: string, text: string) => ({
    encoding: { unit: 'stored' },
    findings: [{ code, text }],
  });
  if (attributes.has('x00283000')) {
    const modalityLut = readModalityLut(attributes, signed);
    const shown = modalityLut === undefined ? 'it can’t be read' : 'the image is shown through it';
    const text = `A Modality LUT stands in place of slope and intercept; ${shown}: no HU.`;
    return {
      encoding: { unit: 'stored', ...(modalityLut && { modalityLut }) },
      findings: [{ code: 'modality-lut', text }],
    };
  }
  const slope = attributes.decimal('x00281053');
  const intercept = attributes.decimal('x00281052');
  const isNoNumber = (tag: string, value: number | undefined) =>
    value === undefined && attributes.has(tag);
  if (isNoNumber('x00281053', slope) || isNoNumber('x00281052', intercept)) {
    return stored('bad-rescale', 'Rescale Slope or Intercept is no number: no HU.');
  }
  if (slope === undefined || intercept === undefined) {
    return stored(
      'no-rescale',
      'Rescale Slope or Intercept is missing: stored values only, no HU.',
    );
  }
  if (slope === 0) return stored('bad-rescale', 'Rescale Slope is zero: no HU.');
  const type = attributes.text('x00281054') ?? 'HU';
  return {
    encoding: { rescale: { slope, intercept }, unit: type },
    findings:
      type === 'HU'
        ? []
        : [{ code: 'not-hu', text: `The file gives its values in “${type}”, not in HU.` }],
  };
}

/** Pixel Padding Value, with Range Limit where there is one: an inclusive range of stored values, in either order. */
function readPadding(
  attributes: Attributes,
  signed: boolean,
): { low: number; high: number } | undefined {
  const read = signed ? attributes.signedShort : attributes.unsignedShort;
  const value = read('x00280120');
  if (value === undefined) return undefined;
  const limit = read('x00280121') ?? value;
  return { low: Math.min(value, limit), high: Math.max(value, limit) };
}

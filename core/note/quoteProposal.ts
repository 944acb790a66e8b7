import { FLAGS, type Flag, type RegionValue } from '../region/index.js';
import type { NoteEdge } from './edgeSchema.js';
import type { NoteProfile } from './profileSchema.js';
import type { Quoted } from './quoteSchema.js';
import type { Note, NoteRegion } from './schema.js';

/** Which kernel's value to quote, and why. */
export interface QuoteProposal {
  readonly quote: Quoted['quote'];
  /** Sentences of the program alone: nothing that a file or a reader wrote stands in them. */
  readonly reason: string;
}

/** Edges within one blur, by their flag; a strut before calcium before air. */
const NEAR: readonly (readonly [code: string, name: string])[] = [
  ['near-strut', 'A strut'],
  ['near-calcium', 'Calcium or bone'],
  ['near-air', 'Air'],
];

/** Why a kernel has no value. */
const ABSENCES: Readonly<Record<string, string>> = {
  'not-hu': 'its pixels are not in HU',
  'slice-missing': 'its slice could not be read',
  'no-pixel-spacing': 'its files have no pixel spacing',
  'no-pixels': 'no pixel lies inside',
};

/**
 * Proposes which kernel's density to quote. Density is read on the soft kernel, which has less noise and is the one
 * that bands and thresholds were published for (sharper kernels shift it: Cademartiri 2007, PMC1914219); but a mean
 * that holds a strut's blooming is quoted on neither, and one that is near calcium or air only on a kernel that keeps
 * clear of it. An aid: the reader decides.
 */
export function quoteProposal(
  note: Pick<Note, 'findings'>,
  region: Pick<NoteRegion, 'soft' | 'sharp' | 'findingId'>,
): QuoteProposal {
  const has = (value: RegionValue | null): value is RegionValue =>
    value !== null && value.meanHu !== null;
  const [soft, sharp] = [region.soft, region.sharp].map((value) => (has(value) ? value : null));
  const inStent = note.findings.some(({ id, kind }) => id === region.findingId && kind === 'stent');
  const missing = {
    soft: `No value on the soft kernel${absence(region.soft?.flags)}.`,
    sharp: `No value on the sharp kernel${absence(region.sharp?.flags)}.`,
  };
  if (!soft && !sharp) return { quote: null, reason: `${missing.soft} ${missing.sharp}` };
  const first = soft ? 'soft' : 'sharp';
  const near = nearest((soft ?? sharp)?.flags);
  if (near !== undefined && inStent && near[0] === 'near-strut') {
    return {
      quote: 'neither',
      reason: `A strut lies within the ${first} kernel’s blur: use the fitted stent.`,
    };
  }
  if (!soft || !sharp) {
    const absent = soft ? missing.sharp : missing.soft;
    return near === undefined
      ? { quote: first, reason: `${absent} The ${first} one is quoted.` }
      : {
          quote: 'neither',
          reason: `${near[1]} lies within the ${first} kernel’s blur. ${absent}`,
        };
  }
  if (near === undefined) {
    return { quote: 'soft', reason: 'Density: the soft kernel has less noise and less shift.' };
  }
  const nearSharp = nearest(sharp.flags);
  if (nearSharp !== undefined) {
    return { quote: 'neither', reason: `${near[1]} lies within the blur of both kernels.` };
  }
  return sharp.flags.some(({ code }) => code === FLAGS.edgesNotSought.code)
    ? {
        quote: 'neither',
        reason: `${near[1]} lies within the soft kernel’s blur; whether within the sharp one’s is not known.`,
      }
    : {
        quote: 'sharp',
        reason: `${near[1]} lies within the soft kernel’s blur, and not within the sharp one’s.`,
      };
}

/** Proposes which kernel's width of an edge to quote: the sharp one's, which blurs it less, where it was measured. */
export function edgeQuote(edge: Pick<NoteEdge, 'soft' | 'sharp'>): QuoteProposal {
  const has = (kernel: 'soft' | 'sharp') => (edge[kernel]?.riseMm ?? null) !== null;
  if (has('sharp'))
    return { quote: 'sharp', reason: 'Edges and widths: the sharp kernel blurs less.' };
  return has('soft')
    ? { quote: 'soft', reason: 'No rise on the sharp kernel. The soft one is quoted.' }
    : { quote: null, reason: 'No rise on either kernel.' };
}

/** Proposes which kernel's visible width to quote, as for edges. */
export function profileQuote(profile: Pick<NoteProfile, 'soft' | 'sharp'>): QuoteProposal {
  const has = (kernel: 'soft' | 'sharp') => (profile[kernel]?.visibleWidthMm ?? null) !== null;
  if (has('sharp'))
    return { quote: 'sharp', reason: 'Edges and widths: the sharp kernel blurs less.' };
  return has('soft')
    ? { quote: 'soft', reason: 'No visible width on the sharp kernel. The soft one is quoted.' }
    : { quote: null, reason: 'No visible width on either kernel.' };
}

function nearest(flags: readonly Flag[] = []) {
  return NEAR.find(([near]) => flags.some(({ code }) => code === near));
}

function absence(flags: readonly Flag[] = []): string {
  const known = flags.map(({ code }) => ABSENCES[code]).find((text) => text !== undefined);
  return known === undefined ? '' : `: ${known}`;
}

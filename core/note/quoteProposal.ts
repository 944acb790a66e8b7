import type { RegionValue } from '../region/index.js';
import type { Note, NoteRegion } from './schema.js';

/** Which kernel's value to quote, and why. */
export interface QuoteProposal {
  readonly quote: NoteRegion['quote'];
  readonly reason: string;
}

/** Flags of an edge within one blur begin with this. */
const NEAR = 'near-';
const STRUT = 'near-strut';

/**
 * Proposes which kernel's density to quote. Density is read on the soft kernel, which has less noise and is the one
 * that bands and thresholds were published for (sharper kernels shift it: Cademartiri 2007, PMC1914219); but a mean
 * that holds a strut's blooming is quoted on neither, and one that is near calcium or air only on a kernel that keeps
 * clear of it. An aid: the reader decides.
 */
export function quoteProposal(note: Pick<Note, 'findings'>, region: NoteRegion): QuoteProposal {
  const { soft, sharp } = region;
  const has = (value: RegionValue | null): value is RegionValue =>
    value !== null && value.meanHu !== null;
  if (!has(soft) && !has(sharp)) return { quote: null, reason: 'Not measured on either kernel.' };
  if (!has(soft)) return { quote: 'sharp', reason: 'Measured on the sharp kernel alone.' };
  const inStent = note.findings.some(({ id, kind }) => id === region.findingId && kind === 'stent');
  if (inStent && isFlagged(soft, STRUT)) {
    return {
      quote: 'neither',
      reason: 'A strut lies within the soft kernel’s blur: use the fitted stent.',
    };
  }
  if (isFlagged(soft, NEAR)) {
    return has(sharp) && !isFlagged(sharp, NEAR)
      ? {
          quote: 'sharp',
          reason:
            'A strong edge lies within the soft kernel’s blur, and not within the sharp one’s.',
        }
      : { quote: 'neither', reason: 'A strong edge lies within the blur of both kernels.' };
  }
  if (!has(sharp)) return { quote: 'soft', reason: 'Measured on the soft kernel alone.' };
  return { quote: 'soft', reason: 'Density: the soft kernel has less noise and less shift.' };
}

/** Widths and edges are quoted on the sharp kernel, where it is there. */
export function edgeQuote(note: Note): QuoteProposal {
  return note.pair.sharp === null
    ? { quote: 'soft', reason: 'Measured on the soft kernel alone.' }
    : { quote: 'sharp', reason: 'Edges and widths: the sharp kernel blurs less.' };
}

/** What is in force for a region, and who says so. */
export interface QuoteInForce extends QuoteProposal {
  readonly by: 'proposal' | 'reader';
  /** The proposal, where the reader chose otherwise. */
  readonly instead?: QuoteProposal;
}

/** The reader's choice where there is one, else the proposal. */
export function quoteInForce(note: Note, region: NoteRegion): QuoteInForce {
  const proposal = quoteProposal(note, region);
  if (region.quoteBy === 'proposal') return { ...proposal, by: 'proposal' };
  return {
    quote: region.quote,
    reason: region.quoteReason,
    by: 'reader',
    ...(proposal.quote === region.quote ? {} : { instead: proposal }),
  };
}

/** Regions whose proposal is in force, with the proposal of now. */
export function withProposedQuotes(note: Note): Note['regions'] {
  const regions = note.regions.map((region) => {
    if (region.quoteBy === 'reader') return region;
    const { quote, reason } = quoteProposal(note, region);
    return region.quote === quote && region.quoteReason === reason
      ? region
      : { ...region, quote, quoteReason: reason };
  });
  return regions.every((region, index) => region === note.regions[index]) ? note.regions : regions;
}

function isFlagged({ flags }: RegionValue, prefix: string): boolean {
  return flags.some(({ code }) => code.startsWith(prefix));
}

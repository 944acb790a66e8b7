import type { NoteEdge } from './edgeSchema.js';
import type { NoteProfile } from './profileSchema.js';
import { edgeQuote, profileQuote, type QuoteProposal, quoteProposal } from './quoteProposal.js';
import type { Quoted } from './quoteSchema.js';
import type { Note, NoteRegion } from './schema.js';

/** What is in force for a measurement, and who says so. */
export interface QuoteInForce extends QuoteProposal {
  readonly by: Quoted['quoteBy'];
  /** What the rules propose now, where the reader chose otherwise. */
  readonly instead?: QuoteProposal;
}

/** The reader's choice where there is one, else the proposal. */
export function quoteInForce(
  { quote, quoteReason, quoteBy }: Quoted,
  proposal: QuoteProposal,
): QuoteInForce {
  return {
    quote,
    reason: quoteReason,
    by: quoteBy,
    ...(quoteBy === 'proposal' || proposal.quote === quote ? {} : { instead: proposal }),
  };
}

/** What is in force for a region of the note. */
export function regionQuote(note: Pick<Note, 'findings'>, region: NoteRegion): QuoteInForce {
  return quoteInForce(region, quoteProposal(note, region));
}

/** What is in force for an edge line of the note. */
export function edgeQuoteInForce(edge: NoteEdge): QuoteInForce {
  return quoteInForce(edge, edgeQuote(edge));
}

/** What is in force for a profile of the note. */
export function profileQuoteInForce(profile: NoteProfile): QuoteInForce {
  return quoteInForce(profile, profileQuote(profile));
}

/**
 * The note's measurements with the proposal of now, where a proposal is in force: it follows values, flags and findings.
 * What the reader chose stays. The same lists come back where nothing has changed.
 */
export function withProposedQuotes(note: Note): Pick<Note, 'regions' | 'edges' | 'profiles'> {
  return {
    regions: proposedAnew(note.regions, (region) => quoteProposal(note, region)),
    edges: proposedAnew(note.edges, edgeQuote),
    profiles: proposedAnew(note.profiles, profileQuote),
  };
}

function proposedAnew<T extends Quoted>(
  items: readonly T[],
  propose: (item: T) => QuoteProposal,
): readonly T[] {
  const next = items.map((item) => {
    if (item.quoteBy === 'reader') return item;
    const { quote, reason } = propose(item);
    return item.quote === quote && item.quoteReason === reason
      ? item
      : { ...item, quote, quoteReason: reason };
  });
  return next.every((item, index) => item === items[index]) ? items : next;
}

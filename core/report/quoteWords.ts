import type { NoteRegion } from '../note/schema.js';

/** Why a region's value is quoted as it is, and who says so; empty where nobody says anything. */
export function quoteWords({
  quote,
  quoteReason,
  quoteBy,
}: Pick<NoteRegion, 'quote' | 'quoteReason' | 'quoteBy'>): string {
  if (quote === null) return '';
  const by = quoteBy === 'proposal' ? 'proposed' : '';
  const which = quote === 'neither' ? 'neither kernel is quoted' : '';
  const head = [by, which].filter((part) => part !== '').join(', ');
  return [head, quoteReason].filter((part) => part !== '').join(': ');
}

import type { ByteSpan } from '../library/readFrameBytes.js';

/** What a Range header asks for: the whole, a part, or a part that the file does not have. */
export type RangeRequest =
  | { readonly kind: 'whole' }
  | { readonly kind: 'part'; readonly span: ByteSpan }
  | { readonly kind: 'unsatisfiable' };

/**
 * Reads a Range header for a file of so many bytes (RFC 9110 section 14.1.2). Several ranges, other
 * units and malformed ranges count as no range, which section 14.2 allows.
 */
export function byteRange(header: string | undefined, size: number): RangeRequest {
  const match = /^bytes=(\d{0,15})-(\d{0,15})$/.exec(header?.trim() ?? '');
  const [, first = '', last = ''] = match ?? [];
  if (match === null || (first === '' && last === '')) return { kind: 'whole' };
  if (first === '') return part(Math.max(0, size - Number(last)), size, Number(last) > 0);
  const start = Number(first);
  const end = last === '' ? size : Math.min(size, Number(last) + 1);
  // A last byte before the first makes the header invalid, not unsatisfiable.
  if (last !== '' && Number(last) < start) return { kind: 'whole' };
  return part(start, end, true);
}

function part(start: number, end: number, sound: boolean): RangeRequest {
  return sound && start < end
    ? { kind: 'part', span: { start, length: end - start } }
    : { kind: 'unsatisfiable' };
}

import type { QuoteInForce } from '../note/quoteInForce.js';

/** What a table says of the kernel that is quoted; all empty where nothing is. */
export interface QuoteCells {
  readonly kernel: '' | 'soft' | 'sharp' | 'both' | 'neither';
  readonly by: '' | 'proposal' | 'reader';
  /** As the rules or the reader gave it. */
  readonly reason: string;
  /** All of it for people: 'Quoted: soft kernel, as proposed. Density: …'. */
  readonly sentence: string;
}

/** Of a row that nobody quotes. */
export const NO_QUOTE: QuoteCells = { kernel: '', by: '', reason: '', sentence: '' };

const KERNEL_WORDS = {
  soft: 'soft kernel',
  sharp: 'sharp kernel',
  both: 'both kernels',
  neither: 'neither kernel',
} as const;

/** Which kernel is quoted, why, by whom, and what the rules propose where the reader chose otherwise. */
export function quoteCells({ quote, reason, by, instead }: QuoteInForce): QuoteCells {
  if (quote === null && (by === 'proposal' || reason === '')) return NO_QUOTE;
  const which = quote === null ? 'nothing' : KERNEL_WORDS[quote];
  const own = reason.trim() === '' ? '; no reason is stated.' : `: ${ended(reason.trim())}`;
  const other =
    instead === undefined
      ? ''
      : ` The rules propose ${instead.quote ?? 'nothing'}: ${instead.reason}`;
  return {
    kernel: quote ?? '',
    by,
    reason,
    sentence:
      by === 'proposal'
        ? `Quoted: ${which}, as proposed. ${reason}`
        : `Quoted: ${which}, chosen by the reader${own}${other}`,
  };
}

function ended(text: string): string {
  return /[.!?]$/.test(text) ? text : `${text}.`;
}

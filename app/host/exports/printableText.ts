import { visibleText } from '../../../core/format/index.js';

/** Scripts that the document's font has: Latin, Greek, Cyrillic, and the signs that our tables use. */
const IN_FONT =
  /[\n\u0020-\u007e\u00a0-\u024f\u0370-\u03ff\u0400-\u052f\u2010-\u2027\u2030-\u203a\u20ac\u2190-\u2193\u2212\u221a\u2248\u2260\u2264\u2265\u2009]/u;

/** Text with every letter that the font has not as its code point, 'U+5C71': a name is never printed as empty boxes. */
export function printableText(text: string): string {
  let printed = '';
  for (const letter of text.split('\n').map(visibleText).join('\n')) {
    const code = letter.codePointAt(0) ?? 0;
    printed += IN_FONT.test(letter)
      ? letter
      : `[U+${code.toString(16).toUpperCase().padStart(4, '0')}]`;
  }
  return printed;
}

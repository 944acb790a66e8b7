/** What stands in place of a sentence that told who or when. */
export const REMOVED = 'Removed on de-identification.';

/** A date as DICOM or ISO 8601 write it. */
const DATE = /(?<!\d)(?:(?:19|20)\d{6}(?!\d)|\d{4}[-.]\d{2}[-.]\d{2})/;

/**
 * Makes a test for sentences that hold one of the values, as a word of its own whatever its case, or a date. Sentences
 * of the program quote what files state, and a file may state anything anywhere.
 */
export function identityFinder(values: readonly string[]): (text: string) => boolean {
  const wanted = values.map(plain).filter((value) => value !== '');
  return (text) => {
    if (DATE.test(text)) return true;
    const searched = plain(text);
    return wanted.some((value) => holdsWord(searched, value));
  };
}

/** Case, composition of letters and kind of blank make no other word. */
function plain(text: string): string {
  return text.normalize('NFKC').toLowerCase().replace(/\s+/g, ' ').trim();
}

const WORD = /[\p{L}\p{N}]/u;

function holdsWord(text: string, value: string): boolean {
  const isWord = (character: string | undefined) => character !== undefined && WORD.test(character);
  for (let at = text.indexOf(value); at >= 0; at = text.indexOf(value, at + 1)) {
    const startsInside = isWord(value[0]) && isWord(text[at - 1]);
    const endsInside = isWord(value.at(-1)) && isWord(text[at + value.length]);
    if (!startsInside && !endsInside) return true;
  }
  return false;
}

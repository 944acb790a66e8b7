/** Characters that JSON lets stand as they are, but that act on a terminal or on the order of what is read. */
const ACTING = /[\u007f-\u009f\u061c\u200e\u200f\u2028-\u202e\u2066-\u2069\ufeff]/g;

/** One JSON document with a final line end. Its content is exact: acting characters are written as escapes. */
export function jsonText(document: unknown): string {
  const text = JSON.stringify(document, null, 2).replace(
    ACTING,
    (character) => `\\u${character.charCodeAt(0).toString(16).padStart(4, '0')}`,
  );
  return `${text}\n`;
}

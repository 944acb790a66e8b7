/**
 * Characters that are not seen but change what is seen: C0 and C1 controls, DEL, and the marks, embeddings, overrides and
 * isolates of the Unicode bidirectional algorithm (UAX #9, table of explicit formatting characters), zero-width
 * characters, line and paragraph separators.
 */
const UNSEEN =
  // biome-ignore lint/suspicious/noControlCharactersInRegex: these characters are what it looks for
  /[\u0000-\u001f\u007f-\u009f\u061c\u200b-\u200f\u2028-\u202e\u2060-\u2069\ufeff]/g;

/** Text from a file made fit to be shown: each unseen character is named, '‹202E›'. The text itself is not repaired. */
export function visibleText(text: string): string {
  return text.replace(UNSEEN, (character) => {
    const code = character.charCodeAt(0).toString(16).toUpperCase().padStart(4, '0');
    return `‹${code}›`;
  });
}

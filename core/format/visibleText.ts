/**
 * Characters that are not seen but change what is seen: controls; the marks, embeddings, overrides and isolates of the
 * Unicode bidirectional algorithm (UAX #9, table of explicit formatting characters); zero-width and other format
 * characters (general category Cf), fillers and joiners without a shape, line and paragraph separators, halves of
 * characters.
 */
const UNSEEN =
  /[\p{Cc}\p{Cf}\p{Zl}\p{Zp}\p{Cs}]|\u034f|\u115f|\u1160|\u17b4|\u17b5|\u3164|\uffa0/gu;

/** Text from a file made fit to be shown: each unseen character is named, '‹202E›'. The text itself is not repaired. */
export function visibleText(text: string): string {
  return text.replace(UNSEEN, (character) => {
    const code = (character.codePointAt(0) ?? 0).toString(16).toUpperCase().padStart(4, '0');
    return `‹${code}›`;
  });
}

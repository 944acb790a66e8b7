import { visibleText } from '../../format/index.js';

/**
 * Text of any origin as one value of a short VR (SH, LO, PN): on one line, unseen characters named, and no backslash,
 * which would begin another value (PS3.5 6.2). Longer than `longest` characters is cut, with an ellipsis.
 */
export function srText(text: string, longest = 64): string {
  const plain = visibleText(text.replace(/[\r\n\t]+/g, ' ').replaceAll('\\', '/')).trim();
  const characters = [...plain];
  return characters.length <= longest ? plain : `${characters.slice(0, longest - 1).join('')}…`;
}

/** Text of any origin as Unlimited Text (UT): lines are kept, other unseen characters are named. */
export function srLines(text: string): string {
  return text
    .split(/\r\n|[\r\n]/)
    .map((line) => visibleText(line.replaceAll('\t', ' ')))
    .join('\r\n')
    .trimEnd();
}

/** A Person Name (PN, PS3.5 6.2.1) from a file, or a name as somebody typed it: its marks '^' and '=' are kept. */
export function srPersonName(name: string): string {
  return name
    .split('=')
    .slice(0, 3)
    .map((group) => srText(group))
    .join('=');
}

/** A date as DA, or empty for what is no date: an empty value says that it is not known. */
export function srDate(date: string | null): string {
  const [, year, month, day] = /^(\d{4})[.-]?(\d{2})[.-]?(\d{2})$/.exec(date?.trim() ?? '') ?? [];
  return year === undefined ? '' : `${year}${month}${day}`;
}

import type { Finding } from '../result.js';
import { tagInWords } from './dataSet.js';

/** What looks into a data set found and put right or left out, each once. */
export interface TextFindings {
  /** @param findings of the character set that texts are read in */
  characterSet(findings: readonly Finding[]): void;
  unlistedSet(): void;
  unreadable(): void;
  decimalComma(tag: string): void;
  notANumber(tag: string): void;
  notAnInteger(tag: string): void;
  list(): readonly Finding[];
}

/** Texts name the tag and never the value: slices of a series then say the same. */
export function collectTextFindings(): TextFindings {
  // Most files have none: the map is made for the first.
  let found: Map<string, Finding> | undefined;
  const add = (finding: Finding): void => {
    found ??= new Map();
    found.set(finding.text, finding);
  };
  return {
    characterSet: (findings) => findings.forEach(add),
    unlistedSet: () =>
      add({
        code: 'character-set-not-listed',
        text: 'A text calls a character set that Specific Character Set does not list; it was used.',
      }),
    unreadable: () =>
      add({
        code: 'text-unreadable',
        text: 'Texts have characters that their character set does not have; � stands for them.',
      }),
    decimalComma: (tag) =>
      add({
        code: 'decimal-comma',
        text: `${tagInWords(tag)} is written with a decimal comma; it was read as a point.`,
      }),
    notANumber: (tag) =>
      add({
        code: 'not-a-number',
        text: `${tagInWords(tag)} is no number; it was taken as absent.`,
      }),
    notAnInteger: (tag) =>
      add({
        code: 'not-an-integer',
        text: `${tagInWords(tag)} is no whole number; it was taken as absent.`,
      }),
    list: () => (found === undefined ? [] : [...found.values()]),
  };
}

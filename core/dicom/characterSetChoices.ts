/** A character set that the reader may have the texts of files read in, though they say another. */
export interface CharacterSetChoice {
  /** Values of Specific Character Set (0008,0005) as a file would have them (PS3.3 tables C.12-2 to C.12-5). */
  readonly stated: string;
  readonly title: string;
}

/** Sets that files are known to hold under another one's name (AWKWARD row 41), by language. */
export const CHARACTER_SET_CHOICES: readonly CharacterSetChoice[] = [
  { stated: 'ISO_IR 192', title: 'Unicode (UTF-8)' },
  { stated: 'ISO_IR 100', title: 'Western European (Latin 1)' },
  { stated: 'ISO_IR 101', title: 'Central European (Latin 2)' },
  { stated: 'ISO_IR 109', title: 'South European (Latin 3)' },
  { stated: 'ISO_IR 110', title: 'North European (Latin 4)' },
  { stated: 'ISO_IR 148', title: 'Turkish (Latin 5)' },
  { stated: 'ISO_IR 144', title: 'Cyrillic' },
  { stated: 'ISO_IR 126', title: 'Greek' },
  { stated: 'ISO_IR 127', title: 'Arabic' },
  { stated: 'ISO_IR 138', title: 'Hebrew' },
  { stated: 'ISO_IR 166', title: 'Thai' },
  { stated: 'GB18030', title: 'Chinese (GB18030)' },
  { stated: 'GBK', title: 'Chinese (GBK)' },
  { stated: 'ISO 2022 IR 6\\ISO 2022 IR 87', title: 'Japanese (with escapes)' },
  { stated: 'ISO 2022 IR 13\\ISO 2022 IR 87', title: 'Japanese with half-width katakana' },
  { stated: 'ISO 2022 IR 6\\ISO 2022 IR 149', title: 'Korean (with escapes)' },
];

/** A choice by what it would be in a file; undefined for anything that is not offered. */
export function characterSetChoice(stated: string): CharacterSetChoice | undefined {
  return CHARACTER_SET_CHOICES.find((choice) => choice.stated === stated);
}

import type { Finding } from '../../result.js';

/** What a data set may have against the standard and still be read, by the code of its finding. */
export type Irregularity =
  | 'no-preamble'
  | 'no-transfer-syntax'
  | 'syntax-mismatch'
  | 'meta-implicit'
  | 'meta-length'
  | 'vr-guessed'
  | 'vr-differs'
  | 'odd-length'
  | 'delimiter-length'
  | 'sequence-skipped';

const TEXTS: Readonly<Record<Irregularity, string>> = {
  'no-preamble': 'The file lacks the DICOM preamble; it was read as a bare data set.',
  'no-transfer-syntax': 'The file does not say how it is encoded; its first elements told.',
  'syntax-mismatch': 'The file is encoded otherwise than it says; its first elements told.',
  'meta-implicit': 'The file’s meta information has no value representations; it was read without.',
  'meta-length':
    'The file’s meta information is longer or shorter than it says; it was read to its end.',
  'vr-guessed':
    'Attributes have no valid value representation; the dictionary and what follows told.',
  'vr-differs':
    'Attributes have another value representation than the standard gives them; the file’s was used for their length, the standard’s for their meaning.',
  'odd-length': 'Attributes have an odd length, which the standard does not allow; it was used.',
  'delimiter-length': 'A delimiter has a length, which it can’t have; it was ignored.',
  'sequence-skipped': 'A sequence breaks the rules and was skipped as a whole.',
};

/** Collects what was forgiven, each kind once. */
export interface Irregularities {
  note(kind: Irregularity): void;
  findings(): readonly Finding[];
}

export function noteIrregularities(): Irregularities {
  const kinds = new Set<Irregularity>();
  return {
    note: (kind) => {
      kinds.add(kind);
    },
    findings: () => [...kinds].map((code) => ({ code, text: TEXTS[code] })),
  };
}

import type { CtImage } from '../../core/dicom/index.js';

/**
 * What the reader does with an input. READ: right values. READ+: read, and a finding travels with the series and its
 * exports. SKIP: left out and counted, with its reason. REFUSE: this file, series or measurement is not offered, and a
 * sentence says why.
 */
export type Verdict = 'READ' | 'READ+' | 'SKIP' | 'REFUSE';

export type Section = 'A' | 'B' | 'C' | 'D' | 'E';

/** Files by their path in the folder. */
export type CorpusFiles = Readonly<Record<string, Uint8Array>>;

/** A part of an object, of any depth; arrays are whole. */
export type PartOf<T> = T extends readonly unknown[]
  ? T
  : T extends object
    ? { readonly [K in keyof T]?: PartOf<T[K]> | undefined }
    : T;

/** One input of a row, and what must come of it. */
export interface RowCase {
  /** Tells the cases of a row apart: 'text file', 'cut in the meta header'. */
  readonly name: string;
  readonly verdict: Verdict;
  /**
   * READ+: the finding's code. SKIP and REFUSE: the code of the left-out entry, of the refusal, or of the finding
   * that takes a measurement away. None for READ.
   */
  readonly code?: string;
  /** A part of the sentence that is shown. */
  readonly says?: string;
  /** Generated and seeded: the same bytes at every call. No patient data. */
  build(): CorpusFiles;
  /** What folders hold beside ordinary files: links, permissions. Run after the files are laid. */
  arrange?(folder: string): Promise<void>;
  /** READ, READ+: what the first slice says. */
  readonly image?: PartOf<CtImage>;
  /** What the first slice must not have, as paths: 'acquisition.thicknessMm'. Absent is neither 0 nor empty. */
  readonly absent?: readonly string[];
  /** READ, READ+: stored values of the first slice, from its first pixel on; as many as are checked. */
  readonly stored?: readonly number[];
}

/** One awkward input, as the table of limits lists it. */
export interface CorpusRow {
  readonly row: number;
  readonly section: Section;
  /** The input, in the words of the table. */
  readonly title: string;
  /** What is done with it, in a few plain words, for the table. */
  readonly outcome: string;
  readonly cases: readonly [RowCase, ...RowCase[]];
}

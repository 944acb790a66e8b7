/** A cell of a table: text, and whether it is a number or a head. */
export interface PdfCell {
  readonly text: string;
  readonly look: 'text' | 'number' | 'head' | 'numberHead';
}

/** One part of a document, from top to bottom. */
export type PdfPart =
  | { readonly kind: 'heading' | 'subheading' | 'line' | 'small'; readonly text: string }
  | { readonly kind: 'cautions'; readonly lines: readonly string[] }
  | { readonly kind: 'picture'; readonly name: string }
  | {
      readonly kind: 'table';
      /** Share of the width of each column; 0 for as wide as its text. */
      readonly widths: readonly number[];
      readonly rows: readonly (readonly PdfCell[])[];
    }
  /** Parts that stay on one page where they fit on one. */
  | { readonly kind: 'together'; readonly parts: readonly PdfPart[] };

/** A document for paper: `head` and `foot` stand on every page, with its number. */
export interface PdfDocument {
  readonly title: string;
  readonly head: string;
  readonly foot: string;
  readonly parts: readonly PdfPart[];
}

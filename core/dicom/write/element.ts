/** Value representations whose values are text (PS3.5 table 6.2-1). */
export type TextVr =
  | 'AE'
  | 'AS'
  | 'CS'
  | 'DA'
  | 'DT'
  | 'LO'
  | 'LT'
  | 'PN'
  | 'SH'
  | 'ST'
  | 'TM'
  | 'UC'
  | 'UI'
  | 'UR'
  | 'UT';

/** Value representations that write a number as text. */
export type DecimalTextVr = 'DS' | 'IS';

/** Value representations of binary numbers. AT takes a tag as a number, 0xggggeeee. */
export type BinaryVr = 'AT' | 'FD' | 'FL' | 'SL' | 'SS' | 'UL' | 'US';

/** Value representations of uninterpreted bytes or words. */
export type BulkVr = 'OB' | 'OD' | 'OF' | 'OL' | 'OV' | 'OW' | 'UN';

/** Text is written as UTF-8, so a data set with more than ASCII has to say ISO_IR 192 in (0008,0005). */
export interface TextElement {
  readonly tag: number;
  readonly vr: TextVr;
  /** Several values are joined with a backslash; bytes are written as they are, for other character sets. */
  readonly value: string | readonly string[] | Uint8Array;
}

export interface DecimalTextElement {
  readonly tag: number;
  readonly vr: DecimalTextVr;
  /** Text is written as it is, numbers in at most 16 (DS) or 12 (IS) characters. */
  readonly value: number | string | readonly (number | string)[];
}

export interface BinaryElement {
  readonly tag: number;
  readonly vr: BinaryVr;
  readonly value: number | readonly number[];
}

export interface BulkElement {
  readonly tag: number;
  readonly vr: BulkVr;
  /** Words are written in the file's byte order; bytes are written as they are. */
  readonly value: Uint8Array | Uint16Array | Int16Array;
}

/** Pixel data in fragments (PS3.5 A.4); the basic offset table is left empty unless it is given. */
export interface EncapsulatedElement {
  readonly tag: number;
  readonly vr: 'OB';
  readonly fragments: readonly Uint8Array[];
  readonly offsetTable?: Uint8Array;
}

export interface SequenceElement {
  readonly tag: number;
  readonly vr: 'SQ';
  readonly items: readonly (readonly WriteElement[])[];
  /** Close sequence and items with delimiters (PS3.5 7.5) in place of lengths. */
  readonly undefinedLength?: boolean;
}

/** One element to write. `tag` is 0xggggeeee. */
export type WriteElement =
  | TextElement
  | DecimalTextElement
  | BinaryElement
  | BulkElement
  | EncapsulatedElement
  | SequenceElement;

import type { Finding } from '../result.js';

/** Where the value of an element stands in the bytes of its data set. */
export interface ElementPlace {
  readonly offset: number;
  readonly length: number;
  /** The file's value representation, where it is another than the standard's: it tells how the value is written. */
  readonly fileVr?: string;
}

/** Pixel Data (7FE0,0010): its length is open when it is in fragments. */
export interface PixelDataPlace extends ElementPlace {
  readonly inFragments: boolean;
}

/** A data set up to the head of its Pixel Data, read by whichever reader could. */
export interface DataSet {
  /** The bytes that offsets point into: the file, or its inflated form. */
  readonly bytes: Uint8Array;
  readonly littleEndian: boolean;
  /** As the file says, or, where it says nothing or the wrong thing, as it is. */
  readonly transferSyntaxUid?: string;
  /** @param tag in the form 'x00280010' */
  find(tag: string): ElementPlace | undefined;
  /** Items of a sequence; undefined when there is none. */
  items(tag: string): readonly DataSet[] | undefined;
  readonly pixelData?: PixelDataPlace;
  readonly findings: readonly Finding[];
}

/** 'x00280010' as (0028,0010). */
export function tagInWords(tag: string): string {
  return `(${tag.slice(1, 5)},${tag.slice(5, 9)})`;
}

import type { PixelEncoding, VoiWindow } from '../../core/dicom/index.js';
import { mapDifferences } from './differenceColours.js';
import { greyTable, mapGreys } from './greyTables.js';

/** What is drawn of a slice: its stored values through a window, or differences in HU on their own scale. */
export type Picture =
  | {
      readonly kind: 'greys';
      readonly stored: Int16Array | Uint16Array;
      readonly pixels: PixelEncoding;
      readonly window: VoiWindow;
    }
  | { readonly kind: 'difference'; readonly hu: Float32Array; readonly rangeHu: number };

/** True when both are drawn alike. */
export function isSamePicture(a: Picture, b: Picture): boolean {
  if (a.kind === 'greys') {
    return (
      b.kind === 'greys' && a.stored === b.stored && a.pixels === b.pixels && a.window === b.window
    );
  }
  return b.kind === 'difference' && a.hu === b.hu && a.rangeHu === b.rangeHu;
}

/** Writes a picture into a canvas's pixels. */
export function paint(picture: Picture, target: Uint32Array): void {
  if (picture.kind === 'greys') {
    mapGreys(picture.stored, greyTable(picture.pixels, picture.window), target);
  } else mapDifferences(picture.hu, picture.rangeHu, target);
}

import * as cornerstone from 'cornerstone-core';
import { isSamePicture, type Picture, paint } from './picture.js';
import type { PlateTransform } from './plateTransform.js';

/** What a viewport is to show. */
export interface ViewportContent {
  /** Names the slice and its pixels: another id means other pixels. */
  readonly id: string;
  readonly picture: Picture;
  readonly transform: PlateTransform;
  readonly smooth: boolean;
  /** Device pixels to the CSS pixel, for the canvas's own size. */
  readonly devicePixelRatio: number;
}

/** One canvas that shows slices. */
export interface Viewport {
  show(content: ViewportContent): void;
  /** Shows bare ground: there is no slice. */
  clear(): void;
  close(): void;
}

/** The parts of an enabled element that the drawing uses; the library's own types know them as any. */
interface EnabledElement {
  readonly canvas: HTMLCanvasElement;
  needsRedraw: boolean;
  invalid: boolean;
}

/**
 * Hosts a slice in an element. The library keeps the frame loop and the transform; the grey levels are drawn by
 * us, exactly as the standard has them, because its own mapping follows another formula (PS3.3 C.11.2.1.3.2 for
 * C.11.2.1.2). Its canvas gets device pixels, and its scale is stated in them.
 */
export function createViewport(element: HTMLElement): Viewport {
  cornerstone.enable(element);
  const enabled = cornerstone.getEnabledElement(element) as unknown as EnabledElement;
  const surface = createSurface();

  return {
    show: (content) => {
      const { transform, devicePixelRatio } = content;
      const resized = resize(enabled.canvas, transform, devicePixelRatio);
      cornerstone.displayImage(
        element,
        imageOf(content, surface, enabled),
        viewportOf(transform, devicePixelRatio),
      );
      // A new size has emptied the canvas; waiting for the next frame would let the bare ground flash.
      if (resized) cornerstone.draw(element);
    },
    clear: () => {
      const { canvas } = enabled;
      enabled.needsRedraw = false;
      canvas.getContext('2d')?.clearRect(0, 0, canvas.width, canvas.height);
    },
    close: () => cornerstone.disable(element),
  };
}

/** A canvas behind the scenes with the slice's greys at one pixel to the pixel. */
interface Surface {
  /** The slice's greys; mapped anew only when slice or window changed. */
  drawn(content: ViewportContent): HTMLCanvasElement;
}

function createSurface(): Surface {
  const canvas = document.createElement('canvas');
  let data: ImageData | undefined;
  let words: Uint32Array | undefined;
  let drawnId: string | undefined;
  let drawn: Picture | undefined;
  return {
    drawn: ({ id, picture, transform: { grid } }) => {
      if (drawnId === id && drawn !== undefined && isSamePicture(drawn, picture)) return canvas;
      // A slice covers all of it; a difference leaves holes where there is no data. An element shows one kind only.
      const alpha = picture.kind === 'difference';
      const context = canvas.getContext('2d', { alpha, willReadFrequently: true });
      if (context === null) throw new Error('invalid canvas: it has no 2d context');
      if (data?.width !== grid.columns || data.height !== grid.rows) {
        canvas.width = grid.columns;
        canvas.height = grid.rows;
        data = context.createImageData(grid.columns, grid.rows);
        words = undefined;
      }
      words ??= new Uint32Array(data.data.buffer);
      paint(picture, words);
      context.putImageData(data, 0, 0);
      drawnId = id;
      drawn = picture;
      return canvas;
    },
  };
}

function resize(
  canvas: HTMLCanvasElement,
  { size }: PlateTransform,
  devicePixelRatio: number,
): boolean {
  const width = Math.max(1, Math.round(size.widthPx * devicePixelRatio));
  const height = Math.max(1, Math.round(size.heightPx * devicePixelRatio));
  // The library sets these to whole CSS pixels when it is enabled; the element may be a fraction larger.
  canvas.style.width = '100%';
  canvas.style.height = '100%';
  if (canvas.width === width && canvas.height === height) return false;
  canvas.width = width;
  canvas.height = height;
  return true;
}

/** The library's viewport for a transform: scale in device pixels, shift in image pixels from the image's middle. */
function viewportOf(transform: PlateTransform, devicePixelRatio: number): cornerstone.Viewport {
  const { grid, centre, pxPerColumn, pxPerRow } = transform;
  const viewport = {
    // With square pixels both are the same; with others the library widens the coarser direction from the smaller scale.
    scale: Math.min(pxPerColumn, pxPerRow) * devicePixelRatio,
    translation: {
      x: (grid.columns - 1) / 2 - centre.column,
      y: (grid.rows - 1) / 2 - centre.row,
    },
    rotation: 0,
    hflip: false,
    vflip: false,
  };
  return viewport as unknown as cornerstone.Viewport;
}

/** The library never sees pixels: the drawing is ours, and it asks for none before it. */
const NO_PIXELS = new Int16Array(0);

function imageOf(
  content: ViewportContent,
  surface: Surface,
  enabled: EnabledElement,
): cornerstone.Image {
  const { grid } = content.transform;
  const image = {
    imageId: content.id,
    rows: grid.rows,
    columns: grid.columns,
    width: grid.columns,
    height: grid.rows,
    rowPixelSpacing: grid.pixelSpacingMm[0],
    columnPixelSpacing: grid.pixelSpacingMm[1],
    slope: 1,
    intercept: 0,
    windowCenter: 0,
    windowWidth: 1,
    minPixelValue: 0,
    maxPixelValue: 65535,
    color: false,
    invert: false,
    sizeInBytes: 2 * grid.rows * grid.columns,
    getPixelData: () => NO_PIXELS,
    render: () => drawSlice(content, surface, enabled),
  };
  return image as unknown as cornerstone.Image;
}

function drawSlice(content: ViewportContent, surface: Surface, enabled: EnabledElement): void {
  const context = enabled.canvas.getContext('2d');
  if (context === null) throw new Error('invalid canvas: it has no 2d context');
  context.setTransform(1, 0, 0, 1, 0, 0);
  context.clearRect(0, 0, enabled.canvas.width, enabled.canvas.height);
  const slice = surface.drawn(content);
  cornerstone.setToPixelCoordinateSystem(enabled as never, context as never);
  context.imageSmoothingEnabled = content.smooth;
  context.drawImage(slice, 0, 0);
  enabled.needsRedraw = false;
  enabled.invalid = false;
}

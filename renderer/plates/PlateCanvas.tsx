import { effect } from '@preact/signals';
import { useEffect, useRef } from 'preact/hooks';
import { setPlateSize } from '../state/changes/view.js';
import type { Store } from '../state/store.js';
import { createViewport } from './cornerstoneViewport.js';
import type { Layer } from './layers.js';
import { isSameContent, type PlateContent } from './plateContent.js';

export interface PlateCanvasProps {
  readonly layer: Layer;
  readonly store: Store;
  /** Part of the width from the left that is cut away, 0 to 1; where it is folded over another layer. */
  readonly cut?: number;
  /** Laid out and drawn, but not shown. */
  readonly hidden?: boolean;
}

/**
 * A picture of a plate. It follows the state by itself and not by rendering, so that scrolling costs no more than
 * the drawing. The size and the device's pixel ratio are taken note of whenever the layout or the screen changes.
 */
export function PlateCanvas({ layer, store, cut = 0, hidden = false }: PlateCanvasProps) {
  const host = useRef<HTMLDivElement>(null);
  useEffect(() => {
    const element = host.current;
    if (element === null) return;
    const viewport = createViewport(element);
    let last: PlateContent | undefined;
    const follow = (): void => {
      const content = layer.contentOf(store.state.value, window.devicePixelRatio);
      if (last !== undefined && isSameContent(last, content)) return;
      last = content;
      if (content.kind === 'slice') viewport.show(content.content);
      else viewport.clear();
    };
    const stop = effect(follow);
    const observer = new ResizeObserver(() => {
      const { width, height } = element.getBoundingClientRect();
      for (const kernel of layer.kernels) {
        store.change('Lay out', setPlateSize(kernel, { widthPx: width, heightPx: height }));
      }
      follow();
    });
    // Device pixels, so that it also speaks when the window goes to a screen with another ratio.
    observer.observe(element, { box: 'device-pixel-content-box' });
    return () => {
      observer.disconnect();
      stop();
      viewport.close();
    };
  }, [layer, store]);
  return (
    <div
      class="plate-canvas"
      data-layer={layer.name}
      ref={host}
      style={{
        clipPath: cut > 0 ? `inset(0 0 0 ${cut * 100}%)` : undefined,
        visibility: hidden ? 'hidden' : undefined,
      }}
    />
  );
}

import { effect } from '@preact/signals';
import { useEffect, useRef } from 'preact/hooks';
import type { Kernel } from '../../core/note/index.js';
import { setPlateSize } from '../state/changes/view.js';
import type { Store } from '../state/store.js';
import type { StoredSlice } from '../volumes/volume.js';
import { createViewport } from './cornerstoneViewport.js';
import { isSameContent, type PlateContent, plateContent } from './plateContent.js';

export interface PlateCanvasProps {
  readonly kernel: Kernel;
  readonly store: Store;
  readonly stored: (index: number) => StoredSlice | undefined;
}

/**
 * The picture of a plate. It follows the state by itself and not by rendering, so that scrolling costs no more than
 * the drawing. The size and the device's pixel ratio are taken note of whenever the layout or the screen changes.
 */
export function PlateCanvas({ kernel, store, stored }: PlateCanvasProps) {
  const host = useRef<HTMLDivElement>(null);
  useEffect(() => {
    const element = host.current;
    if (element === null) return;
    const viewport = createViewport(element);
    let last: PlateContent | undefined;
    const follow = (): void => {
      const content = plateContent(store.state.value, kernel, stored, window.devicePixelRatio);
      if (last !== undefined && isSameContent(last, content)) return;
      last = content;
      if (content.kind === 'slice') viewport.show(content.content);
      else viewport.clear();
    };
    const stop = effect(follow);
    const observer = new ResizeObserver(() => {
      const { width, height } = element.getBoundingClientRect();
      store.change('Lay out', setPlateSize(kernel, { widthPx: width, heightPx: height }));
      follow();
    });
    // Device pixels, so that it also speaks when the window goes to a screen with another ratio.
    observer.observe(element, { box: 'device-pixel-content-box' });
    return () => {
      observer.disconnect();
      stop();
      viewport.close();
    };
  }, [kernel, store, stored]);
  return <div class="plate-canvas" ref={host} />;
}

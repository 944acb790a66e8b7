import type { RefObject } from 'preact';
import { useEffect, useRef, useState } from 'preact/hooks';

export interface SizePx {
  readonly widthPx: number;
  readonly heightPx: number;
}

/** The size of an element's content box in CSS px, kept up to date; undefined before the first layout. */
export function useSize<E extends Element>(): readonly [RefObject<E>, SizePx | undefined] {
  const ref = useRef<E>(null);
  const [size, setSize] = useState<SizePx>();
  useEffect(() => {
    const element = ref.current;
    if (element === null) return undefined;
    const observer = new ResizeObserver(([entry]) => {
      if (entry === undefined) return;
      const { width, height } = entry.contentRect;
      setSize({ widthPx: width, heightPx: height });
    });
    observer.observe(element);
    return () => observer.disconnect();
  }, []);
  return [ref, size];
}

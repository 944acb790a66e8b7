import { type WriteElement, writeFile } from '../../../core/dicom/write/index.js';
import { enhancedElements } from '../enhancedCt.js';
import type { RowCase } from '../row.js';

/** A frame whose kernel label stands in an item of its own frame, with or without a set of its own there. */
export function nestedKernel(
  name: string,
  outer: string,
  own: string | undefined,
  label: Uint8Array,
): RowCase {
  const item: readonly WriteElement[] = [
    ...(own === undefined ? [] : [{ tag: 0x00080005, vr: 'CS', value: own } as const]),
    { tag: 0x00181210, vr: 'SH', value: label },
  ];
  const reconstruction: WriteElement = { tag: 0x00189314, vr: 'SQ', items: [item] };
  return {
    name,
    verdict: 'READ',
    build: () => {
      const elements = enhancedElements({
        frames: [{ z: 0 }],
        change: { 524293: { tag: 0x00080005, vr: 'CS', value: outer } },
      });
      const changed = elements.map((element) =>
        element.tag === 0x52009230 && 'items' in element
          ? { ...element, items: element.items.map((frame) => [...frame, reconstruction]) }
          : element,
      );
      return { image: writeFile(changed) };
    },
    image: { acquisition: { kernelLabel: 'Schärf' } },
  };
}

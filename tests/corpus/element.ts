import type { WriteElement } from '../../core/dicom/write/index.js';

type Change = Readonly<Record<number, WriteElement | undefined>>;

/** Elements by their tag, as the builders take changes. */
export function change(...elements: readonly WriteElement[]): Change {
  return Object.fromEntries(elements.map((element) => [element.tag, element]));
}

/** Takes elements away. */
export function without(...tags: readonly number[]): Change {
  return Object.fromEntries(tags.map((tag) => [tag, undefined]));
}

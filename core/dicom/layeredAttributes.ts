import type { Attributes } from './attributes.js';

/** Looks through layers of attributes: the first that has a tag answers. A frame's own groups come before shared ones. */
export function layeredAttributes(layers: readonly Attributes[]): Attributes {
  const owner = (tag: string): Attributes | undefined => layers.find((layer) => layer.has(tag));
  return {
    has: (tag) => owner(tag) !== undefined,
    texts: (tag) => owner(tag)?.texts(tag),
    text: (tag) => owner(tag)?.text(tag),
    decimals: (tag) => owner(tag)?.decimals(tag),
    decimal: (tag) => owner(tag)?.decimal(tag),
    integer: (tag) => owner(tag)?.integer(tag),
    unsignedShort: (tag) => owner(tag)?.unsignedShort(tag),
    signedShort: (tag) => owner(tag)?.signedShort(tag),
    shorts: (tag) => owner(tag)?.shorts(tag),
    unsignedLong: (tag) => owner(tag)?.unsignedLong(tag),
    float: (tag) => owner(tag)?.float(tag),
    double: (tag) => owner(tag)?.double(tag),
    items: (tag) => owner(tag)?.items(tag),
    // Items gather their findings with those of the data set around them: the last layer has them all.
    findings: () => layers[layers.length - 1]?.findings() ?? [],
  };
}

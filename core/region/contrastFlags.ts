import type { ContrastNoise } from './contrast.js';
import { FLAGS, isQuiet } from './flags.js';
import type { Flag, RegionValue } from './value.js';

/** The mark of a lossy image goes on to the contrast: its noise is not the scanner's. */
const LOSSY: Flag = {
  code: FLAGS.lossy.code,
  text: 'The images were compressed with loss: the noise of this contrast is not the scanner’s.',
};

/** Not of the mean or the SD, so not of what is made of them. */
const OWN_TO_REGIONS: ReadonlySet<string> = new Set([FLAGS.zeroSd.code, FLAGS.noPlacement.code]);

/**
 * What a contrast takes over from its regions on one kernel: each flag once, with the names of the regions that it
 * holds for before it. The reference counts only where its SD is the noise.
 */
export function contrastFlags(parts: {
  readonly lumen: RegionValue;
  readonly wall: RegionValue;
  readonly reference?: RegionValue | undefined;
  readonly noise: ContrastNoise;
}): readonly Flag[] {
  const reference = parts.noise === 'reference' ? parts.reference : undefined;
  const used = [
    ['lumen', parts.lumen],
    ['wall', parts.wall],
    ...(reference === undefined ? [] : [['reference', reference] as const]),
  ] as const;
  const carried = new Map<string, { readonly flag: Flag; readonly names: string[] }>();
  let isLossy = false;
  for (const [name, value] of used)
    for (const flag of value.flags) {
      if (flag.code === LOSSY.code) isLossy = true;
      else if (!isQuiet(flag) && !OWN_TO_REGIONS.has(flag.code)) {
        const key = `${flag.code} ${flag.text}`;
        const known = carried.get(key);
        if (known === undefined) carried.set(key, { flag, names: [name] });
        else known.names.push(name);
      }
    }
  const flags = [...carried.values()].map(
    ({ flag: { code, text }, names }): Flag => ({ code, text: `${listed(names)}: ${text}` }),
  );
  return isLossy ? [LOSSY, ...flags] : flags;
}

function listed(names: readonly string[]): string {
  const text =
    names.length < 2 ? (names[0] ?? '') : `${names.slice(0, -1).join(', ')} and ${names.at(-1)}`;
  return text.charAt(0).toUpperCase() + text.slice(1);
}

import type { Sharpness } from './contract.js';
import type { MeasuredSharpness } from './sharpness.js';

/** What was measured of two stacks, told as soft and sharp; undecided, the first is called soft and the second sharp. */
export function asSharpness(found: Sharpness | MeasuredSharpness): Sharpness {
  if ('decided' in found) return found;
  const { softer, confidence, text, noise, edges } = found;
  const isSwapped = softer === 'second';
  const order = (first: number | undefined, second: number | undefined) =>
    isSwapped ? [second ?? null, first ?? null] : [first ?? null, second ?? null];
  const [noiseSoftHu = null, noiseSharpHu = null] = order(noise?.firstHu, noise?.secondHu);
  const [frequencySoft = null, frequencySharp = null] = order(
    noise?.texture.firstPerMm,
    noise?.texture.secondPerMm,
  );
  const [edgeSoftMm = null, edgeSharpMm = null] = order(
    edges?.firstMm.value,
    edges?.secondMm.value,
  );
  return {
    decided: softer !== undefined,
    ...(softer !== undefined && { sharper: isSwapped ? 'first' : 'second' }),
    confidence,
    noiseSoftHu,
    noiseSharpHu,
    frequencySoft,
    frequencySharp,
    edgeSoftMm,
    edgeSharpMm,
    text,
  };
}

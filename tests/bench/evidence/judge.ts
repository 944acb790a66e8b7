import { type MeasuredSharpness, measureSharpness } from '../../../core/pairing/sharpness.js';
import type { EvidenceCase } from './cases.js';
import { readFrom } from './imageStack.js';
import { makePair, type ProjectionCache } from './phantomPair.js';

export type Judgement = 'right' | 'undecided' | 'wrong';

export interface JudgedCase {
  readonly group: string;
  readonly judgement: Judgement;
  readonly confidence: number;
  /** Case, figures and outcome in one line, for those who look into it. */
  readonly line: string;
}

/** Makes a case, measures it and holds the outcome against the truth. */
export async function judgeCase(
  one: EvidenceCase,
  cache: ProjectionCache = new Map(),
): Promise<JudgedCase> {
  const [first, second] = makePair(one.recipe, cache);
  const measured = await measureSharpness(first.stack, second.stack, readFrom(first, second), {
    slices: one.recipe.first.heightsMm.length,
  });
  const judgement = judge(one, measured);
  return {
    group: one.group,
    judgement,
    confidence: measured.confidence,
    line: [judgement, inWords(one), figures(measured), measured.text].join(' | '),
  };
}

/** Another order than the true one, an order or a sameness that isn't there: all are wrong. */
function judge({ expected }: EvidenceCase, measured: MeasuredSharpness): Judgement {
  if (measured.outcome === 'undecided') return 'undecided';
  return (measured.softer ?? measured.outcome) === expected ? 'right' : 'wrong';
}

function inWords({
  group,
  expected,
  recipe: { first, second, scene, photonsPerRay },
}: EvidenceCase) {
  const stack = ({ kernel, grid, layers }: typeof first): string =>
    `${kernel.apodisation} ${kernel.cutOffPerMm.toFixed(2)} ${(grid.fieldOfViewMm / grid.matrix).toFixed(3)} mm ×${layers}`;
  return `${group}: ${stack(first)}; ${stack(second)}; scene ${scene}; ${photonsPerRay.toExponential(1)} photons; ${expected}`;
}

function figures({ noise, edges, areas, edgePlaces }: MeasuredSharpness): string {
  const say = (name: string, one?: { readonly value: number; readonly standardError: number }) =>
    one === undefined
      ? `${name} –`
      : `${name} ${one.value.toFixed(3)} ± ${one.standardError.toFixed(3)}`;
  const texture = noise?.texture;
  return [
    `${areas.length} areas, ${edgePlaces.length} edges`,
    say('noise', noise?.level),
    say('frequency', texture?.frequency) +
      (texture && !texture.tellsDirection ? ' no direction' : '') +
      (texture && !texture.comparable ? ' not comparable' : ''),
    say('rise', edges?.rise),
  ].join(', ');
}

import type { Apodisation, Kernel } from '../../../core/phantom/index.js';
import { apodisation, seededUniform } from '../../../core/phantom/index.js';
import type { PairRecipe, StackRecipe } from './phantomPair.js';

/** What a case must come to. */
export type Expected = 'first' | 'second' | 'same-kernel' | 'thickness-alone';

export interface EvidenceCase {
  readonly group: string;
  readonly expected: Expected;
  readonly recipe: PairRecipe;
}

const APODISATIONS: readonly Apodisation[] = [
  'ram-lak',
  'shepp-logan',
  'cosine',
  'hann',
  'hamming',
];
const RATIOS = [1.15, 1.25, 1.4, 1.6, 2] as const;
const MOST_CUT_OFF = 1.3;
const HEIGHTS_MM = [6, 13, 20] as const;

/** What may vary beside the kernels. */
interface Variety {
  readonly otherGrid: boolean;
  readonly otherHeights: boolean;
  /** Layers of the softer and of the sharper stack. */
  readonly layers: readonly [number, number];
}

/**
 * All cases: 200 to order, and those of one kernel. A batch is the same at each run. The rule was made on the batches
 * 0, 7, 8 and 9; the one that is run by default is none of them.
 */
export function evidenceCases(batch: number): readonly EvidenceCase[] {
  const list = (count: number, make: (batch: number, index: number) => EvidenceCase) =>
    Array.from({ length: count }, (_, index) => make(batch, index));
  return [
    ...RATIOS.flatMap((ratio) => list(32, (_, index) => sameWindow(batch, ratio, index))),
    ...list(40, otherWindow),
    ...list(20, sameKernel),
    ...list(20, thicknessAlone),
  ];
}

/** Two cut-offs of one apodisation: the higher is the sharper. */
function sameWindow(batch: number, ratio: number, index: number): EvidenceCase {
  const uniform = seededUniform(batch, 1, Math.round(ratio * 100), index);
  const cutOff = 0.5 + uniform() * (MOST_CUT_OFF / ratio - 0.5);
  const window = APODISATIONS[index % APODISATIONS.length] ?? 'hann';
  const soft: Kernel = { apodisation: window, cutOffPerMm: cutOff };
  const sharp: Kernel = { apodisation: window, cutOffPerMm: cutOff * ratio };
  return ordered(`cut-offs 1 : ${ratio}`, soft, sharp, uniform, index);
}

/** Two apodisations; the sharper passes more at every frequency, by 15 % of the cut-off or more. */
function otherWindow(batch: number, index: number): EvidenceCase {
  for (let attempt = 0; ; attempt += 1) {
    const uniform = seededUniform(batch, 2, index, attempt);
    const pick = (): Kernel => ({
      apodisation: APODISATIONS[Math.floor(uniform() * APODISATIONS.length)] ?? 'hann',
      cutOffPerMm: 0.5 + uniform() * (MOST_CUT_OFF - 0.5),
    });
    const [soft, sharp] = [pick(), pick()];
    if (soft.apodisation === sharp.apodisation || !passesMore(sharp, soft)) continue;
    return ordered('other apodisation', soft, sharp, uniform, index);
  }
}

function passesMore(sharp: Kernel, soft: Kernel): boolean {
  if (sharp.cutOffPerMm < soft.cutOffPerMm * 1.15) return false;
  return Array.from({ length: 131 }, (_, k) => k / 100).every(
    (frequency) => apodisation(sharp, frequency) >= apodisation(soft, frequency),
  );
}

function ordered(
  group: string,
  soft: Kernel,
  sharp: Kernel,
  uniform: () => number,
  index: number,
): EvidenceCase {
  const thick = uniform();
  const variety: Variety = {
    otherGrid: uniform() < 0.4,
    otherHeights: uniform() < 0.25,
    layers: thick < 0.7 ? [1, 1] : thick < 0.85 ? [3, 1] : [1, 3],
  };
  const softIsFirst = index % 2 === 0;
  const [a, b] = stacks(soft, sharp, variety, uniform);
  return {
    group,
    expected: softIsFirst ? 'first' : 'second',
    recipe: acquisition(softIsFirst ? a : b, softIsFirst ? b : a, uniform, index),
  };
}

function sameKernel(batch: number, index: number): EvidenceCase {
  const uniform = seededUniform(batch, 3, index);
  const kernel = anyKernel(uniform, index);
  const variety = {
    otherGrid: index % 2 === 1,
    otherHeights: index % 4 > 1,
    layers: [1, 1],
  } as const;
  return {
    group: 'same kernel',
    expected: 'same-kernel',
    recipe: acquisition(...stacks(kernel, kernel, variety, uniform), uniform, index),
  };
}

function thicknessAlone(batch: number, index: number): EvidenceCase {
  const uniform = seededUniform(batch, 4, index);
  const kernel = anyKernel(uniform, index);
  const variety: Variety = {
    otherGrid: index % 4 > 1,
    otherHeights: index % 8 > 3,
    layers: index % 2 === 0 ? [1, 3] : [3, 1],
  };
  return {
    group: 'thickness alone',
    expected: 'thickness-alone',
    recipe: acquisition(...stacks(kernel, kernel, variety, uniform), uniform, index),
  };
}

function anyKernel(uniform: () => number, index: number): Kernel {
  return {
    apodisation: APODISATIONS[index % APODISATIONS.length] ?? 'hann',
    cutOffPerMm: 0.5 + uniform() * 0.75,
  };
}

function stacks(
  soft: Kernel,
  sharp: Kernel,
  { otherGrid, otherHeights, layers }: Variety,
  uniform: () => number,
): readonly [StackRecipe, StackRecipe] {
  const grid = {
    centreMm: [10 + 6 * uniform(), -16 + 6 * uniform()],
    fieldOfViewMm: 104 + 12 * uniform(),
    matrix: 260,
  } as const;
  const other = {
    centreMm: [8 + 10 * uniform(), -18 + 10 * uniform()],
    fieldOfViewMm: 100 + 40 * uniform(),
    matrix: uniform() < 0.5 ? 280 : 230,
  } as const;
  const shifted = HEIGHTS_MM.map((z) => z + 1.5);
  const swapped = uniform() < 0.5;
  return [
    {
      kernel: soft,
      grid: otherGrid && swapped ? other : grid,
      heightsMm: HEIGHTS_MM,
      layers: layers[0],
    },
    {
      kernel: sharp,
      grid: otherGrid && !swapped ? other : grid,
      heightsMm: otherHeights ? shifted : HEIGHTS_MM,
      layers: layers[1],
    },
  ];
}

function acquisition(
  first: StackRecipe,
  second: StackRecipe,
  uniform: () => number,
  index: number,
): PairRecipe {
  return {
    seed: Math.floor(uniform() * 2 ** 31),
    scene: index % 4,
    photonsPerRay: 4e4 * 8 ** uniform(),
    blurSigmaMm: uniform() < 0.5 ? 0.15 : 0.25,
    views: 360,
    first,
    second,
  };
}

import { contrastFormula, contrastValue, type Flag, type RegionValue } from '../region/index.js';
import type { PlanContrast } from './plan.js';
import type { Kernel } from './schema.js';

/** What a contrast comes to on both kernels. The value never goes without its formula. */
export interface MeasuredContrast {
  readonly formula: string;
  readonly soft: number | null;
  readonly sharp: number | null;
  readonly flags: readonly Flag[];
}

const KERNEL_NAME: Readonly<Record<Kernel, string>> = {
  soft: 'Soft kernel',
  sharp: 'Sharp kernel',
};

/** A contrast on the kernels asked for. What can't be had is null, and a flag says why; the other kernel goes on. */
export function measuredContrast(
  contrast: PlanContrast,
  kernels: readonly Kernel[],
  measuredOn: (id: string, kernel: Kernel) => RegionValue | null | undefined,
): MeasuredContrast {
  const soft = kernels.includes('soft') ? onKernel(contrast, (id) => measuredOn(id, 'soft')) : NONE;
  const sharp = kernels.includes('sharp')
    ? onKernel(contrast, (id) => measuredOn(id, 'sharp'))
    : NONE;
  return {
    formula: contrastFormula(contrast.noise),
    soft: soft.value,
    sharp: sharp.value,
    flags: merged(soft.flags, sharp.flags),
  };
}

interface OneValue {
  readonly value: number | null;
  readonly flags: readonly Flag[];
}

const NONE: OneValue = { value: null, flags: [] };

function onKernel(
  contrast: PlanContrast,
  measuredOn: (id: string) => RegionValue | null | undefined,
): OneValue {
  const ids = [contrast.lumen, contrast.wall];
  // The reference is asked for only where the formula needs it: one that is named in vain spoils nothing.
  if (contrast.noise === 'reference' && contrast.reference !== undefined)
    ids.push(contrast.reference);
  const missing = ids.flatMap((id): Flag[] => {
    const value = measuredOn(id);
    if (value === undefined) {
      return [
        { code: 'unknown-region', text: `There is no region ${id}, so there is no contrast.` },
      ];
    }
    return value === null
      ? [{ code: 'not-measured', text: `Region ${id} is not measured, so there is no contrast.` }]
      : [];
  });
  const lumen = measuredOn(contrast.lumen);
  const wall = measuredOn(contrast.wall);
  if (missing.length > 0 || !lumen || !wall) return { value: null, flags: missing };
  const reference = contrast.reference === undefined ? undefined : measuredOn(contrast.reference);
  return contrastValue({
    lumen,
    wall,
    ...(reference ? { reference } : {}),
    noise: contrast.noise,
  });
}

/** Flags that hold on both kernels once, the others with the kernel's name before them. */
function merged(soft: readonly Flag[], sharp: readonly Flag[]): readonly Flag[] {
  const has = (flags: readonly Flag[], { code, text }: Flag) =>
    flags.some((flag) => flag.code === code && flag.text === text);
  const named = (kernel: Kernel) => (flag: Flag) => ({
    code: flag.code,
    text: `${KERNEL_NAME[kernel]}: ${flag.text}`,
  });
  return [
    ...soft.filter((flag) => has(sharp, flag)),
    ...soft.filter((flag) => !has(sharp, flag)).map(named('soft')),
    ...sharp.filter((flag) => !has(soft, flag)).map(named('sharp')),
  ];
}

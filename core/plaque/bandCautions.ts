import type { Flag } from '../region/index.js';
import type { BandTable } from './bandTable.js';

/** What a division into bands was made under. */
export interface BandConditions {
  /** Tube voltage of the scan, kV; null where it is not stated. */
  readonly kvp: number | null;
  readonly kernel: 'soft' | 'sharp';
  /** Share of the region's pixels that lie within one blur of the enhanced lumen, 0 to 1; null where it can't be told. */
  readonly spillShare: number | null;
}

/** What must be said beside the bands of a region. No value is ever converted from one tube voltage to another. */
export function bandCautions(
  { kvp, source }: BandTable,
  { kvp: own, kernel, spillShare }: BandConditions,
): readonly Flag[] {
  return [...ofVoltage(kvp, own, source), ...ofKernel(kernel), ...ofSpill(spillShare)];
}

function ofVoltage(
  published: readonly number[],
  own: number | null,
  source: string,
): readonly Flag[] {
  if (own === null) {
    return [
      {
        code: 'bands-kvp-unknown',
        text: 'The tube voltage is not stated: these bands may not hold. State it in the conditions of the note.',
      },
    ];
  }
  if (published.length === 0) {
    return [
      {
        code: 'bands-kvp-unstated',
        text: `The source of these bands does not say for which tube voltage they hold (${source}); this scan has ${own} kV.`,
      },
    ];
  }
  if (published.includes(own)) return [];
  return [
    {
      code: 'bands-other-kvp',
      text: `These bands were published for ${published.join(' and ')} kV and this scan has ${own} kV: CT numbers differ, and nothing is converted.`,
    },
  ];
}

/** Ex vivo, the same plaque read 74.7 to 48.5 HU from the softest to the sharpest of four kernels. */
function ofKernel(kernel: 'soft' | 'sharp'): readonly Flag[] {
  return kernel === 'soft'
    ? []
    : [
        {
          code: 'bands-sharp-kernel',
          text: 'Measured on the sharp kernel: sharper kernels shift plaque density (Cademartiri 2007, PMC1914219). Use the soft one.',
        },
      ];
}

function ofSpill(share: number | null): readonly Flag[] {
  if (share === null || share <= 0) return [];
  const percent = Math.max(1, Math.round(100 * share));
  return [
    {
      code: 'bands-lumen-spills',
      text: `${percent} % of the pixels lie within one blur of the enhanced lumen, which raises them: draw the outline farther from it.`,
    },
  ];
}

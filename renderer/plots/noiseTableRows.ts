import { formatFixed, formatQuantity, NO_VALUE } from '../../core/format/index.js';
import type { Kernel, NoteEdge } from '../../core/note/index.js';
import type { KernelTexture } from '../../core/quality/index.js';
import type { NoiseAreaRow } from '../state/noiseRows.js';

/** One line of the panel's table: a number of both kernels. */
export interface NoiseTableRow {
  readonly name: string;
  readonly unit: string;
  /** What the number is, in plain words. */
  readonly title: string;
  readonly soft: NoiseTableCell;
  readonly sharp: NoiseTableCell;
}

export interface NoiseTableCell {
  readonly text: string;
  /** Why there is no value; '' where there is one. */
  readonly reason: string;
}

type Textures = { readonly [K in Kernel]: KernelTexture | undefined };

/** Noise and sharpness of both kernels, over all areas and edges that were measured by themselves. */
export function textureRows(textures: Textures, area: NoiseAreaRow | undefined): NoiseTableRow[] {
  const both = (
    pick: (texture: KernelTexture) => number | null,
    digits: number,
    missing: string,
  ): Pick<NoiseTableRow, Kernel> => ({
    soft: cell(textures.soft && pick(textures.soft), digits, missing),
    sharp: cell(textures.sharp && pick(textures.sharp), digits, missing),
  });
  const none = 'Not measured: too few uniform areas in both stacks.';
  const noEdge = 'Both stacks show no clean edges in common. Draw an edge line.';
  return [
    ...(area === undefined
      ? []
      : [
          {
            name: `SD of area ${area.number}`,
            unit: 'HU',
            title: 'Noise SD in this uniform area, after its trend was taken away.',
            soft: cell(area.softSdHu, 1, none),
            sharp: cell(area.sharpSdHu, 1, none),
          },
        ]),
    {
      name: 'Noise SD',
      unit: 'HU',
      title:
        'SD in the uniform areas, pooled over all of them, after the trend of each was taken away.',
      ...both(({ noiseSdHu }) => noiseSdHu, 1, none),
    },
    {
      name: 'Mean frequency',
      unit: '/mm',
      title: 'Mean frequency of the noise power spectrum: the higher, the finer the grain.',
      ...both(({ meanPerMm }) => meanPerMm, 2, none),
    },
    {
      name: 'Peak frequency',
      unit: '/mm',
      title: 'Frequency at which the noise power spectrum is highest.',
      ...both(({ peakPerMm }) => peakPerMm, 2, none),
    },
    {
      name: 'Edge rise 10–90 %',
      unit: 'mm',
      title:
        'Distance over which edges rise from 10 to 90 %, over the edges that were found in both stacks.',
      ...both(({ riseMm }) => riseMm, 2, noEdge),
    },
    {
      name: 'Blur FWHM',
      unit: 'mm',
      title: 'Full width at half maximum of the Gaussian blur that has this rise.',
      ...both(({ blurFwhmMm }) => blurFwhmMm, 2, noEdge),
    },
  ];
}

/** What one edge line measured on both kernels. */
export function edgeRows({ soft, sharp }: Pick<NoteEdge, Kernel>): NoiseTableRow[] {
  type Value = NonNullable<NoteEdge['soft']>;
  const both = (text: (value: Value) => string): Pick<NoiseTableRow, Kernel> => ({
    soft: edgeCell(soft, text),
    sharp: edgeCell(sharp, text),
  });
  const noisy = 'Noise hides where the profile crosses 10 and 90 %.';
  const crossings = both(({ crossingsMm }) => formatFixed(crossingsMm, 2));
  const explained = (of: NoiseTableCell): NoiseTableCell =>
    of.text === NO_VALUE && of.reason === '' ? { ...of, reason: noisy } : of;
  return [
    {
      name: 'Edge rise 10–90 %',
      unit: 'mm',
      title:
        'Distance over which the edge rises from 10 to 90 %, at right angles to it: of the blurred step that fits best, ± its standard error.',
      ...both(({ riseMm, riseErrorMm }) => withError(riseMm, riseErrorMm)),
    },
    {
      name: 'Blur FWHM',
      unit: 'mm',
      title:
        'Full width at half maximum of the Gaussian blur with this rise, ± its standard error: rise / 2.5631 · 2.3548.',
      ...both(({ blurFwhmMm, blurErrorMm }) => withError(blurFwhmMm, blurErrorMm)),
    },
    {
      name: 'Crossings',
      unit: 'mm',
      title:
        'The 10–90 % distance read off the measured profile itself. Much another value than the rise: the kernel does more than blur.',
      soft: explained(crossings.soft),
      sharp: explained(crossings.sharp),
    },
    {
      name: 'Step',
      unit: 'HU',
      title: 'Level behind the edge less the level before it, from the start of the line on.',
      ...both(({ fromHu, toHu }) =>
        fromHu === null || toHu === null ? NO_VALUE : formatQuantity(toHu - fromHu, 'hu'),
      ),
    },
  ];
}

function withError(value: number | null, error: number | null): string {
  if (value === null) return NO_VALUE;
  return error === null
    ? formatFixed(value, 2)
    : `${formatFixed(value, 2)} ± ${formatFixed(error, 2)}`;
}

function cell(value: number | null | undefined, digits: number, missing: string): NoiseTableCell {
  const text = formatFixed(value, digits);
  return { text, reason: text === NO_VALUE ? missing : '' };
}

function edgeCell(
  value: NoteEdge['soft'],
  text: (value: NonNullable<NoteEdge['soft']>) => string,
): NoiseTableCell {
  if (value === null) return { text: NO_VALUE, reason: 'Not measured on this kernel yet.' };
  const reason = value.riseMm === null ? (value.flags[0]?.text ?? '') : '';
  return { text: text(value), reason };
}

import { formatFixed, formatQuantity } from '../../core/format/index.js';
import type { Kernel, NoteProfile } from '../../core/note/index.js';
import type { ProfileValue } from '../../core/stent/index.js';
import type { Across, AcrossSeries } from './acrossDrawing.js';

/** A measured line on both kernels as a picture: the curves, the struts, the half-height points and the nominal width. */
export function acrossProfile(
  profile: NoteProfile,
  values: { readonly [K in Kernel]: ProfileValue | undefined },
): Across {
  const series = (['soft', 'sharp'] as const).flatMap((kernel) => seriesOf(kernel, values[kernel]));
  return {
    label: profile.label,
    series,
    spans: nominalSpan(profile, values.sharp ?? values.soft),
    uprightMm: [],
    axis: 'mm along the line',
    summary: `${profile.label}. ${words('Soft', values.soft)} ${words('Sharp', values.sharp)}`,
  };
}

function seriesOf(kernel: Kernel, value: ProfileValue | undefined): readonly AcrossSeries[] {
  const samples = value?.samples ?? null;
  if (value === undefined || samples === null) return [];
  const measured = samples.atMm.map((mm, index) => ({ mm, hu: samples.hu[index] ?? Number.NaN }));
  const huAt = (mm: number): number =>
    measured.reduce((best, point) =>
      Math.abs(point.mm - mm) < Math.abs(best.mm - mm) ? point : best,
    ).hu;
  const marks = [
    ...value.struts.map(({ atMm, peakHu }) => ({ mm: atMm, hu: peakHu, name: 'Strut' })),
    ...(value.halfHeightMm ?? []).map((mm) => ({ mm, hu: huAt(mm), name: 'Half height' })),
  ];
  return [{ kernel, measured, fitted: [], marks }];
}

function nominalSpan({ nominalMm }: NoteProfile, value: ProfileValue | undefined): Across['spans'] {
  const ends = value?.halfHeightMm ?? null;
  if (nominalMm === undefined || ends === null) return [];
  const middle = (ends[0] + ends[1]) / 2;
  const name = `nominal ${formatFixed(nominalMm, 2)} mm`;
  return [{ fromMm: middle - nominalMm / 2, toMm: middle + nominalMm / 2, name }];
}

function words(name: string, value: ProfileValue | undefined): string {
  if (value?.visibleWidthMm == null) return `${name}: no visible width.`;
  const peaks =
    value.peakDistanceMm === null
      ? ''
      : `, strut peaks ${formatQuantity(value.peakDistanceMm, 'lengthMm')} mm apart`;
  return `${name}: visible width ${formatQuantity(value.visibleWidthMm, 'lengthMm')} mm${peaks}.`;
}

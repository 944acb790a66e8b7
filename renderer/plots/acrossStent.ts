import { formatFixed } from '../../core/format/index.js';
import type { NoteStent } from '../../core/note/index.js';
import { stentSentence } from '../../core/report/stentSentence.js';
import type { FittedStent } from '../../core/stent/index.js';
import type { Across, AcrossPoint } from './acrossDrawing.js';

/** The picture reaches as far as the measured rings do. */
type Rings = { readonly radiusMm: readonly number[] };

/** A fitted stent as a picture: means of rings around its axis, mirrored to both sides, with the fitted curves. */
export function acrossStent(stent: NoteStent, fit: FittedStent): Across | undefined {
  if (fit.reason !== undefined) return undefined;
  const reachMm = Math.max(...fit.kernels.flatMap(({ profile }) => profile.radiusMm));
  const series = fit.kernels.map(({ profile, model }, index) => ({
    kernel: index === 0 ? ('soft' as const) : ('sharp' as const),
    measured: mirrored(profile, profile.measuredHu, reachMm),
    fitted: mirrored(model, model.hu, reachMm),
    marks: [],
  }));
  const radiusMm = fit.strutDiameterMm.value / 2;
  return {
    label: stent.label,
    series,
    spans: [
      { fromMm: -radiusMm, toMm: radiusMm, name: `struts ${formatFixed(2 * radiusMm, 2)} mm` },
      ...(stent.nominalMm === undefined
        ? []
        : [
            {
              fromMm: -stent.nominalMm / 2,
              toMm: stent.nominalMm / 2,
              name: `nominal ${formatFixed(stent.nominalMm, 2)} mm`,
            },
          ]),
    ],
    uprightMm: [-radiusMm, radiusMm],
    axis: 'mm from the axis',
    summary: `${stent.label}. ${stentSentence(stent)}`,
  };
}

function mirrored(
  { radiusMm }: Rings,
  hu: readonly number[],
  reachMm: number,
): readonly AcrossPoint[] {
  const side = radiusMm.flatMap((mm, index) =>
    mm <= reachMm ? [{ mm, hu: hu[index] ?? Number.NaN }] : [],
  );
  const other = side
    .filter(({ mm }) => mm > 0)
    .map(({ mm, hu: value }) => ({ mm: -mm, hu: value }));
  return [...other.reverse(), ...side];
}

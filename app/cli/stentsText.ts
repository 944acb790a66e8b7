import { formatQuantity, NO_VALUE } from '../../core/format/index.js';
import type { MeasuredPlan } from '../../core/note/index.js';
import { STENT_CAUTION, stentSentence } from '../../core/report/index.js';
import { textTable } from './textTable.js';

/** Fitted stents for people: a table of those with values, a sentence for each, and what must be said of fits. */
export function stentsText(stents: MeasuredPlan['stents']): {
  /** Empty where no stent has values. */
  readonly table: string;
  readonly remarks: readonly string[];
} {
  const fitted = stents.filter(({ strutDiameterMm }) => strutDiameterMm !== null);
  const estimate = (
    of: MeasuredPlan['stents'][number]['lumenHu'],
    digits: Parameters<typeof formatQuantity>[1],
  ): string =>
    of === null
      ? NO_VALUE
      : `${formatQuantity(of.value, digits)} ± ${formatQuantity(of.se, digits)}`;
  return {
    table:
      fitted.length === 0
        ? ''
        : textTable(
            [
              'Stent',
              'Strut diameter mm',
              'Lumen HU',
              'Wall mm',
              'Wall HU',
              'Strut mass HU·mm',
              'Blur mm',
              'χ²',
              'DF',
              'Tilt °',
              'Slices',
            ],
            fitted.map((stent) => [
              stent.id,
              estimate(stent.strutDiameterMm, 'lengthMm'),
              estimate(stent.lumenHu, 'fittedHu'),
              estimate(stent.wallWidthMm, 'lengthMm'),
              estimate(stent.wallHu, 'fittedHu'),
              estimate(stent.strutMassHuMm, 'massHuMm'),
              estimate(stent.blurSigmaMm, 'lengthMm'),
              formatQuantity(stent.goodness?.chiSquare, 'ratio'),
              stent.goodness?.degreesOfFreedom ?? NO_VALUE,
              formatQuantity(stent.tiltDeg, 'angleDeg'),
              stent.slices,
            ]),
          ),
    remarks: [
      ...stents.map(({ id, reason, ...values }) => {
        const fit = { ...values, reason: reason === undefined ? null : { code: '', text: reason } };
        return `${id}: ${stentSentence({ fit })}`;
      }),
      ...(fitted.length === 0 ? [] : [STENT_CAUTION]),
    ],
  };
}

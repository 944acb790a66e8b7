import { formatQuantity, NO_VALUE, type Quantity } from '../format/index.js';
import type { NoteStent, StentValue } from '../note/stentSchema.js';
import type { Estimated } from '../stent/index.js';

/** Stands wherever a fitted value is exported. */
export const STENT_CAUTION =
  'Fitted stent values were tried on synthetic phantoms only; they suppose a linear reconstruction and a vessel at rest. A physician checks each against the images; the local protocol decides.';

/**
 * A fitted stent in a sentence: its two values with their standard errors and what a plain region reads there, or why
 * there is none. For exports and the window alike.
 */
export function stentSentence({ fit }: Pick<NoteStent, 'fit'>): string {
  if (fit === null) return 'No fitted stent: it has not been fitted yet.';
  if (fit.reason !== null) return `No fitted stent: ${fit.reason.text}`;
  const diameter = plusMinus(fit.strutDiameterMm, 'lengthMm', 'mm');
  const lumen = plusMinus(fit.lumenHu, 'fittedHu', 'HU');
  return `Fitted: strut diameter ${diameter}, lumen ${lumen} (standard errors)${plainClause(fit)}.`;
}

function plainClause({ plain }: StentValue): string {
  const [soft, sharp] = [plain?.softHu ?? null, plain?.sharpHu ?? null].map((hu) =>
    hu === null ? null : `${formatQuantity(hu, 'fittedHu')} HU`,
  );
  if (!soft && !sharp) return '';
  if (!soft) return `; the plain region on the sharp kernel reads ${sharp}`;
  const also = sharp ? `, on the sharp one ${sharp}` : '';
  return `; the plain region on the soft kernel reads ${soft}${also}`;
}

function plusMinus(of: Estimated | null, digits: Quantity, unit: string): string {
  if (of === null) return NO_VALUE;
  return `${formatQuantity(of.value, digits)} ± ${formatQuantity(of.se, digits)} ${unit}`;
}

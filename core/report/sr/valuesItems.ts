import { MINUS } from '../../format/index.js';
import { BAND_SHARE } from '../densityQuantities.js';
import { printedAs } from '../printedAs.js';
import type { KernelValues } from '../tableRow.js';
import { type Code, dcm } from './code.js';
import { type ContentItem, codeItem, textItem } from './contentItem.js';
import { NO_VALUE_CODES, numberItem } from './numberItem.js';
import { OWN } from './ownCodes.js';
import { QUANTITY_CODES, type QuantityCode, unitCode } from './quantityCodes.js';

/** The numbers of one row of the measurement table on one kernel, each with its statistic and its formula. */
export function valuesItems(values: KernelValues): readonly ContentItem[] {
  return values.quantities.map(({ quantity, value, unit, formula }) => {
    const code: QuantityCode | undefined =
      QUANTITY_CODES[quantity] ??
      (quantity.startsWith(BAND_SHARE) ? { name: OWN.bandShare } : undefined);
    if (code === undefined) throw new RangeError(`no code for quantity: ${quantity}`);
    return numberItem({
      relationship: 'CONTAINS',
      name: code.name,
      unit: code.unit ?? unitCode(unit),
      value,
      print: (number) => printedAs(quantity, number).replaceAll(MINUS, '-'),
      missing: missingCode(values, quantity),
      children: [
        ...(code.derivation === undefined
          ? []
          : [codeItem('HAS CONCEPT MOD', dcm('121401', 'Derivation'), code.derivation)]),
        ...(formula === '' ? [] : [textItem('HAS CONCEPT MOD', OWN.formula, formula)]),
      ],
    });
  });
}

/** Why a quantity has no value: a division by an SD of zero, nothing to measure, or else a failure. */
function missingCode({ quantities }: KernelValues, quantity: string): Code {
  const numberOf = (name: string) => quantities.find((one) => one.quantity === name)?.value ?? null;
  if (quantity === 'SNR' && numberOf('SD') === 0) return NO_VALUE_CODES.divideByZero;
  // A lumen without struts has none to measure, and without a nominal diameter there is no narrowing.
  const hasWidth = numberOf('visible width') !== null;
  const hasStruts = numberOf('strut peak distance') !== null;
  const isOfStruts = quantity === 'strut peak distance' || quantity === 'strut width';
  return hasWidth && (quantity === 'artificial narrowing' || (isOfStruts && !hasStruts))
    ? NO_VALUE_CODES.notAttempted
    : NO_VALUE_CODES.failure;
}

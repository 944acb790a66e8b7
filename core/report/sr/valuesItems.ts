import { MINUS } from '../../format/index.js';
import { BAND_SHARE } from '../densityQuantities.js';
import type { KernelValues } from '../measurementTable.js';
import { printedAs } from '../regionQuantities.js';
import { dcm } from './code.js';
import { type ContentItem, codeItem, textItem } from './contentItem.js';
import { NO_VALUE_CODES, numberItem } from './numberItem.js';
import { OWN } from './ownCodes.js';
import { QUANTITY_CODES, unitCode } from './quantityCodes.js';

/** The numbers of one row of the measurement table on one kernel, each with its statistic and its formula. */
export function valuesItems(values: KernelValues): readonly ContentItem[] {
  const sd = values.quantities.find(({ quantity }) => quantity === 'SD')?.value;
  return values.quantities.map(({ quantity, value, unit, formula }) => {
    const code =
      QUANTITY_CODES[quantity] ??
      (quantity.startsWith(BAND_SHARE) ? { name: OWN.bandShare } : undefined);
    if (code === undefined) throw new RangeError(`no code for quantity: ${quantity}`);
    return numberItem({
      relationship: 'CONTAINS',
      name: code.name,
      unit: unitCode(unit),
      value,
      print: (number) => printedAs(quantity, number).replaceAll(MINUS, '-'),
      missing:
        quantity === 'SNR' && sd === 0 ? NO_VALUE_CODES.divideByZero : NO_VALUE_CODES.failure,
      children: [
        ...(code.derivation === undefined
          ? []
          : [codeItem('HAS CONCEPT MOD', dcm('121401', 'Derivation'), code.derivation)]),
        ...(formula === '' ? [] : [textItem('HAS CONCEPT MOD', OWN.formula, formula)]),
      ],
    });
  });
}

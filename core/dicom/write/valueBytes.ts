import { decimalText, integerText } from './decimalText.js';
import type {
  BinaryElement,
  BinaryVr,
  BulkElement,
  DecimalTextElement,
  TextElement,
} from './element.js';
import { utf8 } from './utf8.js';

/** A value's bytes, padded to even length the way its VR asks for (PS3.5 6.2: UI with NUL, text with a blank). */
export function valueBytes(
  element: TextElement | DecimalTextElement | BinaryElement | BulkElement,
  littleEndian: boolean,
): Uint8Array {
  switch (element.vr) {
    case 'DS':
    case 'IS':
      return padded(utf8(numbersAsText(element)), 0x20);
    case 'AT':
    case 'FD':
    case 'FL':
    case 'SL':
    case 'SS':
    case 'UL':
    case 'US':
      return binaryBytes(element, littleEndian);
    case 'OB':
    case 'OD':
    case 'OF':
    case 'OL':
    case 'OV':
    case 'OW':
    case 'UN':
      return padded(bulkBytes(element.value, littleEndian), 0);
    default:
      return padded(textBytes(element.value), element.vr === 'UI' ? 0 : 0x20);
  }
}

function textBytes(value: TextElement['value']): Uint8Array {
  if (value instanceof Uint8Array) return value;
  return utf8(typeof value === 'string' ? value : value.join('\\'));
}

function numbersAsText({ vr, value }: DecimalTextElement): string {
  const write = vr === 'DS' ? decimalText : integerText;
  const values = typeof value === 'number' || typeof value === 'string' ? [value] : value;
  return values.map((one) => (typeof one === 'string' ? one : write(one))).join('\\');
}

const BINARY_SIZE: Readonly<Record<BinaryVr, number>> = {
  AT: 4,
  FD: 8,
  FL: 4,
  SL: 4,
  SS: 2,
  UL: 4,
  US: 2,
};

function binaryBytes({ vr, value }: BinaryElement, littleEndian: boolean): Uint8Array {
  const values = typeof value === 'number' ? [value] : value;
  const size = BINARY_SIZE[vr];
  const bytes = new Uint8Array(values.length * size);
  const view = new DataView(bytes.buffer);
  for (const [index, one] of values.entries()) {
    const at = index * size;
    if (vr === 'FD') view.setFloat64(at, one, littleEndian);
    else if (vr === 'FL') view.setFloat32(at, one, littleEndian);
    else if (vr === 'AT') {
      view.setUint16(at, one >>> 16, littleEndian);
      view.setUint16(at + 2, one & 0xffff, littleEndian);
    } else {
      checkRange(vr, one);
      if (size === 2) view.setUint16(at, one, littleEndian);
      else view.setUint32(at, one, littleEndian);
    }
  }
  return bytes;
}

function checkRange(vr: 'SL' | 'SS' | 'UL' | 'US', value: number): void {
  const span = 2 ** (BINARY_SIZE[vr] * 8);
  const low = vr.startsWith('S') ? -span / 2 : 0;
  if (!Number.isInteger(value) || value < low || value >= low + span)
    throw new RangeError(`invalid ${vr} value: ${value}`);
}

function bulkBytes(value: BulkElement['value'], littleEndian: boolean): Uint8Array {
  if (value instanceof Uint8Array) return value;
  const bytes = new Uint8Array(value.length * 2);
  const view = new DataView(bytes.buffer);
  for (let index = 0; index < value.length; index += 1)
    view.setUint16(index * 2, value[index] ?? 0, littleEndian);
  return bytes;
}

function padded(bytes: Uint8Array, filler: number): Uint8Array {
  if (bytes.length % 2 === 0) return bytes;
  const even = new Uint8Array(bytes.length + 1);
  even.set(bytes);
  even[bytes.length] = filler;
  return even;
}

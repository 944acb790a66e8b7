/**
 * The canonical form of a JSON value (RFC 8785, JSON Canonicalization Scheme): keys in the order of their UTF-16
 * code units, no white space, numbers and strings as ECMAScript writes them. The same content has the same text,
 * whoever wrote it. Throws for what is no I-JSON (RFC 7493): numbers that are not finite, lone surrogates, values
 * that JSON has no form for. A property that is undefined is left out, as JSON does.
 */
export function canonicalJson(value: unknown): string {
  if (value === null || typeof value === 'boolean') return JSON.stringify(value);
  if (typeof value === 'number') return numberText(value);
  if (typeof value === 'string') return stringText(value);
  if (Array.isArray(value)) return `[${value.map(canonicalJson).join(',')}]`;
  if (typeof value === 'object') {
    const members = Object.entries(value)
      .filter(([, member]) => member !== undefined)
      .sort(([a], [b]) => (a < b ? -1 : 1))
      .map(([key, member]) => `${stringText(key)}:${canonicalJson(member)}`);
    return `{${members.join(',')}}`;
  }
  throw new TypeError(`no JSON value: ${typeof value}`);
}

function numberText(value: number): string {
  if (!Number.isFinite(value)) throw new RangeError(`not a finite number: ${value}`);
  return JSON.stringify(value);
}

function stringText(value: string): string {
  if (LONE_SURROGATE.test(value)) throw new RangeError('text holds half a surrogate pair');
  return JSON.stringify(value);
}

const LONE_SURROGATE = /[\uD800-\uDBFF](?![\uDC00-\uDFFF])|(?<![\uD800-\uDBFF])[\uDC00-\uDFFF]/;

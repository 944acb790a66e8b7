/**
 * A value with every part that equals the same part of `before` replaced by that part itself: slices of one
 * series say the same of their patient and scanner, and a thousand copies of it would have to be kept and
 * sent between threads. Neither value is changed. For plain data: primitives, arrays, objects.
 */
export function shareEqual<T>(before: unknown, value: T): T {
  return share(before, value) as T;
}

function share(before: unknown, value: unknown): unknown {
  if (isEqual(before, value)) return before;
  if (Array.isArray(value)) {
    return Array.isArray(before) ? value.map((part, index) => share(before[index], part)) : value;
  }
  if (!isRecord(before) || !isRecord(value)) return value;
  const shared: Record<string, unknown> = {};
  for (const key in value) shared[key] = share(before[key], value[key]);
  return shared;
}

function isEqual(a: unknown, b: unknown): boolean {
  if (Object.is(a, b)) return true;
  if (Array.isArray(a)) {
    if (!Array.isArray(b) || a.length !== b.length) return false;
    return a.every((part, index) => isEqual(part, b[index]));
  }
  if (!isRecord(a) || !isRecord(b)) return false;
  let more = 0;
  for (const key in a) {
    if (!Object.hasOwn(b, key) || !isEqual(a[key], b[key])) return false;
    more++;
  }
  for (const _ in b) more--;
  return more === 0;
}

function isRecord(value: unknown): value is Readonly<Record<string, unknown>> {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

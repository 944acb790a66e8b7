/** A length that a reader typed, mm: a decimal comma or point, no sign. null for an empty text, undefined for no length. */
export function parseMm(text: string): number | null | undefined {
  const trimmed = text.trim().replace(/\s*mm$/i, '');
  if (trimmed === '') return null;
  if (!/^\d{1,3}([.,]\d{1,3})?$/.test(trimmed)) return undefined;
  const value = Number(trimmed.replace(',', '.'));
  return value > 0 ? value : undefined;
}

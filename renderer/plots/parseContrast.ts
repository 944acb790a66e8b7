/** A contrast that a reader typed, HU: a decimal comma or point, a sign or none. undefined for no contrast. */
export function parseContrast(text: string): number | undefined {
  const trimmed = text.trim().replace(/\s*HU$/i, '');
  if (!/^[-−+]?\d{1,4}([.,]\d{1,2})?$/.test(trimmed)) return undefined;
  const value = Number(trimmed.replace(/^[-−+]/, '').replace(',', '.'));
  return value > 0 ? value : undefined;
}

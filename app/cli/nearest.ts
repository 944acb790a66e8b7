/** The known word that a mistyped one most likely means; undefined when none is near. */
export function nearest(typed: string, known: readonly string[]): string | undefined {
  const most = Math.max(1, Math.floor(typed.length / 3));
  const ranked = known
    .map((word) => ({ word, distance: editDistance(typed.toLowerCase(), word.toLowerCase()) }))
    .filter(({ word, distance }) => distance <= most || word.startsWith(typed.toLowerCase()))
    .sort((a, b) => a.distance - b.distance);
  return ranked[0]?.word;
}

/**
 * Least number of characters put in, taken out, replaced or swapped with their neighbour to make one word the other
 * (Damerau 1964, Commun ACM 7:171; no part is changed twice).
 */
export function editDistance(a: string, b: string): number {
  const table = [Array.from({ length: b.length + 1 }, (_, j) => j)];
  const at = (i: number, j: number) => table[i]?.[j] ?? Number.POSITIVE_INFINITY;
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    table.push(row);
    for (let j = 1; j <= b.length; j++) {
      const swapped = i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1];
      row.push(
        Math.min(
          at(i - 1, j - 1) + (a[i - 1] === b[j - 1] ? 0 : 1),
          at(i - 1, j) + 1,
          at(i, j - 1) + 1,
          swapped ? at(i - 2, j - 2) + 1 : Number.POSITIVE_INFINITY,
        ),
      );
    }
  }
  return at(a.length, b.length);
}

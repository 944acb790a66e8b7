import { describe, expect, it } from 'vitest';
import {
  BAND_TABLES,
  bandCautions,
  bandEdges,
  bandShare,
  bandShares,
  bandTable,
} from '../../../../core/plaque/index.js';

const table = (id: string) => {
  const found = bandTable(id);
  if (found === undefined) throw new Error(`no table: ${id}`);
  return found;
};

/** Which band a single value falls into; −1 for none. */
const bandOf = (id: string, hu: number): number => bandShares([hu], table(id), 1).pixels.indexOf(1);

describe('Bands of plaque density', () => {
  // Edges as published: van Rosendael 2021, JAMA Cardiol.
  it.each([
    [-31, -1],
    [-30, 0],
    [75, 0],
    [76, 1],
    [130, 1],
    [131, 2],
    [350, 2],
    [351, 3],
    [700, 3],
    [701, 4],
    [1000, 4],
    [1001, 5],
  ])('put %d HU of the six classes into band %d', (hu, band) => {
    expect(bandOf('six-classes', hu)).toBe(band);
  });

  // Edges from memory; the threshold of 30 HU: consensus PMC10973734.
  it.each([
    ['four-classes', 30, 0],
    ['four-classes', 31, 1],
    ['four-classes', 350, 2],
    ['four-classes', 351, 3],
    ['low-attenuation', -400, 0],
    ['low-attenuation', 29, 0],
    ['low-attenuation', 30, 1],
  ])('of the table %s put %d HU into band %d', (id, hu, band) => {
    expect(bandOf(id, hu)).toBe(band);
  });

  it('count a value between two whole edges to the upper band', () => {
    expect(bandOf('six-classes', 75.4)).toBe(1);
    expect(bandOf('six-classes', 75)).toBe(0);
  });

  it('share out all pixels of a region, and tell those that are in none', () => {
    const shares = bandShares([-100, 20, 20, 100, 900], table('six-classes'), 0.15);
    expect(shares).toEqual({
      pixels: [2, 1, 0, 0, 1, 0],
      unassigned: 1,
      n: 5,
      pixelAreaMm2: 0.15,
    });
    expect(bandShare(shares, 0)).toBe(0.4);
    expect(bandShare(bandShares([], table('six-classes'), 0.15), 0)).toBeUndefined();
  });

  it('have ascending edges, a source, and edges that can be read', () => {
    for (const { bands, source, id } of BAND_TABLES) {
      const edges = bands.map(({ toHu }) => toHu ?? Infinity);
      expect(edges, id).toEqual([...edges].sort((a, b) => a - b));
      expect(edges.at(-1), id).toBe(Infinity);
      expect(source, id).not.toBe('');
    }
    const six = table('six-classes');
    expect(six.bands.map((_, index) => bandEdges(six, index))).toEqual([
      '−30 to 75 HU',
      '76 to 130 HU',
      '131 to 350 HU',
      '351 to 700 HU',
      '701 to 1000 HU',
      'from 1001 HU',
    ]);
  });
});

describe('What is said beside the bands', () => {
  const codes = (id: string, change: Partial<Parameters<typeof bandCautions>[1]>) =>
    bandCautions(table(id), { kvp: 120, kernel: 'soft', spillShare: 0, ...change }).map(
      ({ code }) => code,
    );

  it('is nothing where voltage and kernel are those that they hold for', () => {
    expect(codes('four-classes', {})).toEqual([]);
    expect(codes('low-attenuation', { kvp: 100 })).toEqual([]);
  });

  it('warns of another voltage, an unknown one, and a source that names none', () => {
    expect(codes('four-classes', { kvp: 80 })).toEqual(['bands-other-kvp']);
    expect(codes('four-classes', { kvp: null })).toEqual(['bands-kvp-unknown']);
    expect(codes('six-classes', {})).toEqual(['bands-kvp-unstated']);
  });

  it('warns of the sharp kernel and of the lumen that spills in', () => {
    expect(codes('four-classes', { kernel: 'sharp', spillShare: 0.2 })).toEqual([
      'bands-sharp-kernel',
      'bands-lumen-spills',
    ]);
  });
});

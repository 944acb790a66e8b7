import { describe, expect, it } from 'vitest';
import {
  addRegion,
  chooseBands,
  measuredDensities,
  type Note,
  parseNote,
  withDensities,
} from '../../../../core/note/index.js';
import { FLAGS, type NoiseOfStack } from '../../../../core/region/index.js';
import { ellipse, emptyNote, LATER, NOW, pair, values } from './noteFixture.js';

const images = await pair();

/** A plaque about columns 4 to 12 of the fixture, whose soft HU are 100 + column. */
function withPlaque(): Note {
  const shape = ellipse(8, 9, [1.1, 0.4]);
  return addRegion(emptyNote(images), { role: 'plaque', shape, ...values(images, shape) }, NOW)
    .note;
}

const source = (noise: NoiseOfStack = FLAGS.noStandardError) => ({
  soft: images.soft,
  storedOf: (index: number) => images.storedOf(images.soft, index),
  noise,
});

describe('The density of a plaque', () => {
  it('is counted by the bands of the table, on the soft kernel', () => {
    // One row of nine pixels: 104 … 112 HU, all fibro-fatty (76 to 130) of the six classes.
    expect(measuredDensities(withPlaque(), source())).toEqual([
      {
        regionId: 'P1',
        table: 'six-classes',
        n: 9,
        pixels: [0, 9, 0, 0, 0, 0],
        unassigned: 0,
        pixelAreaMm2: 0.125,
        flags: [expect.objectContaining({ code: 'bands-kvp-unstated' })],
      },
    ]);
  });

  it('changes with the table that is chosen in one place', () => {
    const note = chooseBands(withPlaque(), 'four-classes', LATER);
    const [density] = measuredDensities(note, source());
    expect([density?.table, density?.pixels, density?.flags]).toEqual([
      'four-classes',
      [0, 9, 0, 0],
      [],
    ]);
    expect(chooseBands(note, 'no-such-table', LATER)).toBe(note);
  });

  it('says when the enhanced lumen of its finding lies within one blur', () => {
    const plaque = withPlaque();
    const lumen = ellipse(20, 9);
    const { note } = addRegion(
      plaque,
      { role: 'lumen', shape: lumen, ...values(images, lumen) },
      NOW,
    );
    const together: Note = {
      ...chooseBands(note, 'four-classes', LATER),
      regions: note.regions.map((region) => ({ ...region, findingId: 'D1' })),
    };
    // Plaque 108 HU, lumen 120 HU: columns from 14 on count as lumen, the plaque ends at column 12.
    const blurred = (blurFwhmMm: number): NoiseOfStack => ({
      noiseSdHu: 1,
      areas: 4,
      frequencyPerMm: [0.1],
      powerHu2Mm2: [1],
      meanPerMm: 0.1,
      peakPerMm: 0.1,
      riseMm: blurFwhmMm,
      blurFwhmMm,
    });
    const codes = (blurMm: number) =>
      measuredDensities(together, source(blurred(blurMm)))[0]?.flags.map(({ code }) => code);
    expect(codes(0.4)).toEqual([]);
    expect(codes(0.5)).toEqual(['bands-lumen-spills']);
  });

  it('is kept while its slice is not there, and is not had of a region on no slice', () => {
    const measured = withDensities(withPlaque(), measuredDensities(withPlaque(), source()), LATER);
    const none = { ...source(), storedOf: () => undefined };
    expect(measuredDensities(measured, none)).toEqual(measured.densities);
    const beside = measured.regions.map((region) => ({ ...region, shape: far(region.shape) }));
    expect(measuredDensities({ ...measured, regions: beside }, source())).toEqual([]);
  });

  it('is saved only where it differs, and a note of an earlier version has none', () => {
    const measured = withDensities(withPlaque(), measuredDensities(withPlaque(), source()), LATER);
    expect(withDensities(measured, measuredDensities(measured, source()), 'x')).toBe(measured);
    const { densities: _none, bandTable: _six, ...older } = measured;
    const parsed = parseNote(JSON.parse(JSON.stringify(older)));
    expect(parsed).toMatchObject({ ok: true, value: { densities: [], bandTable: 'six-classes' } });
  });
});

function far(shape: Note['regions'][number]['shape']): Note['regions'][number]['shape'] {
  return shape.kind === 'ellipse' ? { ...shape, centreMm: [0, 0, 99] } : shape;
}

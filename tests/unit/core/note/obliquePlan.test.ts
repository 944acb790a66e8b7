import { describe, expect, it } from 'vitest';
import { measurePlan, type Plan, parsePlan, slicesNeeded } from '../../../../core/note/index.js';
import { pair, SHARP_SERIES, SOFT_SERIES } from './noteFixture.js';

// Soft is 100 HU + column, columns of 0.25 mm from x = −10: 140 HU at x = 0, 4 HU a mm, whatever y and z.
const images = await pair();

/** A plane at right angles to a course that leans in y alone: it runs along x, through (−5, −16, 1.5). */
const PLANE = {
  id: 'O1',
  courseMm: [
    [-5, -16.5, 0.5],
    [-5, -15.5, 2.5],
  ],
} as const;

function plan(change: Partial<Plan> = {}): Plan {
  return {
    plan: 1,
    pair: { soft: { seriesInstanceUid: SOFT_SERIES }, sharp: { seriesInstanceUid: SHARP_SERIES } },
    regions: [
      {
        id: 'L1',
        role: 'lumen',
        plane: 'O1',
        // In the plane: u along x, v across the lean (0, 2, −1)/√5.
        shape: {
          kind: 'ellipse',
          centreMm: [-5, -16, 1.5],
          u: [1, 0, 0],
          v: [0, 2 / Math.sqrt(5), -1 / Math.sqrt(5)],
          radiiMm: [0.9, 0.9],
        },
      },
    ],
    contrasts: [],
    profiles: [],
    stents: [],
    planes: [PLANE],
    ...change,
  };
}

function measured(wanted: Plan) {
  const result = measurePlan(wanted, images.soft, images.sharp, images.storedOf);
  if (!result.ok) throw new Error(result.refusal.text);
  return result.value;
}

describe('A plan with an oblique plane', () => {
  it('is read as it is written', () => {
    expect(parsePlan(plan())).toMatchObject({ ok: true, value: { unknownFields: [] } });
    const negative = { ...plan(), planes: [{ ...PLANE, slabMm: -1 }] };
    expect(parsePlan(negative)).toMatchObject({ ok: false });
  });

  it('needs the slices that its planes cut', () => {
    expect(slicesNeeded(plan(), images.soft, images)).toEqual([0, 1, 2, 3]);
    const unused = plan({ regions: [] });
    expect(slicesNeeded(unused, images.soft, images)).toEqual([]);
  });

  it('measures a region on the cut of both stacks: resampled, without image and standard error', () => {
    const [region] = measured(plan()).regions;
    // 100 + (x + 10) · 4 at x = −5, even across the region.
    expect(region?.soft.meanHu).toBeCloseTo(120, 0);
    expect(region?.soft).toMatchObject({ sopInstanceUid: null, standardErrorHu: null });
    expect(region?.soft.flags.map(({ code }) => code)).toContain('resampled');
    expect(region?.sharp?.meanHu).not.toBeNull();
  });

  it('says how each plane was cut', () => {
    const [plane] = measured(plan()).planes ?? [];
    expect(plane?.facts?.resampling).toBe('cubic convolution');
    // atan(1 / 2)
    expect(plane?.facts?.angleDeg).toBeCloseTo(26.565, 3);
    expect(plane?.facts?.source.soft?.first.sliceIndex).toBe(0);
    const slab = measured(plan({ planes: [{ ...PLANE, interpolation: 'linear', slabMm: 0.5 }] }));
    expect(slab.planes?.[0]?.facts?.resampling).toBe('trilinear interpolation, mean over 0.5 mm');
  });

  it('has no values but the reason on a plane that it does not name, or that tells no direction', () => {
    const [unknown] = measured(plan({ planes: [] })).regions;
    expect(unknown?.soft.meanHu).toBeNull();
    expect(unknown?.soft.flags[0]?.code).toBe('unknown-plane');
    const flat = plan({ planes: [{ id: 'O1', courseMm: [PLANE.courseMm[0], PLANE.courseMm[0]] }] });
    expect(measured(flat).regions[0]?.soft.flags[0]?.code).toBe('no-course');
    expect(measured(flat).planes).toEqual([{ id: 'O1', facts: null }]);
  });

  it('refuses two planes under one identifier', () => {
    const result = measurePlan(
      plan({ planes: [PLANE, PLANE] }),
      images.soft,
      images.sharp,
      images.storedOf,
    );
    expect(result).toMatchObject({ ok: false, refusal: { code: 'duplicate-id' } });
  });
});

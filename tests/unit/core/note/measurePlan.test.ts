import { describe, expect, it } from 'vitest';
import {
  measurePlan,
  type Plan,
  parsePlan,
  selectStack,
  slicesNeeded,
} from '../../../../core/note/index.js';
import { pair, pairFiles, SHARP_SERIES, SOFT_SERIES } from './noteFixture.js';

const images = await pair();

function plan(change: Partial<Plan> = {}): Plan {
  return {
    plan: 1,
    pair: { soft: { seriesInstanceUid: SOFT_SERIES }, sharp: { seriesInstanceUid: SHARP_SERIES } },
    regions: [
      {
        id: 'L1',
        role: 'lumen',
        // Columns 8 to 12 and rows 8 to 10 on slice 2; the edges run between pixel centres.
        shape: {
          kind: 'outline',
          pointsMm: [
            [-8.1, -16.2, 2],
            [-6.9, -16.2, 2],
            [-6.9, -14.8, 2],
            [-8.1, -14.8, 2],
          ],
        },
      },
      {
        id: 'W1',
        role: 'wall',
        shape: { kind: 'ellipse', centreMm: [-5, -15, 9], radiiMm: [1, 1] },
      },
    ],
    contrasts: [
      { id: 'C1', lumen: 'L1', wall: 'W1', noise: 'lumen' },
      { id: 'C2', lumen: 'L1', wall: 'W9', noise: 'lumen' },
    ],
    profiles: [],
    stents: [],
    ...change,
  };
}

const measure = (wanted: Plan) => measurePlan(wanted, images.soft, images.sharp, images.storedOf);

describe('measurePlan', () => {
  it('needs only the slices that its regions lie on', () => {
    expect(slicesNeeded(plan(), images.soft, images)).toEqual([2]);
  });

  it('measures on both stacks, and gives null with a reason where it can’t', () => {
    const result = measure(plan());
    if (!result.ok) throw new Error(result.refusal.text);
    const [lumen, wall] = result.value.regions;
    // HU are 100 + column: columns 8…12, mean 110; the variance of 5 values thrice each, n − 1 = 14, is 30/14.
    expect(lumen?.soft).toMatchObject({
      n: 15,
      meanHu: 110,
      medianHu: 110,
      minHu: 108,
      maxHu: 112,
    });
    expect(lumen?.soft.sdHu).toBeCloseTo(Math.sqrt(30 / 14), 12);
    expect(lumen?.soft.sopInstanceUid).toBe(`${SOFT_SERIES}.3`);
    expect(lumen?.sharp?.sopInstanceUid).toBe(`${SHARP_SERIES}.3`);
    expect(wall?.soft).toMatchObject({ n: 0, meanHu: null, sliceIndex: null });
    expect(wall?.soft.flags.map(({ code }) => code)).toContain('no-slice-here');
    expect(
      result.value.contrasts.map(({ soft, flags }) => [soft, flags.map((f) => f.code)]),
    ).toEqual([
      [null, ['no-mean']],
      [null, ['unknown-region']],
    ]);
  });

  it('gives null for the sharp kernel when the plan names one stack', () => {
    const result = measurePlan(plan(), images.soft, undefined, images.storedOf);
    if (!result.ok) throw new Error(result.refusal.text);
    expect(result.value.regions.map(({ sharp }) => sharp)).toEqual([null, null]);
    expect(result.value.contrasts.map(({ sharp }) => sharp)).toEqual([null, null]);
  });

  it('answers profiles and stents with the reason why they have no values', () => {
    const result = measure(
      plan({
        profiles: [{ id: 'X1', fromMm: [0, 0, 0], toMm: [1, 0, 0], bandMm: 1 }],
        stents: [{ id: 'S1', centreMm: [0, 0, 0], nominalMm: 3 }],
      }),
    );
    if (!result.ok) throw new Error(result.refusal.text);
    // The line lies beside the fixture’s image.
    expect(result.value.profiles).toMatchObject([{ id: 'X1', soft: { visibleWidthMm: null } }]);
    expect(result.value.profiles[0]?.soft.flags).toHaveLength(1);
    expect(result.value.stents).toMatchObject([
      {
        id: 'S1',
        strutDiameterMm: null,
        lumenHu: null,
        reason:
          'The noise of the kernels was not measured: their blur is not known, and no stent is fitted.',
      },
    ]);
  });

  it('refuses two regions under one identifier', () => {
    const { regions } = plan();
    const result = measure(plan({ regions: [...regions, ...regions.slice(0, 1)] }));
    expect(result).toEqual({
      ok: false,
      refusal: {
        code: 'duplicate-id',
        text: 'The plan has more than one region L1. Name each once.',
      },
    });
  });
});

describe('selectStack', () => {
  const stacks = [images.soft, images.sharp];

  it('finds the stack of a series', () => {
    const found = selectStack({ seriesInstanceUid: SHARP_SERIES }, stacks);
    expect(found.ok && found.value).toBe(images.sharp);
  });

  it('refuses a series that is not there, and a phase that no stack states', () => {
    expect(selectStack({ seriesInstanceUid: '1.2.3' }, stacks)).toMatchObject({
      refusal: { text: 'The folder has no series 1.2.3.' },
    });
    expect(selectStack({ seriesInstanceUid: SOFT_SERIES, phasePercent: 75 }, stacks)).toMatchObject(
      {
        refusal: {
          text: `Series ${SOFT_SERIES} has no stack at phase 75 %. It has: 4 slices without a stated phase.`,
        },
      },
    );
  });

  it('tells phases apart and does not choose between them', async () => {
    const phased = await Promise.all(
      [30, 75].map(async (percent) => {
        const change = { 2134593: { tag: 0x00209241, vr: 'FL', value: percent } } as const;
        return (await pair(pairFiles(change))).soft;
      }),
    );
    const series = { seriesInstanceUid: SOFT_SERIES };
    const second = selectStack({ ...series, phasePercent: 75 }, phased);
    expect(second.ok && second.value).toBe(phased[1]);
    expect(selectStack(series, phased)).toMatchObject({
      refusal: {
        code: 'ambiguous-series',
        text: `Series ${SOFT_SERIES} holds 2 stacks: 4 slices at 30 %; 4 slices at 75 %. Say which with phasePercent.`,
      },
    });
  });
});

describe('parsePlan', () => {
  it('fills in what is left out, takes null as left out, and tells unknown fields', () => {
    const result = parsePlan({
      plan: 1,
      pair: { soft: { seriesInstanceUid: '1.2', phasePercent: null }, sharp: null },
      contrast: [],
      regions: [
        {
          id: 'L1',
          role: 'lumen',
          colour: 'red',
          shape: { kind: 'ellipse', centreMm: [1, 2, 3], radiiMm: [1, 1] },
        },
      ],
    });
    expect(result).toEqual({
      ok: true,
      value: {
        plan: {
          plan: 1,
          pair: { soft: { seriesInstanceUid: '1.2' } },
          regions: [
            {
              id: 'L1',
              role: 'lumen',
              shape: { kind: 'ellipse', centreMm: [1, 2, 3], radiiMm: [1, 1] },
            },
          ],
          contrasts: [],
          profiles: [],
          stents: [],
        },
        unknownFields: ['contrast', 'regions[0].colour'],
      },
    });
  });

  const soft = { seriesInstanceUid: '1.2' };
  const region = (shape: unknown) => ({
    plan: 1,
    pair: { soft },
    regions: [{ id: 'L1', role: 'lumen', shape }],
  });
  it.each([
    ['not-a-plan', 'This is not a plan: it has no "plan": 1 at its top level.', []],
    [
      'newer-plan',
      'The plan is of version 2; this version of Diptych reads version 1. Use a newer Diptych.',
      { plan: 2 },
    ],
    ['broken-plan', 'The plan can’t be read: pair is missing.', { plan: 1 }],
    [
      'broken-plan',
      'The plan can’t be read: regions[0].shape.radiiMm[0] must be greater than 0.',
      region({ kind: 'ellipse', centreMm: [0, 0, 0], radiiMm: [-1, 1] }),
    ],
    [
      'broken-plan',
      'The plan can’t be read: regions[0].shape.pointsMm needs at least 3 entries.',
      region({ kind: 'outline', pointsMm: [] }),
    ],
    [
      'broken-plan',
      'The plan can’t be read: regions[0].shape.centreMm[2] must be a number.',
      region({ kind: 'ellipse', centreMm: [0, 0, 'z'], radiiMm: [1, 1] }),
    ],
    [
      'broken-plan',
      'The plan can’t be read: regions[0].shape.kind must be one of the kinds that there are: "ellipse" or "outline".',
      region({ kind: 'sphere' }),
    ],
  ])('refuses with %s: %s', (code, text, json) => {
    expect(parsePlan(json)).toEqual({ ok: false, refusal: { code, text } });
  });

  it('reads what it wrote', () => {
    const original = plan();
    const result = parsePlan(JSON.parse(JSON.stringify(original)));
    expect(result.ok && result.value).toEqual({ plan: original, unknownFields: [] });
  });
});

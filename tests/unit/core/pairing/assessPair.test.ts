import { describe, expect, it } from 'vitest';
import { assessPair, headerEvidence, pairVerdict } from '../../../../core/pairing/index.js';
import { byParity, countingReader, discs, stackOf } from './stackFixture.js';

const options = { measureSharpness: byParity };
const stateOf = (evidence: readonly { check: string; state: string }[], check: string) =>
  evidence.find((one) => one.check === check)?.state;

describe('assessPair', () => {
  it('calls two stacks a pair when all that matters agrees, soft and sharp in measured order', async () => {
    const { read } = countingReader();
    const got = await assessPair(stackOf({ series: 4 }), stackOf({ series: 3 }), read, options);
    expect([got.soft.key.slice(-2), got.sharp.key.slice(-2)]).toEqual(['.3', '.4']);
    expect([got.verdict, got.reservations, got.measured]).toEqual(['pair', [], true]);
    expect(got.shift.shiftMm?.map((part) => Math.abs(Math.round(part * 1000)))).toEqual([0, 0, 0]);
  });

  it('finds no shift when field of view, centre and increment differ: geometry explains them', async () => {
    const { read } = countingReader();
    const other = stackOf({ series: 4, matrix: 230, spacingMm: 0.4, slices: 16 });
    const got = await assessPair(stackOf({ series: 3 }), other, read, options);
    expect(got.verdict).toBe('pair');
    expect(stateOf(got.evidence, 'field of view')).toBe('differs');
    expect(stateOf(got.evidence, 'slice spacing')).toBe('differs');
    // 0.05 of a 0.4 mm pixel.
    expect(Math.hypot(...(got.shift.shiftMm ?? [1]))).toBeLessThan(0.02);
  });

  it('has a reservation for a shift above half a pixel, with its length', async () => {
    const [soft, sharp] = [stackOf({ series: 3 }), stackOf({ series: 4 })];
    const got = await assessPair(
      soft,
      sharp,
      async (stack, index) => discs(stack, index, stack === sharp ? 0.5 : 0),
      options,
    );
    expect(got.verdict).toBe('reservations');
    expect(got.reservations.map(({ check, state }) => `${check} ${state}`)).toEqual([
      'shift differs',
    ]);
    expect(Math.abs((got.shift.shiftMm?.[0] ?? 0) - 0.5)).toBeLessThan(0.02);
  });

  it('names the place that is shifted otherwise than the rest', async () => {
    const [soft, sharp] = [stackOf({ series: 3 }), stackOf({ series: 4 })];
    const got = await assessPair(
      soft,
      sharp,
      async (stack, index) => {
        const still = discs(stack, index);
        if (stack === soft) return still;
        const moved = discs(stack, index, 0.6);
        // The right lower quarter of the image, x and y above 0, moves alone.
        return still.map((value, pixel) =>
          pixel % 256 > 128 && pixel / 256 > 128 ? (moved[pixel] ?? 0) : value,
        );
      },
      options,
    );
    const text = got.evidence.find(({ check }) => check === 'shift')?.text;
    expect(got.verdict).toBe('reservations');
    expect(text).toMatch(
      /^shifted otherwise from place to place: 0\.[56]\d mm at L \d+\.\d · P \d+\.\d · H \d\.\d mm/,
    );
    expect(text).toMatch(/motion or another beat$/);
  });

  it('reads no pixel where the headers refuse the pair', async () => {
    const counting = countingReader();
    const other = stackOf({ series: 4, acquisition: { phasePercent: 40 } });
    const got = await assessPair(stackOf({ series: 3 }), other, counting.read, options);
    expect([got.verdict, counting.count(), got.shift.shiftMm]).toEqual(['refused', 0, null]);
    expect(got.refusedFor.map(({ check }) => check)).toEqual(['phase']);
  });

  it('keeps the order of the series where soft and sharp are not told apart, and says so', async () => {
    const { read } = countingReader();
    const got = await assessPair(stackOf({ series: 5 }), stackOf({ series: 3 }), read, options);
    expect(got.soft.key.endsWith('.5')).toBe(true);
    expect(got.evidence.at(-1)).toEqual({
      check: 'sharpness',
      state: 'differs',
      text: 'same kernel: no soft and sharp: noise 10.0 and 10.0 HU; mean frequency 0.25 and 0.25 per mm',
    });
  });

  it('says that the shift is not measured on slices that can’t be read', async () => {
    const got = await assessPair(
      stackOf({ series: 3 }),
      stackOf({ series: 4 }),
      async () => undefined,
      options,
    );
    expect(got.shift.shiftMm).toBeNull();
    expect(stateOf(got.evidence, 'shift')).toBe('unknown');
    expect(got.verdict).toBe('reservations');
  });
});

describe('pairVerdict', () => {
  const soft = stackOf({ series: 3 });
  const otherFrame = stackOf({ series: 4, acquisition: { frameOfReferenceUid: '2.25.5' } });

  it('refuses another frame of reference unless the reader gives a reason, which leaves a reservation', () => {
    const { evidence, needsReason, link } = headerEvidence(soft, otherFrame);
    expect([link, needsReason.map(({ check }) => check)]).toEqual([
      'index',
      ['frame of reference'],
    ]);
    expect(pairVerdict(evidence).verdict).toBe('refused');
    const overrides = [{ check: 'frame of reference', reason: 'Anonymised twice' }] as const;
    expect(headerEvidence(soft, otherFrame, overrides).link).toBe('position');
    const judged = pairVerdict(evidence, overrides);
    expect(judged.verdict).toBe('reservations');
    expect(judged.reservations.map(({ check }) => check)).toEqual(['frame of reference']);
  });

  it('takes no reason of blanks, and none for patient or phase', () => {
    const { evidence } = headerEvidence(soft, otherFrame);
    expect(pairVerdict(evidence, [{ check: 'frame of reference', reason: ' ' }]).verdict).toBe(
      'refused',
    );
    const phase = headerEvidence(soft, stackOf({ series: 4, acquisition: { phasePercent: 40 } }));
    expect(
      pairVerdict(phase.evidence, [
        { check: 'study', reason: 'x' },
        { check: 'frame of reference', reason: 'x' },
      ]).verdict,
    ).toBe('refused');
  });

  it('names what differs or is unknown and matters; labels, contrast agents unstated and fields don’t', () => {
    const other = stackOf({
      series: 4,
      matrix: 200,
      acquisition: { thicknessMm: 1, kernelLabel: 'Crisp', phasePercent: undefined } as never,
    });
    const judged = pairVerdict(headerEvidence(soft, other).evidence);
    expect(judged.verdict).toBe('reservations');
    expect(judged.reservations.map(({ check, state }) => `${check} ${state}`)).toEqual([
      'phase unknown',
      'thickness differs',
    ]);
  });

  it('refuses stacks with no slices in common', () => {
    const far = stackOf({ series: 4, fromMm: 100 });
    expect(pairVerdict(headerEvidence(soft, far).evidence).verdict).toBe('refused');
    expect(headerEvidence(soft, far).refusal).toMatch(/^Nothing to compare: no slices in common/);
  });
});

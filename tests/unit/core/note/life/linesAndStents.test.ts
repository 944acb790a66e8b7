import { describe, expect, it } from 'vitest';
import type { MeasuredPlan, Note } from '../../../../../core/note/index.js';
import {
  amendmentText,
  changedNumbers,
  completeness,
  referencedFrames,
} from '../../../../../core/note/life/index.js';
import { notProfiled } from '../../../../../core/stent/index.js';
import { linesNote, PROFILE_VALUE, SHARP_IMAGE, SOFT_IMAGE } from '../../report/linesNote.js';

/** A note of profiles and stents alone, so that nothing else changes. */
function note(): Note {
  return { ...linesNote(), regions: [], contrasts: [], edges: [] };
}

/** What the images give: what the note says, but for the refits, which are made on demand. */
function measured({ profiles, stents }: Note): MeasuredPlan {
  return {
    regions: [],
    contrasts: [],
    profiles: profiles.map(({ id, soft, sharp }) => ({
      id,
      soft: soft === null ? notProfiled({ code: 'x', text: '' }) : { ...soft, samples: null },
      sharp: sharp === null ? null : { ...sharp, samples: null },
    })),
    stents: stents.flatMap(({ id, fit }) => {
      if (fit === null) return [];
      const { reason, ...values } = fit;
      return [
        { id, ...values, refitted: null, ...(reason === null ? {} : { reason: reason.text }) },
      ];
    }),
  };
}

describe('Measured again', () => {
  it('every number of profiles and fits holds, refits left out', () => {
    expect(changedNumbers(note(), measured(note()))).toEqual([]);
  });

  it('a profile is told with its kernel, its image and both numbers', () => {
    const before = note();
    const fresh = measured(before);
    const profiles = fresh.profiles.map((one) =>
      one.id === 'X1'
        ? { ...one, soft: { ...one.soft, visibleWidthMm: 2.0626, halfHeightMm: null } }
        : one,
    );
    expect(changedNumbers(before, { ...fresh, profiles })).toEqual([
      {
        id: 'X1',
        label: 'Profile 1',
        kernel: 'soft',
        quantity: 'visibleWidthMm',
        before: 2.0625,
        now: 2.0626,
        sopInstanceUid: SOFT_IMAGE,
      },
      {
        id: 'X1',
        label: 'Profile 1',
        kernel: 'soft',
        quantity: 'halfHeightMm[0]',
        before: 2.55,
        now: null,
        sopInstanceUid: SOFT_IMAGE,
      },
      {
        id: 'X1',
        label: 'Profile 1',
        kernel: 'soft',
        quantity: 'halfHeightMm[1]',
        before: 4.6125,
        now: null,
        sopInstanceUid: SOFT_IMAGE,
      },
    ]);
  });

  it('a fit is told under both kernels at once, and a plain reading under its own', () => {
    const before = note();
    const fresh = measured(before);
    const stents = fresh.stents.map((one) =>
      one.id === 'S1'
        ? {
            ...one,
            lumenHu: { value: 345.27, se: 12.41 },
            plain: { radiusMm: 1.09, softHu: 536.4, sharpHu: 420 },
          }
        : one,
    );
    expect(changedNumbers(before, { ...fresh, stents })).toEqual([
      {
        id: 'S1',
        label: 'Stent 1',
        kernel: 'both',
        quantity: 'lumenHu',
        before: 345.26,
        now: 345.27,
        sopInstanceUid: null,
      },
      {
        id: 'S1',
        label: 'Stent 1',
        kernel: 'sharp',
        quantity: 'plain.sharpHu',
        before: 418.9,
        now: 420,
        sopInstanceUid: '2.25.77001.2.2.4',
      },
    ]);
  });

  it('lets a millionth of a number be rounding, and no more', () => {
    const before = note();
    const fresh = measured(before);
    const scaled = (by: number): MeasuredPlan => ({
      ...fresh,
      stents: fresh.stents.map((one) =>
        one.id === 'S1' ? { ...one, lumenHu: { value: 345.26 * by, se: 12.41 } } : one,
      ),
    });
    expect(changedNumbers(before, scaled(1 + 9e-7))).toEqual([]);
    expect(changedNumbers(before, scaled(1 + 2e-6)).map(({ quantity }) => quantity)).toEqual([
      'lumenHu',
    ]);
  });

  it('a fit that is there now and was not, or is gone, is told', () => {
    const before = note();
    const fresh = measured(before);
    const [first, second, third] = fresh.stents;
    if (!first || !second || !third) throw new Error('three stents');
    const found = { ...fresh, stents: [first, { ...third, id: 'S2' }, third] };
    expect(changedNumbers(before, found)).toContainEqual({
      id: 'S2',
      label: 'Stent 2',
      kernel: 'both',
      quantity: 'strutDiameterMm',
      before: null,
      now: 2.8713,
      sopInstanceUid: null,
    });
    const gone = changedNumbers(before, { ...fresh, stents: [second, third] });
    expect(gone.find(({ quantity }) => quantity === 'strutDiameterMm')).toMatchObject({
      id: 'S1',
      now: null,
    });
  });

  it('standard errors by refits are compared where there are fresh ones', () => {
    const before = note();
    const fresh = measured(before);
    const stents = fresh.stents.map((one) =>
      one.id === 'S1'
        ? { ...one, refitted: { strutDiameterMm: 0.0312, lumenHu: 15, refits: 32 } }
        : one,
    );
    expect(changedNumbers(before, { ...fresh, stents })).toMatchObject([
      { kernel: 'both', quantity: 'refitted.lumenHu', before: 14.6, now: 15 },
    ]);
  });
});

describe('The frames that values rest on', () => {
  it('are those of profiles with a width and of fits; none of cuts', () => {
    expect(referencedFrames(note())).toEqual([
      { sopInstanceUid: SOFT_IMAGE, frameNumber: null },
      { sopInstanceUid: SHARP_IMAGE, frameNumber: null },
      { sopInstanceUid: '2.25.77001.2.2.4', frameNumber: null },
    ]);
    const [profile] = note().profiles;
    if (profile === undefined) throw new Error('no profile');
    const soft = { ...PROFILE_VALUE, visibleWidthMm: null };
    expect(
      referencedFrames({ regions: [], profiles: [{ ...profile, soft, sharp: null }] }),
    ).toEqual([]);
  });
});

describe('What is missing', () => {
  const codes = (of: Note) => completeness(of).map(({ code }) => code);

  it('is a fitted stent of a stent finding, or the reason why there is none', () => {
    const whole = linesNote();
    expect(codes(whole)).not.toContain('no-fitted-stent');
    const [first, without] = whole.stents;
    if (!first || !without) throw new Error('two stents');
    const missing = completeness({ ...whole, stents: [without] });
    expect(missing.find(({ code }) => code === 'no-fitted-stent')).toEqual({
      findingId: 'D1',
      code: 'no-fitted-stent',
      text: 'Stent in mLAD: a fitted stent, or the reason why there is none.',
    });
    const told = { ...whole, stents: [{ ...without, findingId: 'D1' }] };
    expect(codes(told)).not.toContain('no-fitted-stent');
    expect(codes({ ...whole, stents: [{ ...first, fit: null }] })).toContain('no-fitted-stent');
  });

  it('is no fitted stent where there is but one kernel', () => {
    const whole = linesNote();
    const alone = { ...whole, stents: [], pair: { ...whole.pair, sharp: null } };
    expect(codes(alone)).not.toContain('no-fitted-stent');
  });

  it('is why the reader quotes a profile as they do', () => {
    const whole = linesNote();
    const mute = whole.profiles.map((profile) => ({ ...profile, quoteReason: ' ' }));
    expect(completeness({ ...whole, profiles: mute })).toContainEqual({
      findingId: null,
      code: 'quote-reason',
      // The other one is quoted as proposed.
      text: 'Why Profile 2 is quoted as it is.',
    });
  });

  it('is not all where profiles alone were measured', () => {
    expect(codes(note())).not.toContain('regions');
    expect(codes({ ...note(), profiles: [], stents: [] })).toContain('regions');
  });
});

describe('What an amendment changed', () => {
  it('tells lines, fits and cuts', () => {
    const earlier = linesNote();
    const before = JSON.parse(JSON.stringify(earlier));
    const [profile] = earlier.profiles;
    const [stent] = earlier.stents;
    if (!profile?.soft || !stent?.fit) throw new Error('no profile or fit');
    const later: Note = {
      ...earlier,
      edges: [],
      profiles: [{ ...profile, soft: { ...profile.soft, visibleWidthMm: 2.25 } }],
      stents: [{ ...stent, fit: { ...stent.fit, lumenHu: { value: 350, se: 12 } } }],
      planes: [],
    };
    expect(amendmentText({ by: 'A', at: '', why: '', before }, later)).toEqual([
      'Removed: Edge 1, rise soft 1.68 mm, sharp – mm.',
      'Changed: Profile 1, visible width soft 2.25 mm, sharp 2.46 mm; it was Profile 1, visible width soft 2.06 mm, sharp 2.46 mm.',
      'Removed: Profile 2, visible width soft 2.33 mm, sharp – mm.',
      'Changed: Stent 1, fitted strut diameter 3.11 mm, lumen 350 HU; it was Stent 1, fitted strut diameter 3.11 mm, lumen 345 HU.',
      'Removed: Stent 2, fitted strut diameter – mm, lumen – HU.',
      'Removed: Stent 3, fitted strut diameter 2.87 mm, lumen 345 HU.',
      'Removed: Cut 1, resampled by cubic convolution, mean over 1.5 mm.',
    ]);
  });
});

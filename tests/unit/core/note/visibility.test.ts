import { describe, expect, it } from 'vitest';
import {
  addContrast,
  addRegion,
  choiceOf,
  contrastHu,
  type Note,
  parseNote,
  removeContrast,
  setVisibility,
  visibilityOf,
} from '../../../../core/note/index.js';
import type { KernelTexture } from '../../../../core/quality/index.js';
import type { RegionValue } from '../../../../core/region/index.js';
import { visibilityFact } from '../../../../core/report/visibilityFact.js';
import { ellipse, emptyNote, LATER, NOW, pair } from './noteFixture.js';

const images = await pair();

const value = (meanHu: number): RegionValue => ({
  n: 50,
  meanHu,
  sdHu: 10,
  minHu: meanHu - 20,
  maxHu: meanHu + 20,
  medianHu: meanHu,
  areaMm2: 6,
  sampledAreaMm2: 6,
  snr: meanHu / 10,
  sliceIndex: 1,
  sliceOffsetMm: 0,
  sopInstanceUid: '1.2.3',
  frameNumber: null,
  standardErrorHu: null,
  placementHu: null,
  flags: [],
});

/** White noise, no blur: the smallest disc is 2k·√(NPS/π)/contrast (Rose 1948). */
const white = (powerHu2Mm2: number): KernelTexture => ({
  noiseSdHu: 25,
  areas: 8,
  frequencyPerMm: [0.08, 0.4, 0.8, 1.25],
  powerHu2Mm2: Array.from({ length: 4 }, () => powerHu2Mm2),
  meanPerMm: 0.6,
  peakPerMm: 0.4,
  riseMm: 0,
  blurFwhmMm: 0,
});

const TEXTURE = { soft: white(100), sharp: white(400) };

/** A note with a lumen and a wall, 300 HU apart on the soft kernel and 240 HU on the sharp one, and their contrast C1. */
function noteWithContrast(): Note {
  const region = (note: Note, role: 'lumen' | 'wall', soft: number, sharp: number) =>
    addRegion(note, { role, shape: ellipse(10, 10), soft: value(soft), sharp: value(sharp) }, NOW)
      .note;
  const note = region(region(emptyNote(images), 'lumen', 400, 380), 'wall', 100, 140);
  const added = addContrast(note, { lumen: 'L1', wall: 'W1', noise: 'wall' }, NOW);
  if (!added.ok) throw new Error(added.refusal.text);
  return added.value.note;
}

describe('What could be seen, in the note', () => {
  it('takes a contrast as each kernel shows it', () => {
    const note = noteWithContrast();
    expect(contrastHu(note, 'C1', 'soft')).toBe(300);
    expect(contrastHu(note, 'C1', 'sharp')).toBe(240);
    expect(contrastHu(note, 'C9', 'soft')).toBeUndefined();
  });

  it('gives the smallest disc of each kernel', () => {
    // By hand: 2·5·√(100/π)/60 = 0.940 mm, and twice that for four times the noise power.
    const seen = visibilityOf(noteWithContrast(), TEXTURE, { k: 5, contrast: { hu: 60 } });
    expect(seen).toMatchObject({ k: 5, contrastId: null, softHu: 60, sharpHu: 60 });
    expect(seen.softMm).toBeCloseTo(0.94, 2);
    expect(seen.sharpMm).toBeCloseTo(1.881, 2);
  });

  it('has no diameter where a kernel has no texture, and keeps the contrast', () => {
    const seen = visibilityOf(noteWithContrast(), undefined, { k: 4, contrast: { id: 'C1' } });
    expect(seen).toEqual({
      k: 4,
      contrastId: 'C1',
      softHu: 300,
      sharpHu: 240,
      softMm: null,
      sharpMm: null,
    });
  });

  it('keeps the choice through the note’s text and back', () => {
    const note = setVisibility(noteWithContrast(), { k: 3, contrast: { hu: 60 } }, LATER);
    const again = parseNote(JSON.parse(JSON.stringify(note)));
    expect(again.ok && again.value.visibility).toEqual(note.visibility);
    expect(note.visibility && choiceOf(note.visibility)).toEqual({ k: 3, contrast: { hu: 60 } });
  });

  it('is none in notes of earlier versions', () => {
    const { visibility, ...earlier } = emptyNote(images);
    expect(visibility).toBeNull();
    const read = parseNote(JSON.parse(JSON.stringify(earlier)));
    expect(read.ok && read.value.visibility).toBeNull();
  });

  it('goes away with the contrast that it asked about, and comes anew with another value of it', () => {
    const note = setVisibility(noteWithContrast(), { k: 5, contrast: { id: 'C1' } }, LATER);
    expect(note.visibility?.softHu).toBe(300);
    expect(removeContrast(note, 'C1', LATER).visibility).toBeNull();
    expect(setVisibility(note, null, LATER).visibility).toBeNull();
  });

  it('is a line of the exports that says what it is worth', () => {
    expect(
      visibilityFact({
        k: 5,
        contrastId: null,
        softHu: 60,
        softMm: 1.36,
        sharpHu: 60,
        sharpMm: null,
      }),
    ).toBe(
      'soft kernel 60 HU from 1.4 mm; sharp kernel 60 HU: no diameter can be told (Rose’s criterion, k 5; an ideal observer’s figure, no promise)',
    );
  });
});

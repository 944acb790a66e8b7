import { describe, expect, it } from 'vitest';
import {
  detectorMm,
  type Inset,
  type ParallelScan,
  projectSlice,
  type SceneObject,
  viewAngleRad,
} from '../../../../core/phantom/index.js';

const scan: ParallelScan = {
  views: 12,
  detectors: 64,
  pitchMm: 1,
  blurSigmaMm: 0,
  waterPerMm: 0.02,
};

const disc = (x: number, y: number, radius: number, hu: number): SceneObject => ({
  name: 'disc',
  centreMm: [x, y],
  radiiMm: [radius, radius],
  angleDeg: 0,
  hu,
});

/** μ·length of a disc's chord. */
const chord = (radius: number, d: number, perMm: number): number =>
  2 * Math.sqrt(Math.max(0, radius * radius - d * d)) * perMm;

describe('projectSlice', () => {
  it('gives a disc of water its chord times the coefficient of water', () => {
    const sinogram = projectSlice({ painted: [disc(3, -4, 20, 0)], insets: [] }, scan);
    for (let view = 0; view < scan.views; view += 1) {
      const theta = viewAngleRad(scan, view);
      for (let detector = 0; detector < scan.detectors; detector += 1) {
        const d = detectorMm(scan, detector) - (3 * Math.cos(theta) - 4 * Math.sin(theta));
        expect(sinogram[view * scan.detectors + detector]).toBeCloseTo(chord(20, d, 0.02), 12);
      }
    }
  });

  it('lets a later tissue cover what is under it', () => {
    // Two discs of water that overlap are as long as their union: the upper one covers, it does not add.
    const sinogram = projectSlice(
      { painted: [disc(-8, 0, 12, 0), disc(8, 0, 12, 0)], insets: [] },
      scan,
    );
    // View 6 is 90°: rays along x at y = t. At the detectors beside y = 0 the union is 40 mm long.
    const at = 6 * scan.detectors + 31;
    const half = Math.sqrt(12 * 12 - 0.25);
    expect(sinogram[at]).toBeCloseTo((16 + 2 * half) * 0.02, 12);
    // View 0: rays along y at x = t = −8.5 and 0.5: chord of the one disc, and the longer of two that overlap.
    expect(sinogram[23]).toBeCloseTo(chord(12, -0.5, 0.02), 12);
    expect(sinogram[32]).toBeCloseTo(chord(12, -7.5, 0.02), 12);
  });

  it('counts only what is not covered, whatever lies between', () => {
    // Metal over water over lung in a body: each ray by hand at x = 0.5.
    const scene = {
      painted: [disc(0, 0, 25, 0), disc(0, 0, 20, -800), disc(0, 10, 6, 1000)],
      insets: [],
    };
    const at = projectSlice(scene, scan)[32];
    const body = chord(25, 0.5, 1);
    const lung = chord(20, 0.5, 1);
    const dense = chord(6, 0.5, 1);
    expect(at).toBeCloseTo(((body - lung) * 1 + (lung - dense) * 0.2 + dense * 2) * 0.02, 12);
  });

  it('adds an inset as its difference from what is around', () => {
    const inset: Inset = { ...disc(2, 1, 5, 350), aroundHu: -90 };
    const withInset = projectSlice({ painted: [disc(0, 0, 20, -90)], insets: [inset] }, scan);
    const painted = projectSlice(
      { painted: [disc(0, 0, 20, -90), disc(2, 1, 5, 350)], insets: [] },
      scan,
    );
    withInset.forEach((value, index) => {
      expect(value).toBeCloseTo(painted[index] ?? Number.NaN, 12);
    });
  });

  it('blurs along the detector with a Gaussian and keeps the sum of each view', () => {
    const sigma = 0.8;
    const inset: Inset = { ...disc(0.3, 0, 0.5, 8000), aroundHu: 0 };
    const scene = { painted: [], insets: [inset] };
    const sinogram = projectSlice(scene, { ...scan, blurSigmaMm: sigma });
    const row = sinogram.subarray(0, scan.detectors);
    // Area of the disc × 8 × μ: what every view adds up to to what a pitch of 1 mm aliases: 2·exp(−2π²σ²).
    const sum = row.reduce((total, value) => total + value, 0);
    expect(sum / (Math.PI * 0.25 * 8 * 0.02)).toBeCloseTo(1, 5);
    const mean = row.reduce((total, value, i) => total + value * detectorMm(scan, i), 0) / sum;
    const spread =
      row.reduce((total, value, i) => total + value * (detectorMm(scan, i) - mean) ** 2, 0) / sum;
    // The variance of a disc's chord is r²/4, that of a ray's share (1/8 mm)²/12; the Gaussian ends at 4σ (−0.1 %).
    expect(spread / (sigma ** 2 + 0.25 / 4 + 1 / 64 / 12)).toBeCloseTo(1, 2);
  });
});

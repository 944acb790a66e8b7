import { describe, expect, it } from 'vitest';
import {
  demonstrationScene,
  huAt,
  identifiersOf,
  MOST_SLICES,
  makeSlice,
  sliceZMm,
  stableUid,
  trueRegions,
} from '../../../../core/phantom/index.js';

describe('demonstrationScene', () => {
  it('has each inset wholly inside the even tissue that it names, in every slice', () => {
    const wrong: string[] = [];
    for (let index = 0; index < MOST_SLICES; index += 1) {
      const { painted, insets } = demonstrationScene(sliceZMm(MOST_SLICES, index));
      insets.forEach((inset, order) => {
        const below = { painted, insets: insets.slice(0, order) };
        const turn = (inset.angleDeg * Math.PI) / 180;
        for (let step = 0; step < 48; step += 1) {
          // Just inside the edge, and well inside.
          const share = step % 2 === 0 ? 0.999 : 0.6;
          const a = Math.cos((step * Math.PI) / 24) * inset.radiiMm[0] * share;
          const b = Math.sin((step * Math.PI) / 24) * inset.radiiMm[1] * share;
          const x = inset.centreMm[0] + a * Math.cos(turn) - b * Math.sin(turn);
          const y = inset.centreMm[1] + a * Math.sin(turn) + b * Math.cos(turn);
          if (huAt(below, x, y) !== inset.aroundHu) wrong.push(`${inset.name} in slice ${index}`);
        }
      });
    }
    expect(wrong).toEqual([]);
  });

  it('holds in each region of the truth only the HU that the truth gives', () => {
    for (const { shape, trueHu } of trueRegions()) {
      const scene = demonstrationScene(shape.centreMm[2]);
      const u = shape.u ?? [1, 0, 0];
      const v = shape.v ?? [0, 1, 0];
      for (let step = 0; step < 200; step += 1) {
        const radius = Math.sqrt(step / 199);
        const a = radius * Math.cos(step * 2.4) * shape.radiiMm[0];
        const b = radius * Math.sin(step * 2.4) * shape.radiiMm[1];
        const [x, y] = shape.centreMm;
        expect(huAt(scene, x + a * u[0] + b * v[0], y + a * u[1] + b * v[1])).toBe(trueHu);
      }
    }
  });
});

describe('sliceZMm', () => {
  it('begins at 0 with all slices and lies around the stent’s middle with few', () => {
    expect([sliceZMm(44, 0), sliceZMm(44, 43)]).toEqual([0, 21.5]);
    expect([sliceZMm(1, 0), sliceZMm(3, 0), sliceZMm(3, 2)]).toEqual([10, 9.5, 10.5]);
  });
});

describe('stableUid', () => {
  it('is a version 8 UUID under 2.25, the same for the same text', () => {
    const uid = stableUid('a');
    expect(stableUid('a')).toBe(uid);
    expect(stableUid('b')).not.toBe(uid);
    const digits = BigInt(uid.slice('2.25.'.length)).toString(16).padStart(32, '0');
    // RFC 9562: version in the 13th digit, variant 10 in the 17th. Free bits are those of FNV-1a 128 of 'a',
    // d228cb69 6f1a8caf 78912b70 4e4a8964 (from memory of the published test vectors).
    expect(digits).toBe('d228cb696f1a8caf' + 'b8912b704e4a8964');
  });
});

describe('identifiersOf', () => {
  it('gives every file and image a name of its own that changes with the seed', () => {
    const ids = identifiersOf({ seed: 1, slices: 44, matrix: 512 });
    const other = identifiersOf({ seed: 2, slices: 44, matrix: 512 });
    const names = Array.from({ length: 44 }, (_, index) => [
      ids.fileOf('soft', index),
      ids.fileOf('sharp', index),
      ids.sopInstanceUid('soft', index),
      ids.sopInstanceUid('sharp', index),
      other.sopInstanceUid('soft', index),
    ]).flat();
    expect(new Set(names).size).toBe(44 * 5);
  });
});

describe('makeSlice', () => {
  it('gives the same bytes for the same seed, and other pixels for another', () => {
    const options = { seed: 4, slices: 1, matrix: 64 };
    const first = makeSlice(options, 0);
    expect(makeSlice(options, 0)).toEqual(first);
    const other = makeSlice({ ...options, seed: 5 }, 0);
    expect(other[0]?.bytes.subarray(-8192)).not.toEqual(first[0]?.bytes.subarray(-8192));
  });

  it('throws for slices and sizes that the scene does not have', () => {
    expect(() => makeSlice({ seed: 1, slices: 45, matrix: 64 }, 0)).toThrow(
      'invalid number of slices: 45',
    );
    expect(() => makeSlice({ seed: 0.5, slices: 1, matrix: 64 }, 0)).toThrow('invalid seed: 0.5');
    expect(() => makeSlice({ seed: 1, slices: 1, matrix: 8 }, 0)).toThrow('invalid matrix: 8');
  });
});

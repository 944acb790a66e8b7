import type { Apodisation } from './apodisation.js';
import { FREQUENCIES, STEP_PER_MM } from './frequencies.js';
import type { VesselAxis } from './vesselAxis.js';

/**
 * What kernels do to a leaning tube, seen at right angles to its axis. There the slice's longer ellipse is a circle again,
 * and the kernel, the same in all directions of the slice, is narrower along the lean: a frequency f of the circle is
 * f·√(cos²t·cos²φ + sin²φ) in the slice. Of that the mean over φ is taken, (1 + cos t)/2 to first order; what is left
 * goes twice round the circle and falls out of annular means.
 */
export function leaningApodisation(apodisation: Apodisation, { drift }: VesselAxis): Apodisation {
  const cosine = 1 / Math.hypot(1, ...drift);
  const part = (1 + cosine) / 2;
  if (part > 0.9995) return apodisation;
  const scaled = (list: Float64Array): Float64Array =>
    FREQUENCIES.map((f) => {
      const place = (f * part) / STEP_PER_MM - 0.5;
      const below = Math.max(0, Math.floor(place));
      const beyond = Math.max(0, place - below);
      const next = Math.min(list.length - 1, below + 1);
      return (1 - beyond) * (list[below] as number) + beyond * (list[next] as number);
    });
  return {
    ...apodisation,
    kernels: apodisation.kernels.map(({ response, amplitude, endError, twofold }) => ({
      ...(twofold === undefined ? {} : { twofold }),
      response: scaled(response),
      endError: scaled(endError),
      amplitude: scaled(amplitude),
    })),
  };
}

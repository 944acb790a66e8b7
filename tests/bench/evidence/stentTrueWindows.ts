import { apodisation, type Kernel } from '../../../core/phantom/index.js';
import { FREQUENCIES, type SeenBy } from '../../../core/stent/index.js';
import type { FittedOn } from './stentGrid.js';
import { STENT_SCAN } from './stentScene.js';

/** Puts the windows that images were made with in the place of those that their noise tells; the weights stay as they are. */
export function withTrueWindows(
  side: FittedOn,
  kernels: { readonly soft: Kernel; readonly sharp: Kernel },
): SeenBy {
  const used = side === 'both' ? [kernels.soft, kernels.sharp] : [kernels[side]];
  return (told) => ({
    noiseParts: used.map(() => 1),
    apodisation: {
      ...told,
      kernels: told.kernels.map((one, index) => ({
        ...one,
        response: responseOf(used[index] as Kernel),
      })),
    },
  });
}

/** W with what linear interpolation between detectors does, sinc²(τ·f). */
function responseOf(kernel: Kernel): Float64Array {
  return FREQUENCIES.map((f) => {
    const x = Math.PI * STENT_SCAN.pitchMm * f;
    return apodisation(kernel, f) * (Math.sin(x) / x) ** 2;
  });
}

import { formatFixed, formatQuantity } from '../../core/format/index.js';
import type { StentValue } from '../../core/note/index.js';

/** What else a fit found, in a line: the second standard errors, wall, struts, and how much it leaves over. */
export function StentFacts({ fit }: { readonly fit: StentValue }) {
  const { refitted, wallWidthMm, strutMassHuMm, goodness } = fit;
  const chi =
    goodness === null ? undefined : goodness.chiSquare / Math.max(1, goodness.degreesOfFreedom);
  const mm = (value: number | undefined): string => formatQuantity(value, 'lengthMm');
  const hu = (value: number | undefined): string => formatFixed(value, 0);
  const again =
    refitted === null
      ? 'no refits'
      : `refits ± ${mm(refitted.strutDiameterMm)} mm, ± ${hu(refitted.lumenHu)} HU`;
  return (
    <p class="fit-facts" title={HELP}>
      {`${again} · wall ${mm(wallWidthMm?.value)} ± ${mm(wallWidthMm?.se)} mm · strut mass ${hu(strutMassHuMm?.value)} ± ${hu(strutMassHuMm?.se)} HU·mm · χ²/n ${formatFixed(chi, 1)}`}
    </p>
  );
}

const HELP =
  'Refits: the standard errors again, from the scatter of fits to simulated noise. Wall: outside of the struts. Strut mass: HU above the wall times thickness, per length of the ring. χ²/n: what the fit leaves over, in standard errors; near 1 where the model explains the image.';

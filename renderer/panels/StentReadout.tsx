import { formatFixed, formatQuantity, NO_VALUE } from '../../core/format/index.js';
import type { NoteStent } from '../../core/note/index.js';
import { FlagSign } from './parts/StateSign.js';

/** The fitted stent in the hinge: one result for both kernels, and beside it what a plain region reads on each. */
export function StentReadout({ stent }: { readonly stent: NoteStent }) {
  const { fit } = stent;
  const diameter = fit?.strutDiameterMm ?? null;
  const lumen = fit?.lumenHu ?? null;
  const hu = (value: number | null | undefined) => formatFixed(value, 0);
  return (
    <section class="readout stent-readout" data-fitted={diameter !== null}>
      <h2>
        <span>{`${stent.label} · fitted on both kernels`}</span>
      </h2>
      {diameter !== null && lumen !== null && (
        <>
          <p class="fitted-value">
            {formatQuantity(diameter.value, 'lengthMm')}
            <span class="error"> ± {formatQuantity(diameter.se, 'lengthMm')} mm</span>
            <span class="what">strut diameter</span>
          </p>
          <p class="fitted-value">
            {hu(lumen.value)}
            <span class="error"> ± {hu(lumen.se)} HU</span>
            <span class="what">lumen</span>
          </p>
          <table>
            <caption class="visually-hidden">What a plain region reads on both kernels</caption>
            <thead>
              <tr>
                <th scope="col">soft</th>
                <th scope="col"> </th>
                <th scope="col">sharp</th>
              </tr>
            </thead>
            <tbody>
              <tr>
                <td class="soft">{hu(fit?.plain?.softHu)}</td>
                <th scope="row" title="Mean of a round region of 70 % of the strut radius">
                  plain region HU
                </th>
                <td class="sharp">{hu(fit?.plain?.sharpHu)}</td>
              </tr>
            </tbody>
          </table>
          <p class="fit-facts">
            {`Tilt ${formatFixed(fit?.tiltDeg, 0)}° · ${fit?.slices ?? 0} slices · ${stent.nominalMm === undefined ? 'no nominal diameter' : `nominal ${formatFixed(stent.nominalMm, 2)} mm`}`}
          </p>
        </>
      )}
      {fit === null && <p class="empty">Being fitted on both kernels…</p>}
      {fit?.reason != null && (
        <ul class="flags" aria-label="Why there is no fitted stent">
          <li>
            <FlagSign />
            <span>{`No value (${NO_VALUE}). ${fit.reason.text}`}</span>
          </li>
        </ul>
      )}
    </section>
  );
}

import { formatFixed } from '../../core/format/index.js';
import type { NoiseSpectrum } from '../pairing/measuredPair.js';
import { useSize } from '../panels/parts/useSize.js';
import { NOISE_MARGIN_PX, noiseDrawing, noiseSummary, powerText } from './noiseDrawing.js';

export interface NoisePlotProps {
  /** Undefined until the pair was measured, or where there are too few uniform areas. */
  readonly spectra: { readonly soft: NoiseSpectrum; readonly sharp: NoiseSpectrum } | undefined;
  /** Why there is no picture, or how many areas it rests on. */
  readonly about: string;
}

/** Noise power spectra of both kernels, measured in the same uniform areas: soft solid, sharp dashed. */
export function NoisePlot({ spectra, about }: NoisePlotProps) {
  const [ref, size] = useSize<HTMLDivElement>();
  return (
    <div class="plot-area" ref={ref}>
      {spectra === undefined && <p class="empty">{about}</p>}
      {spectra !== undefined && size !== undefined && size.heightPx > 60 && (
        <Picture {...spectra} {...size} about={about} />
      )}
    </div>
  );
}

interface PictureProps {
  readonly soft: NoiseSpectrum;
  readonly sharp: NoiseSpectrum;
  readonly about: string;
  readonly widthPx: number;
  readonly heightPx: number;
}

function Picture({ soft, sharp, about, widthPx, heightPx }: PictureProps) {
  const { x, y, isLog, powers, softLine, sharpLine } = noiseDrawing(soft, sharp, widthPx, heightPx);
  const bottom = heightPx - NOISE_MARGIN_PX.bottom;
  const right = widthPx - NOISE_MARGIN_PX.right;
  return (
    <svg
      width={widthPx}
      height={heightPx}
      role="img"
      aria-label={`${noiseSummary(soft, sharp)} ${about}`}
    >
      {powers.map((power) => (
        <g key={power}>
          <path
            class={y(power) === bottom ? 'axis' : 'grid'}
            d={`M${NOISE_MARGIN_PX.left} ${y(power)}H${right}`}
          />
          <text x={NOISE_MARGIN_PX.left - 6} y={y(power) + 4} text-anchor="end">
            {powerText(power)}
          </text>
        </g>
      ))}
      {x.ticks(Math.max(2, Math.floor(widthPx / 70))).map((perMm) => (
        <g key={perMm}>
          <path class="axis" d={`M${x(perMm)} ${bottom}v4`} />
          <text x={x(perMm)} y={bottom + 16} text-anchor="middle">
            {formatFixed(perMm, 1)}
          </text>
        </g>
      ))}
      <text x={right} y={heightPx - 2} text-anchor="end">
        per mm
      </text>
      <text x={NOISE_MARGIN_PX.left} y={heightPx - 2}>
        {about}
      </text>
      <text x={2} y={13}>
        HU² mm²{isLog ? ', logarithmic' : ''}
      </text>
      <path class="series soft" d={softLine} />
      <path class="series sharp" d={sharpLine} />
      <Mean side="soft" px={x(soft.meanPerMm)} bottomPx={bottom} />
      <Mean side="sharp" px={x(sharp.meanPerMm)} bottomPx={bottom} />
      <Peak side="soft" spectrum={soft} x={x} y={y} />
      <Peak side="sharp" spectrum={sharp} x={x} y={y} />
      <path class="series soft" d={`M${right - 118} 9h18`} />
      <text class="soft" x={right - 95} y={13}>
        soft
      </text>
      <path class="series sharp" d={`M${right - 58} 9h18`} />
      <text class="sharp" x={right} y={13} text-anchor="end">
        sharp
      </text>
    </svg>
  );
}

/** The highest point of a spectrum: a ring on its curve. */
function Peak({
  side,
  spectrum: { peakPerMm, frequencyPerMm, powerHu2Mm2 },
  x,
  y,
}: {
  readonly side: 'soft' | 'sharp';
  readonly spectrum: NoiseSpectrum;
  readonly x: (perMm: number) => number;
  readonly y: (power: number) => number;
}) {
  if (peakPerMm === undefined) return null;
  const power = powerHu2Mm2[Array.from(frequencyPerMm).indexOf(peakPerMm)];
  if (power === undefined || !(power > 0)) return null;
  return <circle class={`peak-mark ${side}`} cx={x(peakPerMm)} cy={y(power)} r={3} />;
}

interface MeanProps {
  readonly side: 'soft' | 'sharp';
  readonly px: number;
  readonly bottomPx: number;
}

/** The mean frequency: a line up from the axis with a small triangle under it. */
function Mean({ side, px, bottomPx }: MeanProps) {
  return (
    <g>
      <path class={`mean ${side}`} d={`M${px} ${NOISE_MARGIN_PX.top}V${bottomPx}`} />
      <path class={`mean-mark ${side}`} d={`M${px} ${bottomPx}l-4 6h8Z`} />
    </g>
  );
}

import type { CtImage, VoiWindow } from '../../core/dicom/index.js';
import { formatFixed, formatQuantity, visibleText } from '../../core/format/index.js';
import type { OrientationLetters, ScaleBar } from '../../core/geometry/index.js';
import { isSameWindow, windowWords } from '../../core/intensity/index.js';
import type { Kernel } from '../../core/note/index.js';

export interface PlateLegendProps {
  readonly kernel: Kernel;
  /** The slice on the plate. */
  readonly image: CtImage;
  readonly window: VoiWindow;
  /** What lies to the right on a folded plate. */
  readonly folded?: FoldedSlice | undefined;
  /** The plate shows sharp − soft: it has no window, and a scale of its own. */
  readonly difference?: boolean;
  /** Position along the stack, with the letter of its axis where it is one of the patient's: 'z 10.0 mm'. */
  readonly position: string;
  /** In place of position and slice: what an oblique cut is. */
  readonly oblique?: string | undefined;
  /** From 0. */
  readonly sliceIndex: number;
  readonly slices: number;
  readonly letters: OrientationLetters;
  readonly bar: ScaleBar | undefined;
}

/** The other kernel's slice on a folded plate. */
export interface FoldedSlice {
  readonly kernel: Kernel;
  readonly image: CtImage;
  readonly window: VoiWindow;
}

/** The words over a plate: what it is, its window, where it is, which way is which. Labels stand as the file has them. */
export function PlateLegend(props: PlateLegendProps) {
  const { image, letters, bar, folded, difference = false } = props;
  return (
    <div class="plate-legend" aria-hidden="true">
      <div class="corner top-left">
        <b>{difference ? 'Sharp − soft' : kernelName(props.kernel)}</b>
        {!difference && seriesText(image)}
        <br />
        {spacingText(image)}
        {folded !== undefined && !isSameWindow(props.window, folded.window) && (
          <>
            <br />
            {windowText(props.window)}
          </>
        )}
        {image.synthetic && (
          <>
            <br />
            <span class="synthetic">SYNTHETIC</span>
          </>
        )}
      </div>
      {folded === undefined && !difference && (
        <div class="corner top-right">{windowText(props.window)}</div>
      )}
      {folded !== undefined && (
        <div class="corner top-right">
          <b>{kernelName(folded.kernel)}</b>
          {seriesText(folded.image)}
          <br />
          {spacingText(folded.image)}
          <br />
          {windowText(folded.window)}
        </div>
      )}
      <div class="corner bottom-left">
        {props.oblique === undefined ? (
          `${props.position} · slice ${props.sliceIndex + 1} of ${props.slices}`
        ) : (
          <span class="oblique">{props.oblique}</span>
        )}
      </div>
      {bar !== undefined && (
        <div class="corner bottom-right">
          {bar.lengthMm < 1 ? formatFixed(bar.lengthMm, 2) : formatFixed(bar.lengthMm, 0)} mm
          <span class="scale-bar" style={{ width: `${bar.lengthPx}px` }} />
        </div>
      )}
      <span class="side left">{letters.left}</span>
      <span class="side right">{letters.right}</span>
      <span class="side top">{letters.top}</span>
      <span class="side bottom">{letters.bottom}</span>
    </div>
  );
}

function kernelName(kernel: Kernel): string {
  return kernel === 'soft' ? 'Soft' : 'Sharp';
}

function windowText(window: VoiWindow): string {
  return visibleText(windowWords(window));
}

function seriesText({ acquisition }: CtImage): string {
  const { seriesNumber, kernelLabel } = acquisition;
  const series = seriesNumber === undefined ? '' : ` · series ${seriesNumber}`;
  return kernelLabel === undefined ? series : `${series} · “${visibleText(kernelLabel)}”`;
}

/** '0.39 mm · 0.6 mm thick'; both spacings where they differ, between columns first, as on the plate. */
function spacingText({ grid, acquisition }: CtImage): string {
  const { thicknessMm } = acquisition;
  const thickness =
    thicknessMm === undefined ? '' : ` · ${String(Number(thicknessMm.toFixed(2)))} mm thick`;
  if (grid.unscaled) return `no pixel spacing${thickness}`;
  const [rows, columns] = grid.pixelSpacingMm.map((mm) => formatQuantity(mm, 'lengthMm'));
  const spacing = rows === columns ? columns : `${columns} × ${rows}`;
  return `${spacing} mm${thickness}`;
}

import { useEffect, useRef } from 'preact/hooks';
import { add, pixelToPatient, scale } from '../../core/geometry/index.js';
import type { Kernel } from '../../core/note/index.js';
import type { ResidualMap } from '../../core/stent/index.js';
import type { Fitting } from '../services/fitting.js';
import { shownSlice, transformOf } from '../state/selectors.js';
import { selectedStent } from '../state/stentSelectors.js';
import type { Store } from '../state/store.js';
import { mapDifferences } from './differenceColours.js';
import { type PlateTransform, patientToPlate } from './plateTransform.js';

export interface ResidualsProps {
  readonly kernel: Kernel;
  readonly store: Store;
  readonly fitOf: Fitting['fitOf'];
}

/** What the selected stent's fit leaves over, image minus model, in the colours of the difference, over its own pixels. */
export function Residuals({ kernel, store, fitOf }: ResidualsProps) {
  const state = store.state.value;
  const stent = selectedStent(state);
  const transform = transformOf(state, kernel);
  const shown = shownSlice(state, kernel);
  if (!state.residuals || stent === undefined || transform === undefined) return null;
  const fit = fitOf(stent)?.fit;
  if (fit === undefined || fit.reason !== undefined) return null;
  const map = fit.kernels[kernel === 'soft' ? 0 : 1]?.residual;
  if (map === undefined || map.sliceIndex !== shown?.index) return null;
  return <Picture map={map} transform={transform} rangeHu={state.compare.rangeHu} />;
}

function Picture({
  map,
  transform,
  rangeHu,
}: {
  readonly map: ResidualMap;
  readonly transform: PlateTransform;
  readonly rangeHu: number;
}) {
  const canvas = useRef<HTMLCanvasElement>(null);
  useEffect(() => {
    const context = canvas.current?.getContext('2d');
    if (context == null) return;
    const image = context.createImageData(map.columns, map.rows);
    mapDifferences(map.hu, rangeHu, new Uint32Array(image.data.buffer));
    context.putImageData(image, 0, 0);
  }, [map, rangeHu]);
  const { grid } = transform;
  const half = add(
    scale(grid.rowDirection, -grid.pixelSpacingMm[1] / 2),
    scale(grid.columnDirection, -grid.pixelSpacingMm[0] / 2),
  );
  const corner = (column: number, row: number) =>
    patientToPlate(transform, add(pixelToPatient(grid, { column, row }), half));
  const from = corner(map.column, map.row);
  const to = corner(map.column + map.columns, map.row + map.rows);
  return (
    <canvas
      class="residuals"
      ref={canvas}
      width={map.columns}
      height={map.rows}
      style={{
        left: `${from.x}px`,
        top: `${from.y}px`,
        width: `${to.x - from.x}px`,
        height: `${to.y - from.y}px`,
      }}
    />
  );
}

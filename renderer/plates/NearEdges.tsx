import { useMemo } from 'preact/hooks';
import { pixelToPatient } from '../../core/geometry/index.js';
import type { Kernel } from '../../core/note/index.js';
import {
  edgesNearOn,
  type FoundEdges,
  type Shape,
  type StackBeside,
} from '../../core/region/index.js';
import type { AppState } from '../state/appState.js';
import { noiseOfKernel } from '../state/noiseOfKernel.js';
import { isOnPlate, selectedRegion, sliceOf } from '../state/regionSelectors.js';
import { stackOf, transformOf } from '../state/selectors.js';
import type { Store } from '../state/store.js';
import type { Stored } from './layers.js';
import { pixelOutline } from './pixelOutline.js';
import { type PlateTransform, patientToPlate } from './plateTransform.js';

export interface NearEdgesProps {
  readonly kernel: Kernel;
  readonly store: Store;
  readonly stored: Stored;
}

/** The pixels of struts, calcium and air that lie within a blur of the selected region, outlined on its plate. */
export function NearEdges({ kernel, store, stored }: NearEdgesProps) {
  const state = store.state.value;
  const transform = transformOf(state, kernel);
  const shape = state.draft?.shape ?? selectedRegion(state)?.shape;
  // On an oblique cut edges are not sought: the blur of the kernels is another there.
  const isShown = state.cut === undefined && shape !== undefined && isOnPlate(state, kernel, shape);
  const own = isShown ? sideOf(state, kernel, shape, stored) : undefined;
  const other = kernel === 'soft' ? 'sharp' : 'soft';
  const isOneSpace = state.pair?.link === 'position';
  const beside = isShown && isOneSpace ? sideOf(state, other, shape, stored) : undefined;
  const found = useMemo(
    () =>
      shape && own ? edgesNearOn(shape, asBeside(own), beside && asBeside(beside)) : undefined,
    [shape, own?.stack, own?.values, own?.noise, beside?.stack, beside?.values, beside?.noise],
  );
  if (transform === undefined || found === undefined || found.edges.length === 0) return null;
  const { widthPx, heightPx } = transform.size;
  return (
    <svg class="plate-overlay" width={widthPx} height={heightPx} aria-hidden="true">
      {found.edges.map(({ kind, pixels }) => {
        const path = outlinePath(pixels, found, transform);
        return (
          <g key={`${kind} ${pixels[0]}`} class="near-edge" data-edge={kind}>
            <path class="near-edge-halo" d={path} />
            <path class="near-edge-line" d={path} />
          </g>
        );
      })}
    </svg>
  );
}

interface SideHere {
  readonly stack: StackBeside['stack'];
  readonly noise: StackBeside['noise'];
  /** Stored values of the slice that the shape lies on. */
  readonly values: ReturnType<Stored>;
}

function sideOf(
  state: AppState,
  kernel: Kernel,
  shape: Shape,
  stored: Stored,
): SideHere | undefined {
  const stack = stackOf(state, kernel);
  const index = stack && sliceOf(shape, stack);
  if (stack === undefined || index === undefined) return undefined;
  return { stack, noise: noiseOfKernel(state, kernel), values: stored(kernel, index) };
}

function asBeside({ stack, noise, values }: SideHere): StackBeside {
  return { stack, noise, storedOf: () => values };
}

/** The pixels may be those of the other stack's slice: they are laid on the plate by position. */
function outlinePath(pixels: Int32Array, { slice }: FoundEdges, transform: PlateTransform): string {
  const { grid } = slice.image;
  return pixelOutline(pixels, grid.columns)
    .map((side) => {
      const [from, to] = side.map((corner) =>
        patientToPlate(transform, pixelToPatient(grid, corner)),
      );
      return from && to
        ? `M${from.x.toFixed(1)} ${from.y.toFixed(1)}L${to.x.toFixed(1)} ${to.y.toFixed(1)}`
        : '';
    })
    .join('');
}

import { add, subtract, type Vec3 } from '../../core/geometry/index.js';
import type { Kernel, NoteRegion } from '../../core/note/index.js';
import { moveShape, type Shape } from '../../core/region/index.js';
import { plateToPatient } from '../plates/plateTransform.js';
import type { AppState } from '../state/appState.js';
import { regionsOn } from '../state/regionSelectors.js';
import { transformOf } from '../state/selectors.js';
import { type Hit, hitShape } from './hitRegion.js';
import { ellipseAxes, shapeOnPlate } from './regionOnPlate.js';
import { resizedShape } from './resizedShape.js';
import type { Tool, ToolPointer } from './tool.js';

export interface RegionHit {
  readonly region: NoteRegion;
  readonly hit: Hit;
}

/**
 * The region that a press takes hold of, whatever the tool: the selected one by its handles, edge or inside; any
 * other one by its edge only, so that drawing and windowing over regions stays possible.
 */
export function regionAt(
  state: AppState,
  { kernel, point }: Pick<ToolPointer, 'kernel' | 'point'>,
): RegionHit | undefined {
  const transform = transformOf(state, kernel);
  if (transform === undefined) return undefined;
  const regions = regionsOn(state, kernel);
  const selected = regions.find(({ id }) => id === state.selected);
  const others = regions.filter((region) => region !== selected).reverse();
  if (selected !== undefined) {
    const hit = hitShape(shapeOnPlate(selected.shape, transform), point, true);
    if (hit !== undefined && (hit.part !== 'inside' || !others.some(isHit))) {
      return { region: selected, hit };
    }
  }
  const edge = others.find(isHit);
  return edge === undefined ? undefined : { region: edge, hit: { part: 'edge' } };

  function isHit({ shape }: NoteRegion): boolean {
    return (
      transform !== undefined &&
      hitShape(shapeOnPlate(shape, transform), point, false)?.part === 'edge'
    );
  }
}

/** Selects a region, moves it, or changes its size by a handle. */
export function selectTool({ region, hit }: RegionHit): Tool {
  const select = (kernel: Kernel) => (state: AppState) => ({
    ...state,
    active: kernel,
    selected: region.id,
  });
  return {
    id: 'select',
    click: (port, { kernel }) => port.change('Select region', select(kernel)),
    drag: (port, start) => {
      const before = port.now();
      const { kernel } = start;
      const transform = transformOf(before, kernel);
      if (transform === undefined) return undefined;
      const from = plateToPatient(transform, start.point);
      const shapeTo = ({ point, shift }: ToolPointer): Shape => {
        const by = subtract(plateToPatient(transform, point), from);
        if (hit.part !== 'handle') return moveShape(region.shape, by);
        const handle = handleMm(region.shape, hit.index);
        return resizedShape(region.shape, hit.index, add(handle, by), shift, transform);
      };
      const handleMm = (shape: Shape, index: number): Vec3 => {
        if (shape.kind === 'outline') return shape.pointsMm[index] ?? from;
        const axis = ellipseAxes(shape, transform)[index % 2 === 0 ? 0 : 1];
        const radius = shape.radiiMm[index % 2 === 0 ? 0 : 1] * (index < 2 ? 1 : -1);
        return add(shape.centreMm, [axis[0] * radius, axis[1] * radius, axis[2] * radius]);
      };
      return {
        move: (pointer) => {
          port.change('Change region', (state) => ({
            ...select(kernel)(state),
            draft: { kernel, role: region.role, shape: shapeTo(pointer), regionId: region.id },
          }));
        },
        complete: (pointer) => port.reshapeRegion(region.id, shapeTo(pointer)),
        cancel: () => {
          port.change('Give the change up', (state) => ({
            ...state,
            draft: undefined,
            selected: before.selected,
          }));
        },
      };
    },
  };
}

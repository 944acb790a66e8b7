import type { Role } from '../../core/region/index.js';
import { ROLE_SIGNS } from '../../core/region/index.js';
import { handlesOf, type ShapeOnPlate } from '../tools/regionOnPlate.js';

export interface RegionShapeProps {
  readonly shape: ShapeOnPlate;
  readonly role: Role;
  readonly selected: boolean;
  /** An outline whose last point isn't joined with its first yet. */
  readonly open?: boolean;
}

/** One region on a plate: its line in colour and dashes of its role over a dark one, and handles when selected. */
export function RegionShape({ shape, role, selected, open = false }: RegionShapeProps) {
  const path = open ? openPath(shape) : closedPath(shape);
  return (
    <g class="region" data-role={role} data-selected={selected}>
      <path class="region-halo" d={path} />
      <path class="region-line" d={path} stroke-dasharray={ROLE_SIGNS[role].dashPx.join(' ')} />
      {selected &&
        handlesOf(shape).map(({ x, y }) => (
          <rect key={`${x} ${y}`} class="region-handle" x={x - 3} y={y - 3} width={6} height={6} />
        ))}
    </g>
  );
}

function closedPath(shape: ShapeOnPlate): string {
  if (shape.kind === 'outline') return `${openPath(shape)}Z`;
  const { centre, u, v } = shape;
  // Two half ellipses; the arc's own axes are those of the plate when u and v are, and found from u otherwise.
  const angleDeg = (Math.atan2(u.y, u.x) * 180) / Math.PI;
  const arc = `A${Math.hypot(u.x, u.y)} ${Math.hypot(v.x, v.y)} ${angleDeg} 1 1`;
  return `M${centre.x + u.x} ${centre.y + u.y}${arc} ${centre.x - u.x} ${centre.y - u.y}${arc} ${centre.x + u.x} ${centre.y + u.y}Z`;
}

function openPath(shape: ShapeOnPlate): string {
  if (shape.kind === 'ellipse') return closedPath(shape);
  return shape.points.map(({ x, y }, index) => `${index === 0 ? 'M' : 'L'}${x} ${y}`).join('');
}

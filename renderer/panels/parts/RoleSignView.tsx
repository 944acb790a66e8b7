import type { Role } from '../../../core/region/index.js';
import { ROLE_SIGNS, type RoleSign } from '../../../core/region/index.js';

/** The shape of a role about (0, 0), 8 px wide, in the current colour. */
function Shape({ shape }: { readonly shape: RoleSign['shape'] }) {
  switch (shape) {
    case 'disc':
      return <circle r={4} fill="currentColor" />;
    case 'ring':
      return <circle r={3.3} fill="none" stroke="currentColor" stroke-width={1.8} />;
    case 'triangle':
      return <path d="M0 -4.4 4.4 3.4H-4.4Z" fill="currentColor" />;
    case 'square':
      return <path d="M-3.6 -3.6H3.6V3.6H-3.6Z" fill="currentColor" />;
    case 'diamond':
      return <path d="M0 -4.8 4.8 0 0 4.8 -4.8 0Z" fill="currentColor" />;
  }
}

/** A role's shape alone, as the twin ruler shows it. */
export function RoleShape({ role }: { readonly role: Role }) {
  return (
    <svg width={12} height={12} viewBox="-6 -6 12 12" aria-hidden="true">
      <Shape shape={ROLE_SIGNS[role].shape} />
    </svg>
  );
}

/** A role's line with its dash pattern, as the plates show it, and its shape. */
export function RoleKey({ role }: { readonly role: Role }) {
  const { dashPx, shape } = ROLE_SIGNS[role];
  return (
    <svg
      class="role-sign"
      data-role={role}
      width={28}
      height={12}
      viewBox="0 -6 28 12"
      aria-hidden="true"
    >
      <path
        d="M0 0H15"
        stroke="currentColor"
        stroke-width={2.4}
        stroke-dasharray={dashPx.join(' ')}
      />
      <g transform="translate(22 0)">
        <Shape shape={shape} />
      </g>
    </svg>
  );
}

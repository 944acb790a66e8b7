import type { Role } from './roles.js';

/** The look of a role's marks: a colour, and two signs that do without it. */
export interface RoleSign {
  /** For canvases; the style sheet has the same as --lumen and so on. Okabe & Ito's set for all kinds of colour vision. */
  readonly colour: string;
  /** Dash pattern of its outline in CSS px; empty is a solid line. */
  readonly dashPx: readonly number[];
  /** Shape of its mark on the twin ruler. */
  readonly shape: 'disc' | 'ring' | 'triangle' | 'square' | 'diamond';
}

export const ROLE_SIGNS: Readonly<Record<Role, RoleSign>> = {
  lumen: { colour: '#56b4e9', dashPx: [], shape: 'disc' },
  wall: { colour: '#e69f00', dashPx: [4, 3], shape: 'ring' },
  plaque: { colour: '#d55e00', dashPx: [1.5, 2.5], shape: 'triangle' },
  fat: { colour: '#f0e442', dashPx: [9, 4], shape: 'square' },
  reference: { colour: '#009e73', dashPx: [8, 3, 2, 3], shape: 'diamond' },
};

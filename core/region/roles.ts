/** What a region stands for. */
export const ROLES = ['lumen', 'wall', 'plaque', 'fat', 'reference'] as const;

export type Role = (typeof ROLES)[number];

/** Letter that begins the identifiers of a role's regions: L1, L2, W1 … */
export const ROLE_LETTER: Readonly<Record<Role, string>> = {
  lumen: 'L',
  wall: 'W',
  plaque: 'P',
  fat: 'F',
  reference: 'R',
};

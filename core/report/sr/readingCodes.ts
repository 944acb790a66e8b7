import type { Dominance, FindingKind, NoteFinding } from '../../note/schema.js';
import type { Role } from '../../region/index.js';
import type { ValuesKernel } from '../tableRow.js';
import { type Code, sct } from './code.js';
import { OWN } from './ownCodes.js';

const LUMEN = sct('91747007', 'Lumen of blood vessel');

/** What a finding is. SNOMED CT codes as the dictionary of pydicom 2.3.1 lists them; private where it has none. */
export const KIND_CODES: Readonly<Record<FindingKind, Code>> = {
  stent: sct('65818007', 'Stent'),
  'non-calcified plaque': OWN.nonCalcifiedPlaque,
  'mixed plaque': OWN.mixedPlaque,
  'calcified plaque': sct('29483008', 'Calcified atheromatous plaque'),
  'native lumen': LUMEN,
  reference: OWN.referenceSite,
};

/** What a region stands for. */
export const ROLE_CODES: Readonly<Record<Role, Code>> = {
  lumen: LUMEN,
  wall: OWN.wall,
  plaque: sct('1522000', 'Plaque'),
  fat: sct('256674009', 'Fat'),
  reference: OWN.reference,
};

export const KERNEL_CODES: Readonly<Record<ValuesKernel, Code>> = {
  soft: OWN.soft,
  sharp: OWN.sharp,
  both: OWN.both,
};

function radlex(value: string, meaning: string): Code {
  return { value, scheme: 'RADLEX', meaning };
}

/** CID 7036, Image Quality Assessment. */
export const ASSESSABILITY_CODES: Readonly<
  Record<NonNullable<NoteFinding['assessability']>, Code>
> = {
  assessable: radlex('RID12', 'Diagnostic quality'),
  limited: radlex('RID13', 'Limited quality'),
  'not assessable': radlex('RID14', 'Non-diagnostic quality'),
};

/** CID 3710. */
export const DOMINANCE_CODES: Readonly<Record<Dominance, Code>> = {
  right: sct('253728007', 'Right Coronary Dominance'),
  left: sct('253729004', 'Left Coronary Dominance'),
  'co-dominant': sct('253730009', 'Balanced Coronary Dominance'),
};

import type { Identity } from '../dicom/index.js';
import type { Evidence } from '../note/index.js';

/**
 * Whether both stacks are of one patient: by identifier, name and date of birth, each where both files have it. One
 * that differs is another patient; a date of birth alone proves nothing.
 */
export function patientEvidence(a: Identity, b: Identity): Evidence {
  const check = 'patient';
  const both = `${sayIdentity(a)} and ${sayIdentity(b)}`;
  const pairs = [
    [a.patientId, b.patientId],
    [plainName(a.patientName), plainName(b.patientName)],
    [a.patientBirthDate, b.patientBirthDate],
  ] as const;
  const isAnother = pairs.some(([x, y]) => x !== undefined && y !== undefined && x !== y);
  if (isAnother) return { check, state: 'differs', text: `another patient: ${both}` };
  const isNamed = pairs.slice(0, 2).some(([x, y]) => x !== undefined && x === y);
  if (!isNamed) return { check, state: 'unknown', text: `patient: ${both}` };
  const text =
    sayIdentity(a) === sayIdentity(b) ? `same patient: ${sayIdentity(a)}` : `same patient: ${both}`;
  return { check, state: 'agrees', text };
}

function sayIdentity({ patientId, patientName, patientBirthDate }: Identity): string {
  const parts = [patientId, patientName, patientBirthDate && `born ${patientBirthDate}`];
  return parts.filter(Boolean).join(' · ') || 'not stated';
}

/** Trailing component marks and the padding around components say nothing (PS3.5 6.2.1.1). */
function plainName(name: string | undefined): string | undefined {
  const plain = name
    ?.split('^')
    .map((part) => part.trim())
    .join('^')
    .replace(/[\^= ]+$/, '');
  return plain === '' ? undefined : plain;
}

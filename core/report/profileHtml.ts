import { kernelSectionHtml } from './kernelSectionHtml.js';
import type { MeasurementTable } from './measurementTable.js';

/** The section of profiles in the page, with the definition of their numbers; empty where the note has none. */
export function profileHtml({ rows }: Pick<MeasurementTable, 'rows'>): string {
  const profiles = rows.filter(({ item }) => item === 'profile');
  return kernelSectionHtml(
    {
      title: 'Profiles',
      first: 'Profile',
      columns: [
        ['visible width', 'visible width, mm'],
        ['strut peak distance', 'strut peak distance, mm'],
        ['strut width', 'strut width, mm'],
        ['inner edge rise', 'rise 10–90 %, mm'],
        ['lumen level', 'lumen level, HU'],
        ['artificial narrowing', 'artificial narrowing, %'],
      ],
      notes: [...new Set(profiles.map(({ definition }) => definition))],
    },
    profiles,
  );
}

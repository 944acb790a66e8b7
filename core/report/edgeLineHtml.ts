import { kernelSectionHtml } from './kernelSectionHtml.js';
import type { MeasurementTable } from './measurementTable.js';

/** The section of edge lines in the page; empty where the note has none. */
export function edgeLineHtml({ rows }: Pick<MeasurementTable, 'rows'>): string {
  return kernelSectionHtml(
    {
      title: 'Edge lines',
      first: 'Edge',
      columns: [
        ['edge rise', 'rise 10–90 %, mm'],
        ['edge rise standard error', 'standard error, mm'],
        ['edge crossings', 'crossings, mm'],
        ['blur FWHM', 'blur FWHM, mm'],
        ['edge step', 'step, HU'],
        ['edge pixels', 'n'],
      ],
      notes: [
        'Rise: 10–90 % distance of the Gaussian-blurred step that fits the pixels of the band best, at right angles to the edge. Crossings: the same read off the measured profile. Blur FWHM: of the Gaussian with that rise, rise / 2.5631 × 2.3548. Step: level behind the edge less the level before it, from the start of the line on.',
      ],
    },
    rows.filter(({ item }) => item === 'edge line'),
  );
}

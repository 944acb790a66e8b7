import { csvParse } from 'd3';
import { describe, expect, it } from 'vitest';
import { addEdge, type Note } from '../../../../core/note/index.js';
import { type EdgeValue, edgeNotMeasured } from '../../../../core/region/index.js';
import {
  edgeLineHtml,
  measurementTable,
  toCsv,
  toHtml,
  toWideCsv,
} from '../../../../core/report/index.js';
import { sampleState } from '../../renderer/sample.js';

const VALUE: EdgeValue = {
  ...edgeNotMeasured({ code: '', text: '' }),
  riseMm: 1.6789,
  riseErrorMm: 0.04,
  crossingsMm: null,
  blurFwhmMm: 1.5424,
  blurErrorMm: 0.037,
  fromHu: 50,
  toHu: -30,
  atMm: 6,
  n: 243,
  sliceIndex: 2,
  sliceOffsetMm: 0,
  sopInstanceUid: '2.25.88001.2.3',
  flags: [],
};

function noteWithEdge(): Note {
  const { note } = sampleState();
  if (note === undefined) throw new Error('no note');
  const sharp = edgeNotMeasured({ code: 'no-step', text: 'No <clear> step.' });
  const line = { fromMm: [-6, -10, 2], toMm: [7, -10, 2], bandMm: 4 } as const;
  return addEdge(note, line, { soft: VALUE, sharp }, '2026-01-10T11:00:00Z').note;
}

describe('Edge lines in the exports', () => {
  it('are lines of the long table, in full precision, with where the line runs and why there is none', () => {
    const lines = toCsv(noteWithEdge()).split('\r\n');
    const rise = lines.find((line) => line.includes('edge rise,1.6789'));
    expect(rise).toContain('edge line,E1,Edge 1');
    expect(rise).toContain('1.6789,1.68,mm');
    expect(rise).toContain('"from (-6.00, -10.00, 2.00) to (7.00, -10.00, 2.00) mm, band 4.0 mm"');
    expect(lines.find((line) => line.includes('edge step,-80'))).toContain('-80,-80.0,HU');
    expect(lines.find((line) => line.includes('edge crossings'))).toContain('no value');
    expect(lines.some((line) => line.includes('sharp') && line.includes('No <clear> step.'))).toBe(
      true,
    );
  });

  it('have a section of the page, with texts made harmless; without lines there is none', () => {
    const html = toHtml(noteWithEdge());
    expect(html).toContain('<h2>Edge lines</h2>');
    expect(html).toContain('<td class="number">1.68</td>');
    expect(html).toContain('No &lt;clear&gt; step.');
    const { note } = sampleState();
    if (note === undefined) throw new Error('no note');
    expect(edgeLineHtml(measurementTable(note))).toBe('');
    expect(toHtml(note)).not.toContain('Edge lines');
  });

  it('stand in the wide table after regions and contrasts, with the kernel that is quoted', () => {
    const { note } = sampleState();
    if (note === undefined) throw new Error('no note');
    const items = (text: string) =>
      csvParse(text)
        .map(({ id }) => id)
        .filter((id) => id !== 'note');
    expect(items(toWideCsv(noteWithEdge()))).toEqual([...items(toWideCsv(note)), 'E1']);
    // No step was found on the sharp kernel.
    const long = csvParse(toCsv(noteWithEdge())).filter(({ id }) => id === 'E1');
    expect(new Set(long.map((line) => `${line.kernel} ${line.quoted} ${line.quote_by}`))).toEqual(
      new Set(['soft yes proposal', 'sharp no proposal']),
    );
  });
});

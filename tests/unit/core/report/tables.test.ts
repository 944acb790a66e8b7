import { csvParse, tsvParseRows } from 'd3';
import { describe, expect, it } from 'vitest';
import { addEdge } from '../../../../core/note/index.js';
import { type EdgeValue, edgeNotMeasured } from '../../../../core/region/index.js';
import {
  CAUTIONS,
  SYNTHETIC_CAUTION,
  toCsv,
  toTsv,
  toWideCsv,
} from '../../../../core/report/index.js';
import { pythonHas, pythonJson } from '../../../support/python.js';
import { NOW } from '../note/noteFixture.js';
import { richNote } from '../note/richNote.js';
import { hostileNote } from './hostileNote.js';

const FORMULA = /^[=+\-@\t\r]/;
const NUMBER = /^-?\d+(\.\d+)?(e[+-]?\d+)?$/;

/** Reads CSV text with Python's csv module: an implementation of RFC 4180 from outside. */
const READER = `
import csv, io, json, sys
text = open(sys.argv[1], newline='', encoding='utf-8').read()
print(json.dumps(list(csv.reader(io.StringIO(text, newline=''), strict=True))))
`;

async function readByPython(text: string): Promise<string[][]> {
  const { mkdtempSync, rmSync, writeFileSync } = await import('node:fs');
  const { join } = await import('node:path');
  const { tmpdir } = await import('node:os');
  const folder = mkdtempSync(join(tmpdir(), 'csv-'));
  try {
    writeFileSync(join(folder, 'a.csv'), text);
    return pythonJson(READER, [join(folder, 'a.csv')]) as string[][];
  } finally {
    rmSync(folder, { recursive: true });
  }
}

describe('the long table (CSV)', () => {
  const note = richNote();
  const lines = csvParse(toCsv(note));

  it('has one line a value with kernel, unit, formula, slice and SOP Instance UID', () => {
    const soft = note.regions[0]?.soft;
    const line = lines.find((l) => l.id === 'L1' && l.kernel === 'soft' && l.quantity === 'SD');
    expect(line).toMatchObject({
      item: 'region',
      label: 'Lumen 1',
      role: 'lumen',
      segment: '7 mLAD',
      finding: 'stent',
      nominal_mm: '3',
      assessability: 'limited',
      reason: 'motion',
      place: 'in stent',
      kernel_label: 'Plain',
      value: String(soft?.sdHu),
      printed: soft?.sdHu?.toFixed(1),
      unit: 'HU',
      formula: 'sample SD, divisor n - 1',
      quoted: 'no',
      slice_index_from_0: '1',
      centre_z_mm: '1',
      sop_instance_uid: '2.25.77001.2.1.2',
      series_instance_uid: '2.25.77001.2.1',
      kvp: '120',
      synthetic: 'no',
      software: 'Diptych 0.1.0',
      changed_at: '2026-01-05T09:30:00.000Z',
    });
  });

  it('has the contrast with its formula, and which kernel is quoted', () => {
    const cnr = lines.find((l) => l.quantity === 'CNR' && l.kernel === 'sharp');
    expect(cnr?.formula).toBe('CNR = (lumen − wall) / SD of reference');
    expect(Number(cnr?.value)).toBe(note.contrasts[0]?.sharp);
    const quoted = lines.filter((l) => l.quoted === 'yes').map((l) => `${l.id} ${l.kernel}`);
    // L1 by the reader's choice, the others as proposed.
    expect([...new Set(quoted)]).toEqual(['L1 sharp', 'W1 soft', 'R1 soft', 'P1 soft']);
    const words = (id: string) => {
      const line = lines.find((l) => l.id === id);
      return [line?.quote, line?.quote_by, line?.quote_reason];
    };
    expect(words('L1')).toEqual(['sharp', 'reader', 'struts']);
    expect(words('W1')).toEqual([
      'soft',
      'proposal',
      'Density: the soft kernel has less noise and less shift.',
    ]);
    expect(words('C1')).toEqual(['', '', '']);
  });

  it('ends with evidence of the pair and cautions in lines of the same shape', () => {
    const remarks = lines.filter((l) => l.item === 'note');
    expect(remarks.find((l) => l.quantity === 'Pair: patient')?.printed).toMatch(/^agrees: /);
    expect(remarks.filter((l) => l.quantity === 'Caution').map((l) => l.printed)).toEqual([
      ...CAUTIONS,
    ]);
    const text = toCsv(note);
    expect(text.startsWith('item,id,label,')).toBe(true);
    expect(text.endsWith('\r\n')).toBe(true);
  });

  it('writes negative numbers with an ASCII minus sign that stays a number', () => {
    const [first, ...others] = note.regions;
    if (!first?.soft) throw new Error('the note has a measured region');
    const negative = {
      ...note,
      regions: [{ ...first, soft: { ...first.soft, meanHu: -90.25 } }, ...others],
    };
    const line = csvParse(toCsv(negative)).find((l) => l.id === 'L1' && l.quantity === 'mean');
    expect([line?.value, line?.printed]).toEqual(['-90.25', '-90.3']);
  });

  it('keeps a line for a region that was not measured', () => {
    const [first, ...others] = note.regions;
    if (!first) throw new Error('the note has a region');
    const unmeasured = { ...note, regions: [{ ...first, sharp: null }, ...others] };
    const line = csvParse(toCsv(unmeasured)).find((l) => l.id === 'L1' && l.kernel === 'sharp');
    expect(line).toMatchObject({
      value: '',
      printed: 'no value',
      flags: 'Not measured on this kernel.',
    });
  });
});

describe('every table', () => {
  it.each([
    ['the long table', () => csvParse(toCsv(hostileNote())).flatMap((l) => Object.values(l))],
    ['the wide table', () => csvParse(toWideCsv(hostileNote())).flatMap((l) => Object.values(l))],
    ['the clipboard table', () => tsvParseRows(toTsv(hostileNote())).flat()],
  ])('has no cell that a spreadsheet takes for a formula: %s', (_, cells) => {
    const risky = cells().filter((cell) => cell && FORMULA.test(cell) && !NUMBER.test(cell));
    expect(risky).toEqual([]);
    expect(cells().filter((cell) => cell?.includes('\u202e'))).toEqual([]);
    expect(cells()).toContain('-90');
  });

  it.skipIf(!pythonHas('csv'))(
    'is read by an outside CSV reader with lines of one width',
    async () => {
      for (const text of [toCsv(hostileNote()), toWideCsv(hostileNote())]) {
        const rows = await readByPython(text);
        expect(new Set(rows.map((row) => row.length)).size).toBe(1);
        expect(rows.length).toBeGreaterThan(20);
        expect(rows.flat()).toContain(SYNTHETIC_CAUTION);
        expect(rows.flat().some((cell) => cell.includes('"quoted", and'))).toBe(true);
      }
    },
  );
});

describe('the wide tables', () => {
  it('have one line a region or contrast', () => {
    const lines = csvParse(toWideCsv(richNote()));
    expect(lines.filter(({ id }) => id !== 'note').map(({ id }) => id)).toEqual([
      'L1',
      'W1',
      'R1',
      'P1',
      'C1',
    ]);
    expect(Number(lines[0]?.soft_mean)).toBe(richNote().regions[0]?.soft?.meanHu);
    expect(Number(lines[4]?.sharp_cnr)).toBe(richNote().contrasts[0]?.sharp);
    expect(lines[4]?.soft_mean).toBe('');
    expect([lines[0]?.quote, lines[0]?.quote_by, lines[0]?.quote_reason]).toEqual([
      'sharp',
      'reader',
      'struts',
    ]);
    expect(lines[0]).not.toHaveProperty('soft_edge_rise_mm');
  });

  it('have a line and columns for edge lines where there are any, with their unit', () => {
    const value = (riseMm: number): EdgeValue => ({
      ...edgeNotMeasured({ code: 'no-step', text: 'No clear step.' }),
      riseMm,
      flags: [],
    });
    const { note } = addEdge(
      richNote(),
      { fromMm: [0, 0, 1], toMm: [4, 0, 1], bandMm: 2 },
      { soft: value(1.25), sharp: value(0.75) },
      NOW,
    );
    const line = csvParse(toWideCsv(note)).find(({ id }) => id === 'E1');
    expect(line).toMatchObject({
      label: 'Edge 1',
      soft_edge_rise_mm: '1.25',
      sharp_edge_rise_mm: '0.75',
      soft_mean: '',
      quote: 'sharp',
      quote_by: 'proposal',
    });
    const [head, ...rows] = tsvParseRows(toTsv(note));
    const at = head?.indexOf('Sharp edge rise, mm') ?? -1;
    expect(rows.find(([id]) => id === 'E1')?.[at]).toBe('0.75');
  });

  it('carry printed digits, kernels and cautions to the clipboard', () => {
    const rows = tsvParseRows(toTsv(richNote()));
    expect(rows[0]?.slice(0, 3)).toEqual(['ID', 'Name', 'Role']);
    expect(rows[0]).toContain('Soft mean, HU');
    const mean = rows[0]?.indexOf('Soft mean, HU') ?? -1;
    expect(rows[1]?.[mean]).toBe('108.0');
    expect(rows.at(-4)?.[0]).toContain('Soft: Plain; sharp: Crisp; 120 kV; Diptych 0.1.0');
    expect(rows.at(-3)?.[0]).toBe('Pair: acquisition unknown; phase unknown.');
    expect(rows.at(-1)?.[0]).toBe(CAUTIONS[1]);
  });
});

import { execFileSync } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { toPdf } from '../../app/host/exports/toPdf.js';
import type { Note } from '../../core/note/index.js';
import { encodePng, makeRaster } from '../../core/raster/index.js';
import { measurementTable } from '../../core/report/index.js';
import { pdfDocument } from '../../core/report/pdf/index.js';
import { richNote } from '../unit/core/note/richNote.js';
import { linesNote } from '../unit/core/report/linesNote.js';

// Poppler's tools read what was written: text by pdftotext, pages and fonts by pdfinfo and pdffonts, ink by pdftoppm.
const HAS_POPPLER = ['pdftotext', 'pdfinfo', 'pdffonts', 'pdftoppm'].every((name) =>
  existsSync(`/usr/bin/${name}`),
);

const folder = mkdtempSync(join(tmpdir(), 'pdf-'));

afterAll(() => rmSync(folder, { recursive: true }));

const NOW = '2026-01-11T09:00:00.000Z';

/** Colour of the stand-in for a key image, which no other part of the page has. */
const PICTURE: readonly [number, number, number] = [10, 200, 30];

async function written(note: Note, name: string): Promise<string> {
  const [first] = note.regions;
  const png = encodePng(makeRaster(60, 30, PICTURE));
  const images = { regionIds: first ? [first.id] : [], nameOf: (id: string) => `region-${id}` };
  const pictures = new Map(first ? [[`region-${first.id}`, png] as const] : []);
  const path = join(folder, `${name}.pdf`);
  writeFileSync(path, await toPdf(pdfDocument(note, images), pictures, NOW));
  return path;
}

function tool(name: string, ...args: readonly string[]): string {
  return execFileSync(`/usr/bin/${name}`, [...args], { encoding: 'utf8' });
}

const flat = (text: string): string => text.replace(/\s+/g, ' ');

describe.skipIf(!HAS_POPPLER)('The PDF of a note, read by Poppler', () => {
  it('has every number of the table as it is printed everywhere, and can be searched', async () => {
    const note = richNote();
    const text = flat(tool('pdftotext', '-layout', await written(note, 'rich'), '-'));
    const printed = measurementTable(note).rows.flatMap(({ kernels }) =>
      kernels.flatMap(({ quantities }) => quantities.map((quantity) => quantity.printed)),
    );
    expect(printed.length).toBeGreaterThan(30);
    for (const number of printed) expect(text).toContain(number);
    for (const { label } of note.regions) expect(text).toContain(label);
  });

  it('has cautions, provenance and state, and the mark of a synthetic study on every page', async () => {
    const note = { ...richNote(), synthetic: true };
    const path = await written(note, 'synthetic');
    const pages = Number(/Pages: +(\d+)/.exec(tool('pdfinfo', path))?.[1]);
    expect(pages).toBeGreaterThan(1);
    for (let page = 1; page <= pages; page += 1) {
      const text = flat(tool('pdftotext', '-f', `${page}`, '-l', `${page}`, path, '-'));
      expect(text, `page ${page}`).toContain('SYNTHETIC: computed images of no patient');
      expect(text, `page ${page}`).toContain(`${page} of ${pages}`);
    }
    const whole = flat(tool('pdftotext', path, '-'));
    expect(whole).toContain('not for primary diagnosis');
    expect(whole).toContain('This note is not verified.');
    expect(whole).toContain(note.study.studyInstanceUid);
  });

  it('embeds every font that it uses', async () => {
    const lines = tool('pdffonts', await written(richNote(), 'fonts'))
      .trim()
      .split('\n')
      .slice(2);
    expect(lines.length).toBeGreaterThanOrEqual(2);
    for (const line of lines) expect(line).toMatch(/\byes +yes +yes\b/);
  });

  it('shows the key image', async () => {
    const path = await written(richNote(), 'picture');
    tool('pdftoppm', '-r', '40', path, join(folder, 'page'));
    const pages = readFileSync(join(folder, 'page-1.ppm'));
    const others = existsSync(join(folder, 'page-2.ppm'))
      ? readFileSync(join(folder, 'page-2.ppm'))
      : new Uint8Array(0);
    const ink = (bytes: Uint8Array): number => {
      let count = 0;
      for (let index = 0; index + 2 < bytes.length; index += 1)
        if (PICTURE.every((level, colour) => bytes[index + colour] === level)) count += 1;
      return count;
    };
    expect(ink(pages) + ink(others)).toBeGreaterThan(1000);
  });

  it('takes text of files as text, and writes letters that its font has not as their code points', async () => {
    const note = richNote();
    const study = { ...note.study, patientId: 'C-1 <b>山</b> {text:1}', patientName: 'Ωmega^Ölaf' };
    const text = flat(tool('pdftotext', await written({ ...note, study }, 'letters'), '-'));
    expect(text).toContain('C-1 <b>[U+5C71]</b> {text:1}');
    expect(text).toContain('Ölaf');
  });

  it('has edge lines, profiles, fitted stents and cuts, with places, definition and caution', async () => {
    const text = flat(tool('pdftotext', '-layout', await written(linesNote(), 'lines'), '-'));
    // Lines of the text: quantity, unit, soft, sharp; of a fit one number for both kernels.
    expect(text).toMatch(/edge rise mm 1\.68/);
    expect(text).toMatch(/visible width mm 2\.06 2\.46/);
    expect(text).toMatch(/artificial narrowing % 31 18/);
    expect(text).toMatch(/strut diameter mm 3\.11/);
    expect(text).toMatch(/fitted lumen HU 345/);
    expect(text).toMatch(/plain region HU 536 419/);
    const words = flat(tool('pdftotext', join(folder, 'lines.pdf'), '-'));
    for (const said of [
      'E1: Edge 1',
      'X1: Profile 1 · nominal 3 mm · from (-8.50, -15.25, 2.00) to (-4.50, -15.25, 2.00) mm, band 1.0 mm',
      'narrowing = 1 - visible width / nominal inner diameter',
      'S1: Stent 1 · 7 mLAD · stent · nominal 3 mm · fitted from (-6.50, -15.25, 2.00) mm',
      'No fitted stent: What is left over is not round: no value.',
      'on Cut 1 (oblique, resampled by cubic convolution, mean over 1.5 mm)',
      'Oblique plane at right angles to the course from (-7.50, -15.25, 0.50)',
      '45.0° to the slices of the soft stack.',
      'Fitted stent values were tried on synthetic phantoms only',
    ])
      expect(words).toContain(said);
  });

  it('of an empty note says that nothing was measured', async () => {
    const note = { ...richNote(), regions: [], contrasts: [], findings: [] };
    const text = flat(tool('pdftotext', await written(note, 'empty'), '-'));
    expect(text).toContain('No region was measured.');
    expect(text).toContain('No contrast was computed.');
  });
});

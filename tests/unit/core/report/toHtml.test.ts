import { describe, expect, it } from 'vitest';
import { CAUTIONS, escapeHtml, toClipboardHtml, toHtml } from '../../../../core/report/index.js';
import { richNote } from '../note/richNote.js';
import { hostileNote } from './hostileNote.js';

describe('the page (HTML)', () => {
  it('needs nothing from outside and holds no script', () => {
    const page = toHtml(hostileNote());
    expect(page).toContain(`content="default-src 'none'; style-src 'unsafe-inline'"`);
    expect(page).not.toMatch(/<script|<img|<link|<iframe|javascript:|\ssrc=|\shref=|url\(/i);
    expect(page.match(/<\/style>/g)).toHaveLength(1);
  });

  it('shows text of files as text', () => {
    const page = toHtml(hostileNote());
    expect(page).toContain('&lt;img onerror&gt;, A');
    expect(page).toContain('first line<br>second &lt;/style&gt;&lt;script&gt;');
    expect(page).toContain('a‹202E›b&quot;quoted&quot;');
  });

  it('has the cautions at its head and at its foot', () => {
    const page = toHtml(richNote());
    for (const caution of CAUTIONS) {
      expect(page.split(escapeHtml(caution))).toHaveLength(3);
    }
    expect(page.indexOf(CAUTIONS[1])).toBeLessThan(page.indexOf('<table>'));
    expect(page.lastIndexOf(CAUTIONS[1])).toBeGreaterThan(page.lastIndexOf('</dl>'));
  });

  it('says that a synthetic study is synthetic, and only then', () => {
    const banner = 'SYNTHETIC STUDY: computed images of no patient';
    expect(toHtml(hostileNote()).split(banner)).toHaveLength(3);
    expect(toHtml(richNote())).not.toContain('SYNTHETIC');
  });

  it('gives values, formulas, slices, evidence and provenance', () => {
    const page = toHtml(richNote());
    expect(page).toContain('<td class="number">108.0</td>');
    expect(page).toContain('CNR = (lumen − wall) / SD of reference');
    expect(page).toContain('<td class="number">2 of 4</td>');
    expect(page).toContain(
      'Image, soft: SOP Instance UID 2.25.77001.2.1.2, 0.00 mm from the region’s plane',
    );
    expect(page).toContain('7 mLAD · stent · nominal 3 mm · in stent');
    expect(page).toContain('<dt>patient</dt><dd>agrees: ');
    expect(page).toContain('<dt>Software</dt><dd>Diptych 0.1.0</dd>');
    expect(page).toContain('<dt>Tube voltage</dt><dd>120 kV</dd>');
    expect(page).toContain('<dt>Phase</dt><dd>not stated</dd>');
  });

  it('opens no element that it does not close', () => {
    const open: string[] = [];
    for (const [, closing, name] of toHtml(hostileNote()).matchAll(
      /<(\/?)([a-z][a-z0-9]*)\b[^>]*>/g,
    )) {
      if (name === undefined || ['meta', 'br'].includes(name)) continue;
      if (closing === '') open.push(name);
      else expect(open.pop()).toBe(name);
    }
    expect(open).toEqual([]);
  });
});

describe('the clipboard table (HTML)', () => {
  it('is a table and nothing else, without formulas', () => {
    const html = toClipboardHtml(hostileNote());
    expect(html.startsWith('<table>')).toBe(true);
    expect(html.endsWith('</table>')).toBe(true);
    expect(html).toContain('<td>&#39;-Lumen &quot;1&quot;</td>');
    const cells = [...html.matchAll(/<td[^>]*>([^<]*)/g)].map(([, cell]) => cell ?? '');
    expect(cells.filter((cell) => /^[=+@]|^-(?!\d)/.test(cell))).toEqual([]);
  });
});

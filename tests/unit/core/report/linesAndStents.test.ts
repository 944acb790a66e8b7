import { csvParse, tsvParseRows } from 'd3';
import { describe, expect, it } from 'vitest';
import { PROFILE_DEFINITION } from '../../../../core/note/index.js';
import {
  measurementTable,
  STENT_CAUTION,
  stentSentence,
  toClipboardHtml,
  toCsv,
  toHtml,
  toTsv,
  toWideCsv,
} from '../../../../core/report/index.js';
import { richNote } from '../note/richNote.js';
import { linesNote, SHARP_IMAGE, SOFT_IMAGE, STENT_FIT, STENT_WITHOUT } from './linesNote.js';

const note = linesNote();
const long = csvParse(toCsv(note));

/** Lines of one item and kernel of the long table, as 'quantity: printed unit'. */
function printed(id: string, kernel: string): readonly string[] {
  return long
    .filter((line) => line.id === id && line.kernel === kernel)
    .map((line) => `${line.quantity}: ${line.printed} ${line.unit}`.trim());
}

describe('Profiles in the long table', () => {
  it('have each number of each kernel, in full and as printed', () => {
    expect(printed('X1', 'soft')).toEqual([
      'visible width: 2.06 mm',
      'strut peak distance: 3.08 mm',
      'strut width: 0.94 mm',
      'inner edge rise: 0.72 mm',
      'lumen level: 401.3 HU',
      'artificial narrowing: 31 %',
    ]);
    const sharp = long.find(
      ({ id, kernel, quantity }) =>
        id === 'X1' && kernel === 'sharp' && quantity === 'visible width',
    );
    expect(sharp).toMatchObject({
      item: 'profile',
      label: 'Profile 1',
      value: '2.4621',
      printed: '2.46',
      nominal_mm: '3',
      place: 'from (-8.50, -15.25, 2.00) to (-4.50, -15.25, 2.00) mm, band 1.0 mm',
      quoted: 'yes',
      quote_by: 'proposal',
      slice_index_from_0: '2',
      slice_offset_mm: '0.125',
      centre_x_mm: '-6.5',
      sop_instance_uid: SHARP_IMAGE,
    });
  });

  it('say on which cut they lie, without an image, and why there is none on the other kernel', () => {
    const [line] = long.filter(({ id }) => id === 'X2');
    expect(line).toMatchObject({
      place:
        'from (-8.50, -15.25, 2.00) to (-4.50, -15.25, 2.00) mm, band 1.0 mm; on Cut 1 (oblique, resampled by cubic convolution, mean over 1.5 mm)',
      slice_index_from_0: '',
      slice_offset_mm: '',
      sop_instance_uid: '',
      quote_by: 'reader',
      quote_reason: 'looks truer here',
      flags: 'Measured on an oblique cut, resampled by cubic convolution.',
    });
    expect(long.find(({ id, kernel }) => id === 'X2' && kernel === 'sharp')).toMatchObject({
      printed: 'no value',
      flags: 'Not measured on this kernel.',
    });
  });

  it('have their definition once, in a line of its own', () => {
    const said = long.filter(({ quantity }) => quantity === 'Definition');
    expect(said.map((line) => line.printed)).toEqual([`Profile: ${PROFILE_DEFINITION}`]);
  });
});

describe('Fitted stents in the long table', () => {
  it('have one result for both kernels, and not twice the same number', () => {
    expect(printed('S1', 'both')).toEqual([
      'strut diameter: 3.11 mm',
      'strut diameter standard error: 0.03 mm',
      'strut diameter standard error by refits: 0.03 mm',
      'fitted lumen: 345 HU',
      'fitted lumen standard error: 12 HU',
      'fitted lumen standard error by refits: 15 HU',
      'wall width: 0.63 mm',
      'wall width standard error: 0.05 mm',
      'fitted wall: 62 HU',
      'fitted wall standard error: 18 HU',
      'strut line mass: 413 HU·mm',
      'strut line mass standard error: 21 HU·mm',
      'shared blur: 0.35 mm',
      'shared blur standard error: 0.01 mm',
      'chi square: 118.4',
      'degrees of freedom: 104',
      'tilt: 1.3 °',
      'fitted slices: 7 slices',
    ]);
    const line = long.find(({ id, quantity }) => id === 'S1' && quantity === 'strut diameter');
    expect(line).toMatchObject({
      item: 'fitted stent',
      value: '3.1142',
      segment: '7 mLAD',
      finding: 'stent',
      nominal_mm: '3',
      place:
        'fitted from (-6.50, -15.25, 2.00) mm; axis through (-6.51, -15.27, 2.00) mm along (0.02, 0.01, 1.00)',
      kernel_label: 'soft: Plain; sharp: Crisp',
      series_instance_uid: '2.25.77001.2.1 / 2.25.77001.2.2',
      slice_index_from_0: '2 / 3',
      sop_instance_uid: `${SOFT_IMAGE} / 2.25.77001.2.2.4`,
      frame_number: '',
      flags: 'Standard errors by refits: 32 refits.',
    });
  });

  it('have beside it what a plain region reads on each kernel, with its image', () => {
    expect(printed('S1', 'soft')).toEqual([
      'plain region: 536 HU',
      'plain region radius: 1.09 mm',
      'noise around the stent: 21.4 HU',
    ]);
    expect(printed('S1', 'sharp')).toEqual([
      'plain region: 419 HU',
      'plain region radius: 1.09 mm',
      'noise around the stent: 63.8 HU',
    ]);
    expect(long.find(({ id, kernel }) => id === 'S1' && kernel === 'soft')).toMatchObject({
      sop_instance_uid: SOFT_IMAGE,
      slice_index_from_0: '2',
    });
  });

  it('have a line with the reason where there is no value', () => {
    const lines = long.filter(({ id }) => id === 'S2');
    expect(lines).toHaveLength(1);
    expect(lines[0]).toMatchObject({
      kernel: 'both',
      printed: 'no value',
      flags: 'No fitted stent: What is left over is not round: no value.',
    });
  });

  it('name no image on a cut, and say that it is one', () => {
    const [line] = long.filter(({ id }) => id === 'S3');
    expect(line?.place).toContain('; on Cut 1 (oblique, resampled by cubic convolution');
    expect([line?.sop_instance_uid, line?.slice_index_from_0]).toEqual(['', '']);
  });

  it('bring their caution with them, and only they do', () => {
    const cautions = (text: string) =>
      csvParse(text)
        .filter(({ quantity }) => quantity === 'Caution')
        .map((line) => line.printed);
    expect(cautions(toCsv(note))).toContain(STENT_CAUTION);
    expect(cautions(toCsv(richNote()))).not.toContain(STENT_CAUTION);
  });
});

describe('Oblique cuts', () => {
  const FACT =
    'Oblique plane at right angles to the course from (-7.50, -15.25, 0.50) to (-5.50, -15.25, 2.50) mm, through its middle. Resampled by cubic convolution, mean over 1.5 mm. Slab of 1.50 mm. 45.0° to the slices of the soft stack. Soft kernel: from slice 1 of 4 (SOP Instance UID 2.25.77001.2.1.1) to slice 4 of 4 (SOP Instance UID 2.25.77001.2.1.4). Sharp kernel: from slice 1 of 4 (SOP Instance UID 2.25.77001.2.2.1) to slice 4 of 4 (SOP Instance UID 2.25.77001.2.2.4).';

  it('are facts of the note: course, interpolation, slab, angle, first and last image of each kernel', () => {
    expect(measurementTable(note).facts.filter(({ group }) => group === 'Oblique cuts')).toEqual([
      { group: 'Oblique cuts', name: 'Cut 1 (O1)', text: FACT },
    ]);
    expect(toTsv(note)).toContain(`Cut 1 (O1): ${FACT}`);
  });

  it('are named in the place of a region and of the contrast that compares it', () => {
    const places = new Map(measurementTable(note).rows.map(({ id, place }) => [id, place]));
    const cut = 'on Cut 1 (oblique, resampled by cubic convolution, mean over 1.5 mm)';
    expect(places.get('R1')).toBe(cut);
    expect(places.get('L1')).toBe('in stent');
    // Lumen and wall lie on the slices, the reference that the noise is of on the cut.
    expect(places.get('C1')).toBe(
      `in stent; Lumen 1 on the slices, Wall 1 on the slices, Reference 1 ${cut}`,
    );
  });

  it('that a note has lost are told as such', () => {
    const row = measurementTable({ ...note, planes: [] }).rows.find(({ id }) => id === 'R1');
    expect(row?.place).toBe('on an oblique cut that the note does not have (resampled)');
  });
});

describe('The wide table', () => {
  it('has the fit under both and plain readings under each kernel, empty for other rows', () => {
    const rows = csvParse(toWideCsv(note));
    const stent = rows.find(({ id }) => id === 'S1');
    expect(stent).toMatchObject({
      both_strut_diameter_mm: '3.1142',
      both_strut_diameter_standard_error_mm: '0.0278',
      both_fitted_lumen: '345.26',
      both_strut_line_mass_hu_mm: '412.6',
      both_tilt_deg: '1.284',
      soft_plain_region: '536.4',
      sharp_plain_region: '418.9',
      soft_mean: '',
      finding: 'stent, nominal 3 mm',
    });
    expect(rows.find(({ id }) => id === 'X1')).toMatchObject({
      soft_visible_width_mm: '2.0625',
      sharp_visible_width_mm: '2.4621',
      soft_artificial_narrowing_percent: '31.25',
      both_strut_diameter_mm: '',
      finding: 'nominal 3 mm',
      quote: 'sharp',
    });
    expect(rows.find(({ id }) => id === 'L1')?.both_fitted_lumen).toBe('');
    expect(rows.find(({ id }) => id === 'S2')).toMatchObject({
      both_strut_diameter_mm: '',
      flags: 'No fitted stent: What is left over is not round: no value.',
    });
  });

  it('has no columns for what the note does not have', () => {
    const { columns } = csvParse(toWideCsv(richNote()));
    expect(columns.filter((key) => /both|visible|plain|edge/.test(key))).toEqual([]);
  });

  it('is printed for the clipboard, with caution and definition under it', () => {
    const rows = tsvParseRows(toTsv(note));
    const at = (title: string) => rows[0]?.indexOf(title) ?? -1;
    const of = (id: string, title: string) => rows.find(([one]) => one === id)?.[at(title)];
    expect(of('S1', 'Both strut diameter, mm')).toBe('3.11');
    expect(of('S1', 'Both fitted lumen, HU')).toBe('345');
    expect(of('X1', 'Sharp visible width, mm')).toBe('2.46');
    expect(of('X1', 'Soft artificial narrowing, %')).toBe('31');
    const said = rows.map(([first]) => first);
    expect(said).toContain(STENT_CAUTION);
    expect(said).toContain(`Profile: ${PROFILE_DEFINITION}`);
    const html = toClipboardHtml(note);
    expect(html).toContain('<th>Both strut diameter, mm</th>');
    expect(html).toContain('<td>3.11</td>');
    expect(html).toContain(STENT_CAUTION);
  });
});

describe('The page', () => {
  const html = toHtml(note);

  it('has a section of profiles with place, nominal diameter, quote and definition', () => {
    const [, section = ''] = html.split('<h2>Profiles</h2>');
    const [profiles = ''] = section.split('<h2>');
    expect(profiles).toContain(
      'X1 · nominal 3 mm · from (-8.50, -15.25, 2.00) to (-4.50, -15.25, 2.00) mm, band 1.0 mm',
    );
    expect(profiles).toContain('<td>sharp, Crisp</td><td class="number">2.46</td>');
    expect(profiles).toContain('<td class="number">3 of 4</td>');
    expect(profiles).toContain('Quoted: sharp kernel, as proposed.');
    expect(profiles).toContain('Quoted: soft kernel, chosen by the reader: looks truer here.');
    expect(profiles).toContain('narrowing = 1 - visible width / nominal inner diameter');
  });

  it('has a section of fitted stents with the fit once, plain readings beside it, and the caution', () => {
    const [, section = ''] = html.split('<h2>Fitted stents</h2>');
    const [stents = ''] = section.split('<h2>');
    expect(stents).toContain(`<p>${STENT_CAUTION}</p>`);
    expect(stents).toContain(
      '>both kernels at once (soft: Plain; sharp: Crisp), slice soft 3 of 4, sharp 4 of 4<',
    );
    expect(stents.split('<td>strut diameter</td>')).toHaveLength(3);
    expect(stents).toContain('<td>strut diameter</td><td class="number">3.11</td><td>mm</td>');
    expect(stents).toContain('<td>plain region</td><td class="number">536</td><td>HU</td>');
    expect(stents).toContain(`Image, soft: SOP Instance UID ${SOFT_IMAGE}`);
    expect(stents).toContain('No fitted stent: What is left over is not round: no value.');
  });

  it('has neither section without any', () => {
    const bare = toHtml(richNote());
    expect(bare).not.toContain('<h2>Profiles</h2>');
    expect(bare).not.toContain('<h2>Fitted stents</h2>');
    expect(bare).not.toContain(STENT_CAUTION);
  });

  it('takes text of the note as text', () => {
    const [stent, ...others] = note.stents;
    const [profile, ...lines] = note.profiles;
    if (stent === undefined || profile === undefined) throw new Error('no stent or profile');
    const hostile = toHtml({
      ...note,
      stents: [{ ...stent, label: '<img onerror=x>' }, ...others],
      profiles: [{ ...profile, definition: '</p><script>x</script>' }, ...lines],
    });
    expect(hostile).not.toContain('<img onerror');
    expect(hostile).not.toContain('<script>');
  });
});

describe('stentSentence', () => {
  it('tells both values with their standard errors, and what a plain region reads', () => {
    expect(stentSentence({ fit: STENT_FIT })).toBe(
      'Fitted: strut diameter 3.11 ± 0.03 mm, lumen 345 ± 12 HU (standard errors); the plain region on the soft kernel reads 536 HU, on the sharp one 419 HU.',
    );
    const plain = { radiusMm: 1, softHu: 536.4, sharpHu: null };
    expect(stentSentence({ fit: { ...STENT_FIT, plain } })).toBe(
      'Fitted: strut diameter 3.11 ± 0.03 mm, lumen 345 ± 12 HU (standard errors); the plain region on the soft kernel reads 536 HU.',
    );
    expect(
      stentSentence({ fit: { ...STENT_FIT, plain: { ...plain, softHu: null, sharpHu: 400 } } }),
    ).toContain('; the plain region on the sharp kernel reads 400 HU.');
    expect(stentSentence({ fit: { ...STENT_FIT, plain: null } })).toBe(
      'Fitted: strut diameter 3.11 ± 0.03 mm, lumen 345 ± 12 HU (standard errors).',
    );
  });

  it('says why there is none', () => {
    expect(stentSentence(STENT_WITHOUT)).toBe(
      'No fitted stent: What is left over is not round: no value.',
    );
    expect(stentSentence({ fit: null })).toBe('No fitted stent: it has not been fitted yet.');
  });
});

import { readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, type Page, test } from '@playwright/test';
import { csvParse } from 'd3';
import type { Note } from '../../core/note/index.js';
import {
  acceptCautions,
  dragOn,
  regionRow,
  sharpPlate,
  softPlate,
  waitForPair,
  waitForSaved,
  watchPage,
} from './support/bench.js';
import { diptych, exportFromWindow, FORMS, textOf } from './support/exports.js';
import { type RunningShell, startShell, temporaryHome } from './support/shell.js';

/** The default start: no folder, so the demonstration study is made and opened. The tests go on from each other. */
test.describe.configure({ mode: 'serial' });

const home = temporaryHome();
let shell: RunningShell;
let page: Page;
let complaints: readonly string[];

test.beforeAll(async ({ browser }) => {
  test.setTimeout(300_000);
  shell = await startShell(home.path);
  const context = await browser.newContext({ viewport: { width: 1440, height: 900 } });
  page = await context.newPage();
  complaints = watchPage(page).complaints;
  await page.goto(shell.address);
});

test.afterAll(async () => {
  await page.close();
  await shell.stop();
  home.remove();
});

test.afterEach(() => expect(complaints).toEqual([]));

const sliceOf = async (plate: 'soft' | 'sharp'): Promise<number> => {
  const label = await page.locator(`[data-plate=${plate}]`).getAttribute('aria-label');
  return Number(/slice (\d+) of/.exec(label ?? '')?.[1]);
};

test('the first start shows the cautions, then the demonstration study as a pair', async () => {
  test.setTimeout(300_000);
  await acceptCautions(page);
  await expect(softPlate(page)).toHaveAttribute('aria-label', /slice \d+ of 44/, {
    timeout: 240_000,
  });
  await waitForPair(page);
  await expect(page.locator('[data-panel=hinge]')).toContainText('One acquisition');
  await expect(page.getByText('SYNTHETIC', { exact: true })).toHaveCount(3);
  expect(await page.evaluate(() => self.crossOriginIsolated)).toBe(true);
  // Soft and sharp come in the order of their series numbers; measured the same, the request to check goes away.
  await expect(page.locator('[data-panel=hinge]')).toContainText(/noise \d.*texture/, {
    timeout: 60_000,
  });
  await expect(page.getByText('chosen by the order')).toHaveCount(0);
});

test('the plates scroll as one, by wheel and by keyboard, and can be unlinked', async () => {
  await softPlate(page).hover();
  await page.mouse.wheel(0, 120);
  await expect.poll(() => sliceOf('soft')).not.toBe(23);
  const moved = await sliceOf('soft');
  expect(await sliceOf('sharp')).toBe(moved);
  await softPlate(page).focus();
  await page.keyboard.press('Home');
  await expect.poll(() => sliceOf('sharp')).toBe(1);
  await page.keyboard.press('PageUp');
  await expect.poll(() => sliceOf('sharp')).toBe(2);
  await page
    .getByRole('button', { name: 'Link scrolling' })
    .or(page.getByRole('button', { name: 'scroll' }))
    .first()
    .click();
  await softPlate(page).focus();
  await page.keyboard.press('PageUp');
  await expect.poll(() => sliceOf('soft')).toBe(3);
  expect(await sliceOf('sharp')).toBe(2);
  await page
    .getByRole('button', { name: 'Link scrolling' })
    .or(page.getByRole('button', { name: 'scroll' }))
    .first()
    .click();
  await softPlate(page).focus();
  for (let step = 0; step < 20; step++) await page.keyboard.press('PageUp');
  await expect.poll(() => sliceOf('sharp')).toBe(23);
});

test('a lumen drawn by mouse is measured on both kernels', async () => {
  await softPlate(page).focus();
  await page.keyboard.press('e');
  // The ascending aorta of the demonstration study, of which 370 HU is the truth.
  await dragOn(page, softPlate(page), [0.36, 0.46], [0.43, 0.545]);
  await expect(regionRow(page, 'L1')).toBeVisible();
  await expect(page.locator('[data-panel=hinge]')).toContainText('Lumen 1');
  const row = await regionRow(page, 'L1').innerText();
  const means = [...row.matchAll(/(\d{3}\.\d) ± /g)].map((match) => Number(match[1]));
  expect(means).toHaveLength(2);
  for (const mean of means) expect(Math.abs(mean - 370)).toBeLessThan(3);
  await waitForSaved(page);
});

test('a wall placed, moved and resized by keyboard alone joins it', async () => {
  await page.getByRole('button', { name: 'wall', exact: false }).first().focus();
  await page.keyboard.press('Enter');
  await softPlate(page).focus();
  await page.keyboard.press('Escape');
  for (let step = 0; step < 8; step++) await page.keyboard.press('Shift+ArrowRight');
  await page.keyboard.press('e');
  // Enter puts an ellipse at the crosshair, keys change it, Enter accepts it.
  await page.keyboard.press('Enter');
  await page.keyboard.press('-');
  await page.keyboard.press('Enter');
  await expect(regionRow(page, 'W1')).toBeVisible();
  const before = await regionRow(page, 'W1').innerText();
  await page.keyboard.press('+');
  await page.keyboard.press('ArrowDown');
  await expect(regionRow(page, 'W1')).not.toHaveText(before);
  await page.keyboard.press('Control+z');
  await page.keyboard.press('Control+z');
  await expect.poll(async () => regionRow(page, 'W1').innerText()).toBe(before);
  await page.keyboard.press('Control+Shift+z');
  await expect.poll(async () => regionRow(page, 'W1').innerText()).not.toBe(before);
});

test('a contrast gives CNR with its formula', async () => {
  await softPlate(page).focus();
  await page.keyboard.press('k');
  const dialog = page.getByRole('dialog', { name: 'New contrast' });
  await expect(dialog).toBeVisible();
  await dialog.getByLabel('Lumen').selectOption('L1');
  await dialog.getByLabel('Wall or tissue').selectOption('W1');
  await dialog.getByLabel('Noise').selectOption('wall');
  await expect(dialog).toContainText('CNR = (lumen − wall) / SD of wall');
  await dialog.locator('button.primary').click();
  await expect(dialog).toBeHidden();
  const row = page.locator('[data-panel=ledger] tr.contrast');
  await expect(row.getByLabel('Noise of contrast C1')).toHaveValue('wall');
  // Another noise is chosen in place: both values are computed anew, and the reader is told which they were.
  await row.getByLabel('Noise of contrast C1').selectOption('pooled');
  await expect(page.getByText(/C1: soft .* → .*, sharp .* → /)).toBeVisible();
  await row.getByLabel('Noise of contrast C1').selectOption('wall');
});

test('a kernel to quote is proposed; the reader changes it with a reason, and takes that back', async () => {
  await regionRow(page, 'L1').click();
  const ledger = page.locator('[data-panel=ledger]');
  const cell = regionRow(page, 'L1').getByRole('cell').last();
  await expect(cell).toHaveText('soft');
  await expect(cell).toHaveAttribute('title', /^Quoted: soft kernel, as proposed\. Density: /);
  await ledger.getByRole('combobox', { name: /^Quote/ }).selectOption('sharp');
  await expect(cell).toContainText('The rules propose soft');
  await ledger.getByLabel('Why this kernel is quoted, Lumen 1').fill('crisper here');
  await page.keyboard.press('Enter');
  await expect(cell).toHaveAttribute('title', /chosen by the reader: crisper here\./);
  await ledger.getByRole('combobox', { name: /^Quote/ }).selectOption('proposal');
  await expect(cell).toHaveText('soft');
});

test('finding, segment and place are chosen in the ledger', async () => {
  await regionRow(page, 'L1').click();
  const ledger = page.locator('[data-panel=ledger]');
  await ledger.getByLabel('Finding').selectOption('native lumen');
  await ledger.getByLabel('Segment').selectOption('7');
  await ledger.getByLabel('Place').fill('=proximal');
  await ledger.getByLabel('Place').press('Enter');
  await expect(ledger).toContainText('7 mLAD · Mid left anterior descending artery · native lumen');
  await waitForSaved(page);
});

interface Quantities {
  readonly soft: readonly string[];
  readonly sharp: readonly string[];
}

/** n, mean and SD of a region as printed in the hinge. */
async function hingeNumbers(): Promise<Quantities> {
  const rows = page.locator('[data-panel=hinge] .readout tbody tr');
  const cell = async (name: RegExp, side: 'soft' | 'sharp') =>
    (await rows.filter({ hasText: name }).first().locator(`td.${side}`).innerText()).trim();
  const all = async (side: 'soft' | 'sharp') => [
    await cell(/mean/, side),
    await cell(/^[\d.\s]+SD/, side),
  ];
  return { soft: await all('soft'), sharp: await all('sharp') };
}

function notePath(): string {
  const notes = join(home.path, 'data', 'notes');
  const [folder] = readdirSync(notes);
  return join(notes, folder ?? '', 'note.json');
}

/** The folder of the demonstration study. */
function studyFolder(): string {
  const truth = readdirSync(home.path, { recursive: true, encoding: 'utf8' }).find((name) =>
    name.endsWith('truth.json'),
  );
  return join(home.path, truth ?? '', '..');
}

function savedNote(): Note {
  const notes = join(home.path, 'data', 'notes');
  const [folder] = readdirSync(notes);
  return JSON.parse(readFileSync(join(notes, folder ?? '', 'note.json'), 'utf8')) as Note;
}

test('hinge, ledger, saved note and CSV say the same', async () => {
  await regionRow(page, 'L1').click();
  const hinge = await hingeNumbers();
  const ledger = await regionRow(page, 'L1').innerText();
  expect(ledger).toContain(`${hinge.soft[0]} ± ${hinge.soft[1]}`);
  expect(ledger).toContain(`${hinge.sharp[0]} ± ${hinge.sharp[1]}`);

  await expect.poll(() => savedNote().regions[0]?.place).toBe('=proximal');
  const note = savedNote();
  expect(note.synthetic).toBe(true);
  const lumen = note.regions[0];
  expect(lumen?.soft?.meanHu?.toFixed(1)).toBe(hinge.soft[0]);
  expect(lumen?.sharp?.sdHu?.toFixed(1)).toBe(hinge.sharp[1]);

  const download = page.waitForEvent('download');
  await page.keyboard.press('Control+e');
  const path = await (await download).path();
  const lines = csvParse(readFileSync(path, 'utf8'));
  const line = lines.find(
    ({ id, kernel, quantity }) => id === 'L1' && kernel === 'soft' && quantity === 'mean',
  );
  expect(Number(line?.value)).toBe(lumen?.soft?.meanHu);
  expect(line?.printed).toBe(hinge.soft[0]);
  expect(line?.place).toBe("'=proximal");
  const contrast = lines.find(({ item }) => item === 'contrast');
  expect(contrast?.formula).toBe('CNR = (lumen − wall) / SD of wall');
});

test('the standard error of each mean stands in the hinge, the note and the CSV once the noise is measured', async () => {
  await expect
    .poll(() => savedNote().regions[0]?.sharp?.standardErrorHu ?? null, { timeout: 30_000 })
    .not.toBeNull();
  await regionRow(page, 'L1').click();
  const note = savedNote();
  const { soft, sharp } = note.regions[0] ?? {};
  expect(note.pair.texture.soft?.areas).toBeGreaterThan(10);
  expect(note.pair.texture.sharp?.noiseSdHu).toBeGreaterThan(
    note.pair.texture.soft?.noiseSdHu ?? 0,
  );
  const row = page.locator('[data-panel=hinge] .readout tbody tr', { hasText: 'standard error' });
  await expect(row.locator('td.soft')).toHaveText(`± ${soft?.standardErrorHu?.toFixed(1)}`);
  await expect(row.locator('td.sharp')).toHaveText(`± ${sharp?.standardErrorHu?.toFixed(1)}`);
  await expect(row.locator('td.soft')).toHaveAttribute('title', /how far noise alone moves it/);
  const placement = page.locator('[data-panel=hinge] .readout tbody tr', { hasText: 'placement' });
  await expect(placement.locator('td.sharp')).toHaveText(`± ${sharp?.placementHu?.toFixed(1)}`);
  const mean = regionRow(page, 'L1').locator('td.soft').first();
  await expect(mean).toHaveAttribute(
    'title',
    /Standard error of the mean, by noise alone: [\d.]+ HU/,
  );
  const download = page.waitForEvent('download');
  await page.keyboard.press('Control+e');
  const lines = csvParse(readFileSync(await (await download).path(), 'utf8'));
  const line = lines.find(
    ({ id, kernel, quantity }) =>
      id === 'L1' && kernel === 'sharp' && quantity === 'standard error',
  );
  expect(Number(line?.value)).toBe(sharp?.standardErrorHu);
});

test('a reload finds note, regions and numbers again', async () => {
  const before = await regionRow(page, 'W1').innerText();
  await page.goto('about:blank');
  await page.goto(shell.address);
  await waitForPair(page);
  await expect(regionRow(page, 'L1')).toBeVisible();
  await expect.poll(async () => regionRow(page, 'W1').innerText()).toBe(before);
});

test('deleting a region takes its contrast, and undo brings both back', async () => {
  await regionRow(page, 'W1').click();
  await softPlate(page).focus();
  await page.keyboard.press('Delete');
  await expect(regionRow(page, 'W1')).toHaveCount(0);
  await expect(page.locator('[data-panel=ledger]')).not.toContainText('noise of Wall 1');
  await page.keyboard.press('Control+z');
  await expect(regionRow(page, 'W1')).toBeVisible();
  const row = page.locator('[data-panel=ledger] tr.contrast');
  await expect(row.getByLabel('Noise of contrast C1')).toHaveValue('wall');
  // Another noise is chosen in place: both values are computed anew, and the reader is told which they were.
  await row.getByLabel('Noise of contrast C1').selectOption('pooled');
  await expect(page.getByText(/C1: soft .* → .*, sharp .* → /)).toBeVisible();
  await row.getByLabel('Noise of contrast C1').selectOption('wall');
});

/** Which finding the places of the truth file belong to. */
const FINDING_OF: Readonly<Record<string, string>> = {
  L1: 'D1',
  W1: 'D1',
  P1: 'D2',
  P2: 'D3',
  R1: 'D4',
};

const FINDINGS = [
  {
    id: 'D1',
    segment: 7,
    kind: 'stent',
    nominalMm: 3,
    lengthMm: 8,
    overlap: false,
    assessability: 'limited',
    reason: 'struts bloom on the soft kernel',
  },
  {
    id: 'D2',
    segment: 6,
    kind: 'non-calcified plaque',
    nominalMm: null,
    assessability: 'assessable',
    reason: '',
  },
  {
    id: 'D3',
    segment: 6,
    kind: 'calcified plaque',
    nominalMm: null,
    assessability: 'limited',
    reason: 'blooming',
  },
  { id: 'D4', segment: null, kind: 'reference', nominalMm: null, assessability: null, reason: '' },
] as const;

/**
 * The places that the study's own truth file names, as marks of the saved note: those of one slice, or all that a full
 * reading needs. The page measures them on opening.
 */
function markTruth(wanted: readonly string[] = ['R1', 'L1', 'F1']): void {
  const notes = join(home.path, 'data', 'notes');
  const [folder = ''] = readdirSync(notes);
  const path = join(notes, folder, 'note.json');
  const note = JSON.parse(readFileSync(path, 'utf8')) as Note;
  const truthFile = readdirSync(home.path, { recursive: true, encoding: 'utf8' }).find((name) =>
    name.endsWith('truth.json'),
  );
  const truth = JSON.parse(readFileSync(join(home.path, truthFile ?? ''), 'utf8'));
  const shapes = truth.regions.filter(({ id }: { id: string }) => wanted.includes(id));
  const none = {
    soft: null,
    sharp: null,
    quote: null,
    quoteReason: '',
    quoteBy: 'proposal' as const,
  };
  const regions = shapes.map(({ id, role, label, shape }: Note['regions'][number]) => ({
    id,
    role,
    shape,
    label: `${role[0]?.toUpperCase()}${role.slice(1)} ${id.slice(1)}`,
    place: label,
    findingId: FINDING_OF[id] ?? null,
    ...none,
  }));
  const findings = FINDINGS.filter(({ id }) =>
    regions.some(({ findingId }: { findingId: string | null }) => findingId === id),
  );
  const contrasts = [
    {
      id: 'C1',
      lumen: 'L1',
      wall: wanted.includes('W1') ? 'W1' : 'F1',
      noise: 'reference',
      reference: 'R1',
    },
  ].map((plan) => ({ ...plan, formula: '', soft: null, sharp: null, flags: [] }));
  writeFileSync(path, JSON.stringify({ ...note, regions, findings, contrasts }));
}

/** Leaves the page, and waits until the host has stored what it sent last. */
async function leavePage(): Promise<void> {
  await waitForSaved(page);
  await page.goto('about:blank');
  let before = '';
  await expect
    .poll(
      () => {
        const [last, now] = [before, readFileSync(notePath(), 'utf8')];
        before = now;
        return last === now;
      },
      { intervals: [500] },
    )
    .toBe(true);
}

/** Fits the stent of the demonstration study by a click in its lumen; the soft plate shows the whole slice. */
async function fitStent(): Promise<void> {
  const box = await softPlate(page).boundingBox();
  if (box === null) throw new Error('the plate is not on the screen');
  // The study's field is 200 mm wide around (24, −14); the stent stands at (56, −50).
  const pxPerMm = Math.min(box.width, box.height) / 200;
  await softPlate(page).focus();
  await page.keyboard.press('Escape');
  await page.keyboard.press('Escape');
  await page.keyboard.press('s');
  await page.mouse.click(
    box.x + box.width / 2 + (56 - 24) * pxPerMm,
    box.y + box.height / 2 + (-50 + 14) * pxPerMm,
  );
  await expect(page.locator('tr[data-stent="S1"]')).toContainText('Fitted: strut diameter 3.1', {
    timeout: 60_000,
  });
}

test('the window shows a stent on both kernels, at two sizes', async () => {
  await expect.poll(() => savedNote().regions.length).toBe(2);
  await leavePage();
  markTruth();
  await page.goto(shell.address);
  await waitForPair(page);
  await regionRow(page, 'L1').click();
  await softPlate(page).focus();
  await page.keyboard.press('g');
  await softPlate(page).hover({ position: { x: 382, y: 162 } });
  await page.keyboard.down('Control');
  await page.mouse.wheel(0, -600);
  await page.keyboard.up('Control');
  // The plain region in the stent reads far too high on the soft kernel, and nearer to 350 HU on the sharp one.
  const row = await regionRow(page, 'L1').innerText();
  const [soft = 0, sharp = 0] = [...row.matchAll(/(\d{3}\.\d) ± /g)].map(([, mean]) =>
    Number(mean),
  );
  expect(soft).toBeGreaterThan(sharp + 80);
  // The fit takes the struts away.
  await page.keyboard.press('f');
  await fitStent();
  const fitted = Number(
    /lumen (\d+) ±/.exec(await page.locator('tr[data-stent="S1"]').innerText())?.[1],
  );
  expect(Math.abs(fitted - 350)).toBeLessThan(60);
  await softPlate(page).hover({ position: { x: 382, y: 162 } });
  await page.keyboard.down('Control');
  await page.mouse.wheel(0, -600);
  await page.keyboard.up('Control');
  await page.setViewportSize({ width: 1280, height: 720 });
  await page.screenshot({ path: 'test-results/window-1280.png' });
  await page.setViewportSize({ width: 1440, height: 900 });
  await page.screenshot({ path: process.env.DIPTYCH_SCREENSHOT ?? 'test-results/window-1440.png' });
  await expect(sharpPlate(page)).toBeVisible();
});

test('a full reading is verified and exported in all forms, and the command line gives the same numbers', async () => {
  test.setTimeout(240_000);
  await leavePage();
  markTruth(['R1', 'L1', 'W1', 'P1', 'P2']);
  await page.goto(shell.address);
  await waitForPair(page);
  await expect
    .poll(() => savedNote().regions.every(({ sharp }) => sharp?.standardErrorHu != null), {
      timeout: 60_000,
    })
    .toBe(true);
  await expect.poll(() => savedNote().densities.length).toBe(2);
  await regionRow(page, 'L1').click();
  await fitStent();
  await expect.poll(() => savedNote().stents[0]?.fit?.strutDiameterMm?.se ?? 0).toBeGreaterThan(0);
  await page.keyboard.press('Control+i');
  const dialog = page.getByRole('dialog', { name: 'Reading note' });
  await dialog.getByLabel('Completion').selectOption('complete');
  await dialog.getByLabel('Your name').fill('R. Example');
  await dialog.getByRole('button', { name: 'Verify and freeze the note' }).click();
  await expect(dialog).toContainText('By R. Example');
  await expect.poll(() => savedNote().verification).toBe('VERIFIED');
  await dialog.getByRole('button', { name: 'Close', exact: true }).click();

  const study = studyFolder();
  const note = join(home.path, 'note.json');
  writeFileSync(note, readFileSync(notePath()));
  const recheck = JSON.parse(diptych(['recheck', note, '--in', study, '--json'], home.path));
  expect(recheck).toMatchObject({ holds: true, seal: 'intact', values: [], frames: [] });

  await page.keyboard.press('Control+Shift+X');
  for (const { words, form, flags } of FORMS) {
    const ours = join(home.path, `window.${form}`);
    const theirs = join(home.path, `line.${form}`);
    writeFileSync(ours, await exportFromWindow(page, words));
    const images = ['html', 'pdf', 'sr'].includes(form) ? ['--in', study] : [];
    diptych(['export', note, '--as', form, '--to', theirs, ...flags, ...images], home.path);
    if (form === 'json') expect(JSON.parse(textOf(form, ours) ?? '')).toEqual(savedNote());
    else expect(textOf(form, theirs)?.split('\n'), words).toEqual(textOf(form, ours)?.split('\n'));
  }
  // Without identity neither name nor identifier of the patient is left.
  await page
    .getByRole('dialog', { name: 'Export' })
    .getByRole('radio', { name: /^Without identity/ })
    .check();
  const clean = (await exportFromWindow(page, 'CSV, long')).toString('utf8');
  expect(clean).not.toContain(savedNote().study.patientId ?? 'none');
  expect(clean).toContain(savedNote().regions[0]?.soft?.meanHu?.toFixed(1) ?? 'none');
});

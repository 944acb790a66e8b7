import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, type Locator, type Page, test } from '@playwright/test';
import axe from 'axe-core';
import type { Note } from '../../core/note/index.js';
import { STUDY_FIELD_MM, writeStentStudy } from '../corpus/stentStudy.js';
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
import { diptych } from './support/exports.js';
import { type RunningShell, startShell, temporaryHome } from './support/shell.js';

/** Stents whose truth is known: 3.1 mm between the middles of the struts, 340 HU. The tests go on from each other. */
test.describe.configure({ mode: 'serial' });

const home = temporaryHome();
const folder = join(home.path, 'study');
let shell: RunningShell;
let page: Page;
let complaints: readonly string[];

test.beforeAll(async ({ browser }) => {
  test.setTimeout(120_000);
  writeStentStudy(folder);
  shell = await startShell(home.path, folder);
  page = await (await browser.newContext({ viewport: { width: 1440, height: 900 } })).newPage();
  complaints = watchPage(page).complaints;
  await page.goto(shell.address);
  await acceptCautions(page);
  await waitForPair(page);
  // The fit rests on the noise of both kernels.
  await expect(page.locator('[data-panel=hinge]')).toContainText(/noise \d.*texture/, {
    timeout: 60_000,
  });
});

test.afterAll(async () => {
  await page.close();
  await shell.stop();
  home.remove();
});

test.afterEach(() => expect(complaints).toEqual([]));

const hinge = (): Locator => page.locator('[data-panel=hinge]');
const ledger = (): Locator => page.locator('[data-panel=ledger]');
const plot = (): Locator => page.locator('[data-panel=plot]');
const stentMark = (plate: Locator, id: string): Locator => plate.locator(`[data-stent="${id}"]`);

const savedNote = (): Note => {
  const notes = join(home.path, 'data', 'notes');
  const [name = ''] = readdirSync(notes);
  return JSON.parse(readFileSync(join(notes, name, 'note.json'), 'utf8')) as Note;
};

/** Where a place of the patient lies on the soft plate, which shows the whole slice. */
async function placeOf([x, y]: readonly [number, number]): Promise<readonly [number, number]> {
  const box = await softPlate(page).boundingBox();
  if (box === null) throw new Error('the plate is not on the screen');
  const pxPerMm = Math.min(box.width, box.height) / STUDY_FIELD_MM;
  return [box.x + box.width / 2 + x * pxPerMm, box.y + box.height / 2 + y * pxPerMm];
}

/** Numbers of a sentence such as “strut diameter 3.11 ± 0.03 mm, lumen 345 ± 12 HU”. */
function fittedNumbers(text: string): readonly number[] {
  const found = /strut diameter ([\d.]+) ± ([\d.]+) mm, lumen ([\d.]+) ± ([\d.]+) HU/.exec(text);
  return found === null ? [] : found.slice(1).map(Number);
}

test('one click beside the middle of the lumen fits the stent on both kernels', async () => {
  await softPlate(page).focus();
  await page.keyboard.press('s');
  await page.mouse.click(...(await placeOf([0.5, -5.4])));
  const row = ledger().locator('tr[data-stent="S1"]');
  await expect(row).toContainText('Fitted: strut diameter', { timeout: 20_000 });
  const [diameterMm = 0, diameterError = 0, lumenHu = 0, lumenError = 0] = fittedNumbers(
    await row.innerText(),
  );
  expect(Math.abs(diameterMm - 3.1)).toBeLessThan(0.15);
  expect(Math.abs(lumenHu - 340)).toBeLessThan(60);
  expect(diameterError).toBeGreaterThan(0);
  expect(lumenError).toBeGreaterThan(0);
  // Struts bloom into a plain region: that is why there is a fit.
  const plain = Number(
    /plain region on the soft kernel reads (\d+) HU/.exec(await row.innerText())?.[1],
  );
  expect(plain - 340).toBeGreaterThan(60);
  await expect(hinge()).toContainText('Stent 1 · fitted on both kernels');
  await expect(plot().locator('svg[role=img]')).toHaveAttribute('aria-label', /Stent 1\. Fitted:/);
  await expect(plot()).toContainText('synthetic phantoms only');
  for (const plate of [softPlate(page), sharpPlate(page)])
    await expect(stentMark(plate, 'S1')).toHaveAttribute('data-fitted', 'true');
  await waitForSaved(page);
});

test('the nominal diameter is typed, and what the fit leaves over is shown on both plates', async () => {
  const nominal = plot().getByLabel('Nominal inner diameter in mm');
  await nominal.fill('3,0');
  await nominal.press('Enter');
  await expect(ledger().locator('tr[data-stent="S1"]')).toContainText('nominal 3.00 mm');
  await expect(ledger().locator('tr[data-stent="S1"]')).toContainText('Fitted:', {
    timeout: 20_000,
  });
  await softPlate(page).focus();
  await page.keyboard.press('d');
  await expect(page.locator('canvas.residuals')).toHaveCount(2);
  await page.keyboard.press('d');
  await expect(page.locator('canvas.residuals')).toHaveCount(0);
});

test('a lumen without struts gets no value, and the reason', async () => {
  await page.keyboard.press('Escape');
  await page.mouse.click(...(await placeOf([-18, 6])));
  const row = ledger().locator('tr[data-stent="S2"]');
  await expect(row).toContainText('No fitted stent: The images show no ring of struts here.', {
    timeout: 20_000,
  });
  await page.keyboard.press('Delete');
  await expect(row).toHaveCount(0);
});

test('a profile is drawn across, moved at its end by key, and quoted on the sharp kernel', async () => {
  await softPlate(page).focus();
  await page.keyboard.press('p');
  const [fromX, fromY] = await placeOf([-5, -5]);
  const [toX, toY] = await placeOf([5, -5]);
  await page.mouse.move(fromX, fromY);
  await page.mouse.down();
  await page.mouse.move((fromX + toX) / 2, fromY);
  await page.mouse.move(toX, toY);
  await page.mouse.up();
  const row = ledger().locator('tr[data-profile="X1"]');
  await expect(row).toContainText('peaks');
  const peaks = Number(/peaks ([\d.]+) mm/.exec(await row.innerText())?.[1]);
  // The peaks of blurred struts lie inwards of the struts.
  expect(peaks).toBeLessThan(3.1);
  expect(peaks).toBeGreaterThan(2.5);
  await expect(row).toContainText('sharp');
  await softPlate(page).focus();
  await page.keyboard.press('Enter');
  const before = savedNote().profiles[0]?.fromMm[0];
  await page.keyboard.press('ArrowLeft');
  await waitForSaved(page);
  await expect.poll(() => savedNote().profiles[0]?.fromMm[0]).toBeLessThan(before ?? 0);
  const nominal = plot().getByLabel('Nominal inner diameter in mm');
  await nominal.fill('3');
  await nominal.press('Enter');
  await expect(hinge()).toContainText('Narrowing');
  await expect.poll(() => savedNote().profiles[0]?.sharp?.narrowing ?? 0).toBeGreaterThan(0.05);
});

test('two points on the course make an oblique cut on both plates, marked as resampled', async () => {
  await softPlate(page).focus();
  await page.keyboard.press('Escape');
  await page.keyboard.press('Escape');
  await page.keyboard.press('q');
  await page.keyboard.press('Home');
  await page.mouse.click(...(await placeOf([0, -5])));
  await page.keyboard.press('End');
  await page.mouse.click(...(await placeOf([0.35, -5])));
  for (const plate of [softPlate(page), sharpPlate(page)])
    await expect(plate).toHaveAttribute('aria-label', /oblique cut, Cut 1 · [456]° to the slices/);
  await expect(hinge()).toContainText('Resampled: cubic convolution');
  await expect(page.locator('.plate-legend .oblique').first()).toContainText('resampled');
});

test('a region on the cut says that it is resampled and has no standard error', async () => {
  await page.keyboard.press('e');
  await dragOn(page, softPlate(page), [0.492, 0.492], [0.508, 0.508]);
  await expect(regionRow(page, 'L1')).toBeVisible();
  await waitForSaved(page);
  await expect
    .poll(() => savedNote().regions[0]?.soft)
    .toMatchObject({ standardErrorHu: null, sopInstanceUid: null });
  expect(savedNote().regions[0]?.plane).toBe('O1');
  expect(savedNote().regions[0]?.soft?.flags.map(({ code }) => code)).toContain('resampled');
  // What lies on a plane holds it where it is.
  await softPlate(page).focus();
  await page.keyboard.press('PageUp');
  await expect(page.locator('footer [role=status]')).toContainText(
    'Something is measured on Cut 1',
  );
});

test('the stent is fitted on the cut too', async () => {
  await page.keyboard.press('Escape');
  await page.keyboard.press('Escape');
  await page.keyboard.press('s');
  const box = await softPlate(page).boundingBox();
  if (box === null) throw new Error('the plate is not on the screen');
  await page.mouse.click(box.x + box.width / 2 + 1, box.y + box.height / 2 + 1);
  const row = ledger().locator('tr[data-stent="S3"]');
  await expect(row).not.toContainText('being fitted', { timeout: 20_000 });
  const [diameterMm = 0, , lumenHu = 0] = fittedNumbers(await row.innerText());
  expect(Math.abs(diameterMm - 3.1)).toBeLessThan(0.15);
  expect(Math.abs(lumenHu - 340)).toBeLessThan(60);
});

test('back on the slices all is as it was; the cut is listed and found again', async () => {
  await page.keyboard.press('r');
  await expect(softPlate(page)).toHaveAttribute('aria-label', /slice \d of 9/);
  await expect(page.locator('[data-plane="O1"]').first()).toBeVisible();
  await regionRow(page, 'L1').getByRole('button').click();
  await expect(softPlate(page)).toHaveAttribute('aria-label', /oblique cut/);
  await hinge().getByRole('button', { name: 'Slices' }).click();
  await expect(softPlate(page)).toHaveAttribute('aria-label', /slice \d of 9/);
});

test('no rule of accessibility is broken, and nothing is cut off in a small window', async () => {
  await page.setViewportSize({ width: 1280, height: 720 });
  await ledger().locator('tr[data-stent="S1"]').getByRole('button').click();
  await expect(plot().locator('svg[role=img]')).toBeVisible();
  const drawn = await plot().locator('.plot-area').boundingBox();
  expect(drawn?.height).toBeGreaterThan(85);
  await page.evaluate(axe.source);
  const { violations } = await page.evaluate(() =>
    (globalThis as unknown as { axe: typeof axe }).axe.run(document, {
      runOnly: ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa'],
    }),
  );
  expect(violations.map(({ id, nodes }) => `${id} ${nodes[0]?.html}`)).toEqual([]);
});

test('the command line measures all of it again from the files', async () => {
  await waitForSaved(page);
  const notes = join(home.path, 'data', 'notes');
  const [name = ''] = readdirSync(notes);
  const path = join(notes, name, 'note.json');
  const found = JSON.parse(diptych(['recheck', path, '--in', folder, '--json'], home.path));
  expect(found).toMatchObject({ holds: true, values: [] });
});

import { join } from 'node:path';
import { expect, type Locator, type Page, test } from '@playwright/test';
import axe from 'axe-core';
import { EDGE_PIXEL_MM, EDGE_SIDE, EDGE_SIGMA_MM, writeEdgePair } from '../corpus/edgePair.js';
import {
  acceptCautions,
  sharpPlate,
  softPlate,
  waitForPair,
  waitForSaved,
  watchPage,
} from './support/bench.js';
import { type RunningShell, startShell, temporaryHome } from './support/shell.js';

/** A step of known blur on both kernels. The tests go on from each other. */
test.describe.configure({ mode: 'serial' });

const home = temporaryHome();
let shell: RunningShell;
let page: Page;
let complaints: readonly string[];

test.beforeAll(async ({ browser }) => {
  test.setTimeout(120_000);
  const folder = join(home.path, 'study');
  writeEdgePair(folder);
  shell = await startShell(home.path, folder);
  page = await (await browser.newContext({ viewport: { width: 1280, height: 720 } })).newPage();
  complaints = watchPage(page).complaints;
  await page.goto(shell.address);
  await acceptCautions(page);
  await waitForPair(page);
});

test.afterAll(async () => {
  await page.close();
  await shell.stop();
  home.remove();
});

test.afterEach(() => expect(complaints).toEqual([]));

const panel = (): Locator => page.locator('[data-panel=plot]');
const picture = (): Locator => panel().locator('svg[role=img]');
const line = (plate: Locator, id: string): Locator => plate.locator(`[data-line="${id}"]`);

/** A number of the panel's table, without its standard error. */
const number = async (row: string, kernel: 'soft' | 'sharp'): Promise<number> => {
  const cells = panel().getByRole('row', { name: row }).getByRole('cell');
  return Number.parseFloat(await cells.nth(kernel === 'soft' ? 0 : 1).innerText());
};

/** 10–90 % distance of a Gaussian blur is 2.563103 σ, its FWHM 2.354820 σ (tables of the normal distribution). */
async function expectKnownBlur(): Promise<void> {
  for (const kernel of ['soft', 'sharp'] as const) {
    const sigma = EDGE_SIGMA_MM[kernel];
    const rise = await number('Edge rise', kernel);
    const blur = await number('Blur FWHM', kernel);
    expect(Math.abs(rise / (2.563103 * sigma) - 1), `rise ${rise}`).toBeLessThan(0.08);
    expect(Math.abs(blur / (2.35482 * sigma) - 1), `blur ${blur}`).toBeLessThan(0.08);
  }
}

test('a line that is drawn over an edge shows its rise and blur on both kernels', async () => {
  await softPlate(page).focus();
  await page.keyboard.press('l');
  const box = await softPlate(page).boundingBox();
  if (box === null) throw new Error('the plate is not on the screen');
  const pxPerMm = Math.min(box.width, box.height) / (EDGE_SIDE * EDGE_PIXEL_MM);
  const [x, y] = [box.x + box.width / 2, box.y + box.height / 2 - 5 * pxPerMm];
  await page.mouse.move(x - 8 * pxPerMm, y);
  await page.mouse.down();
  await page.mouse.move(x, y + 6);
  await page.mouse.move(x + 9 * pxPerMm, y + 3);
  await page.mouse.up();
  await expect(line(softPlate(page), 'E1')).toBeAttached();
  await expect(line(sharpPlate(page), 'E1')).toBeAttached();
  await expect(panel().getByRole('heading', { name: 'Noise and sharpness' })).toBeVisible();
  await expect(panel().getByLabel('Show')).toHaveValue('E1');
  await expect(picture()).toHaveAttribute('aria-label', /Profile across Edge 1\. Soft: from /);
  await expect(picture().locator('.edge-mark')).toHaveCount(4);
  await expectKnownBlur();
});

test('a line is drawn, widened and moved at its end by key, and undone', async () => {
  await softPlate(page).focus();
  for (const key of ['Escape', 'Escape', 'Escape']) await page.keyboard.press(key);
  for (const key of ['Shift+ArrowLeft', 'Shift+ArrowLeft', 'Enter']) await page.keyboard.press(key);
  for (let press = 0; press < 4; press += 1) await page.keyboard.press('Shift+ArrowRight');
  await page.keyboard.press('Enter');
  await expect(line(sharpPlate(page), 'E2')).toBeAttached();
  await expectKnownBlur();
  const pixels = async (): Promise<string> => panel().locator('.noise-table').innerText();
  const narrow = await pixels();
  await page.keyboard.press('+');
  await expect(panel().getByLabel('Band')).toHaveValue('4.5');
  await expect.poll(pixels).not.toBe(narrow);
  for (const key of ['Enter', 'Enter', 'ArrowRight']) await page.keyboard.press(key);
  await expectKnownBlur();
  await page.keyboard.press('Delete');
  await expect(line(softPlate(page), 'E2')).toHaveCount(0);
  await page.keyboard.press('Control+z');
  await expect(line(softPlate(page), 'E2')).toBeAttached();
  await waitForSaved(page);
});

test('an end is dragged; where the line no longer crosses the edge the reason is told', async () => {
  await panel().getByLabel('Show').selectOption('E1');
  const ends = line(softPlate(page), 'E1').locator('.line-handle');
  const [start, end] = [await ends.nth(0).boundingBox(), await ends.nth(1).boundingBox()];
  if (start === null || end === null) throw new Error('the ends are not on the screen');
  await page.mouse.move(end.x + 3, end.y + 3);
  await page.mouse.down();
  await page.mouse.move(start.x + 40, start.y + 10);
  await page.mouse.move(start.x + 32, start.y + 3);
  await page.mouse.up();
  await expect(panel().locator('.empty')).toHaveText(/draw|Draw/);
  await expect(
    panel().getByRole('row', { name: 'Edge rise' }).getByRole('cell').first(),
  ).toContainText('–');
  await page.keyboard.press('Control+z');
  await expectKnownBlur();
});

test('the lines are there again, measured, when the study is opened again', async () => {
  await waitForSaved(page);
  await page.reload();
  await waitForPair(page);
  await page.getByRole('tab', { name: 'Noise' }).click();
  await panel().getByLabel('Show').selectOption('E2');
  await expect(picture()).toHaveAttribute('aria-label', /Profile across Edge 2/);
  await expectKnownBlur();
});

test('the sharp kernel is proposed for its width; the reader may choose another and take that back', async () => {
  const foot = page.locator('[data-panel=ledger] .inspector');
  const quote = foot.getByRole('combobox', { name: /^Quote/ });
  await expect(foot).toContainText('Edge 2');
  await expect(quote).toHaveValue('proposal');
  await expect(quote).toHaveAttribute('title', /^The rules propose sharp: Edges and widths/);
  await quote.selectOption('soft');
  await expect(foot).toContainText('The rules propose sharp');
  await foot.getByLabel('Why this kernel is quoted, Edge 2').fill('motion on the sharp one');
  await page.keyboard.press('Enter');
  await quote.selectOption('proposal');
  await expect(foot.getByLabel('Why this kernel is quoted, Edge 2')).toHaveCount(0);
  await waitForSaved(page);
});

test('nothing is cut off in a small window, and no rule of accessibility is broken', async () => {
  for (const shown of ['E2', 'all']) {
    await panel().getByLabel('Show').selectOption(shown);
    const box = await panel().boundingBox();
    const table = await panel().locator('.noise-table').boundingBox();
    const drawn = await panel().locator('.plot-area').boundingBox();
    if (box === null || table === null || drawn === null) throw new Error('not on the screen');
    expect(table.y + table.height).toBeLessThanOrEqual(box.y + box.height);
    expect(drawn.height).toBeGreaterThan(85);
    for (const theme of ['dark', 'light']) {
      await page.evaluate((name) => {
        document.documentElement.dataset.theme = name;
      }, theme);
      await page.evaluate(axe.source);
      const { violations } = await page.evaluate(() =>
        (globalThis as unknown as { axe: typeof axe }).axe.run(document, {
          runOnly: ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa'],
        }),
      );
      expect(violations.map(({ id, nodes }) => `${theme} ${id} ${nodes[0]?.html}`)).toEqual([]);
    }
  }
});

import { execFileSync } from 'node:child_process';
import { join } from 'node:path';
import { expect, type Locator, type Page, test } from '@playwright/test';
import axe from 'axe-core';
import { packageRoot } from '../../app/host/packageRoot.js';
import {
  acceptCautions,
  dragOn,
  regionRow,
  sharpPlate,
  softPlate,
  waitForPair,
  watchPage,
} from './support/bench.js';
import { type RunningShell, startShell, temporaryHome } from './support/shell.js';

/** A few slices of the demonstration study, around its stent. The tests go on from each other. */
test.describe.configure({ mode: 'serial' });

const home = temporaryHome();
let shell: RunningShell;
let page: Page;
let complaints: readonly string[];

test.beforeAll(async ({ browser }) => {
  test.setTimeout(120_000);
  const folder = join(home.path, 'study');
  const cli = join(packageRoot(), 'dist/app/cli.js');
  execFileSync(process.execPath, [cli, 'phantom', '--to', folder, '--slices', '6'], {
    stdio: 'ignore',
  });
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

/** Field and centre of the demonstration, mm; its stent runs along the slices' normal near here. */
const FIELD_MM = 200;
const CENTRE_MM = [24, -14] as const;
const STENT_MM = [56, -50] as const;

const flags = (): Locator => page.getByRole('list', { name: 'Flags of this region' });
const strutOn = (plate: Locator): Locator => plate.locator('.near-edge[data-edge=strut]');

test('a region in the stent is flagged for its strut on both kernels, and the strut outlined on both plates', async () => {
  const box = await softPlate(page).boundingBox();
  if (box === null) throw new Error('the plate is not on the screen');
  const pxPerMm = Math.min(box.width, box.height) / FIELD_MM;
  const at = (xMm: number, yMm: number) =>
    [
      0.5 + ((STENT_MM[0] + xMm - CENTRE_MM[0]) * pxPerMm) / box.width,
      0.5 + ((STENT_MM[1] + yMm - CENTRE_MM[1]) * pxPerMm) / box.height,
    ] as const;
  await softPlate(page).focus();
  await page.keyboard.press('e');
  await dragOn(page, softPlate(page), at(-2, -2), at(2, 2));
  await expect(regionRow(page, 'L1')).toBeVisible();
  // The noise and the blur are measured first.
  await expect(flags()).toContainText('soft: A strut', { timeout: 60_000 });
  await expect(flags()).toContainText('sharp: A strut');
  await expect(flags()).toContainText('Move the region away or make it smaller.');
  await expect(strutOn(softPlate(page))).toHaveCount(1);
  await expect(strutOn(sharpPlate(page))).toHaveCount(1);
  await expect(regionRow(page, 'L1').locator('.flag')).toHaveCount(2);
  const [x, y] = at(0, 0);
  await softPlate(page).hover({ position: { x: x * box.width, y: y * box.height } });
  await page.keyboard.down('Control');
  await page.mouse.wheel(0, -1000);
  await page.keyboard.up('Control');
});

test('Tab reaches the flags and brings them into view in a low window, in both themes', async () => {
  await flags().focus();
  const box = await flags().boundingBox();
  expect(box?.y ?? 1e9).toBeLessThan(720);
  const last = flags().locator('li').last();
  await last.scrollIntoViewIfNeeded();
  await expect(last).toBeInViewport();
  for (const theme of ['light', 'dark'] as const) {
    await page.evaluate((name) => {
      document.documentElement.dataset.theme = name;
    }, theme);
    await page.screenshot({ path: `test-results/flags-${theme}.png` });
    await page.evaluate(axe.source);
    const { violations } = await page.evaluate(() =>
      (globalThis as unknown as { axe: typeof axe }).axe.run(document, {
        runOnly: ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa'],
      }),
    );
    expect(violations.map(({ id, nodes }) => `${theme} ${id} ${nodes[0]?.html}`)).toEqual([]);
  }
});

test('the outline goes when nothing is selected', async () => {
  await softPlate(page).focus();
  await page.keyboard.press('Escape');
  await expect(strutOn(softPlate(page))).toHaveCount(0);
});

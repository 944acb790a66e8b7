import { execFileSync } from 'node:child_process';
import { join } from 'node:path';
import { expect, type Locator, type Page, test } from '@playwright/test';
import axe from 'axe-core';
import { packageRoot } from '../../app/host/packageRoot.js';
import {
  acceptCautions,
  dragOn,
  regionRow,
  softPlate,
  waitForPair,
  waitForSaved,
  watchPage,
} from './support/bench.js';
import { type RunningShell, startShell, temporaryHome } from './support/shell.js';

/** A few slices of the demonstration study. The tests go on from each other. */
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

const panel = (): Locator => page.locator('[data-panel=plot]');
const picture = (): Locator => panel().locator('svg[role=img]');
const words = (): Locator => panel().locator('.visible-words');

test('a key shows what could be seen, with both curves and the line of 20 HU', async () => {
  await softPlate(page).focus();
  await page.keyboard.press('y');
  await expect(panel().getByRole('tab', { name: 'Visible' })).toHaveAttribute(
    'aria-selected',
    'true',
  );
  await expect(panel().getByRole('heading', { name: 'What could be seen' })).toBeVisible();
  await expect(picture()).toBeVisible({ timeout: 60_000 });
  await expect(picture().locator('path.series')).toHaveCount(4);
  await expect(picture()).toContainText('20 HU, the least for an eye');
  await expect(words()).toContainText('Type a contrast, or make one between two regions');
});

test('a typed contrast gives a sentence for each kernel, and a weaker criterion a smaller disc', async () => {
  await panel().getByLabel('Contrast, HU').fill('60');
  await page.keyboard.press('Enter');
  const sentence =
    /On the (soft|sharp) kernel a filling defect of 60 HU is visible from \d\.\d mm\./;
  await expect(words().locator('span').nth(0)).toHaveText(sentence);
  await expect(words().locator('span').nth(1)).toHaveText(sentence);
  await expect(words()).toContainText('An ideal observer’s figure, no promise.');
  await expect(picture()).toHaveAttribute('aria-label', /k 5\. On the soft kernel .* 60 HU/);
  const millimetres = async (): Promise<number> =>
    Number(/from (\d\.\d) mm/.exec(await words().locator('span').nth(1).innerText())?.[1]);
  const strict = await millimetres();
  await panel().getByRole('combobox', { name: 'k', exact: true }).selectOption('3');
  await expect.poll(millimetres).toBeLessThan(strict);
  await waitForSaved(page);
});

test('the contrast of two regions is taken from the note, with the region’s own place on each kernel', async () => {
  // The lumen of the ascending aorta, and muscle beside it, of the demonstration study.
  await softPlate(page).focus();
  await page.keyboard.press('e');
  await dragOn(page, softPlate(page), [0.36, 0.46], [0.43, 0.545]);
  await expect(regionRow(page, 'L1')).toBeVisible();
  await page.getByRole('button', { name: 'wall', exact: false }).first().click();
  await dragOn(page, softPlate(page), [0.5, 0.62], [0.52, 0.65]);
  await expect(regionRow(page, 'W1')).toBeVisible();
  await softPlate(page).focus();
  await page.keyboard.press('k');
  const dialog = page.getByRole('dialog', { name: 'New contrast' });
  await dialog.getByLabel('Noise').selectOption('wall');
  await dialog.locator('button.primary').click();
  await expect(dialog).toBeHidden();
  await regionRow(page, 'L1').click();
  await panel().getByLabel('Contrast of').selectOption({ label: 'C1 · Lumen 1 − Wall 1' });
  await expect(picture().locator('.own-places path')).toHaveCount(2);
  await expect(picture()).toHaveAttribute('aria-label', /Lumen 1, .* mm, soft kernel: /);
  await expect(panel().getByLabel('Contrast, HU')).toHaveCount(0);
});

test('nothing is cut off in a small window, and no rule of accessibility is broken', async () => {
  const box = await panel().boundingBox();
  const caution = await words().locator('.note').boundingBox();
  const drawn = await picture().boundingBox();
  if (box === null || caution === null || drawn === null) throw new Error('not on the screen');
  expect(caution.y + caution.height).toBeLessThanOrEqual(box.y + box.height);
  expect(drawn.height).toBeGreaterThan(90);
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
});

import { expect, type Page, test } from '@playwright/test';
import axe from 'axe-core';
import { noisyStack } from '../corpus/noisyPair.js';
import { acceptCautions, dragOn, regionRow, waitForPair, watchPage } from './support/bench.js';
import { type RunningShell, startShell, temporaryHome } from './support/shell.js';

/** A blind repeat of three regions. The tests go on from each other. */
test.describe.configure({ mode: 'serial' });

const home = temporaryHome();
let shell: RunningShell;
let page: Page;
let complaints: readonly string[];

test.beforeAll(async ({ browser }) => {
  const folder = `${home.path}/study`;
  noisyStack(folder, { kind: 'soft', series: '2.25.53.1', number: 3 });
  noisyStack(folder, { kind: 'sharp', series: '2.25.53.2', number: 4 });
  shell = await startShell(home.path, folder);
  page = await (await browser.newContext({ viewport: { width: 1440, height: 900 } })).newPage();
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

const PLACES = [
  [0.4, 0.4],
  [0.55, 0.4],
  [0.45, 0.6],
] as const;

async function draw([x, y]: readonly [number, number]): Promise<void> {
  await page.keyboard.press('e');
  await dragOn(page, page.locator('[data-plate=soft]'), [x, y], [x + 0.08, y + 0.09]);
}

/** Chooses a command of the More menu. */
async function more(name: string): Promise<void> {
  await page.getByRole('button', { name: 'More' }).click();
  await page.getByRole('menuitem', { name }).click();
}

test('a repeat hides every shape and value of the first reading', async () => {
  for (const [index, place] of PLACES.entries()) {
    await draw(place);
    await expect(regionRow(page, `L${index + 1}`)).toBeVisible();
  }
  await regionRow(page, 'L1').click();
  const mean = await page.locator('[data-panel=hinge] .readout td.soft').first().innerText();
  expect(mean).toMatch(/\d/);
  await more('Read the regions again, blind');
  const panel = page.getByRole('region', { name: 'Repeat reading' });
  await expect(panel).toContainText('Repeat reading, 1 of 3');
  await expect(panel).toContainText('Draw Lumen 1 as you would the first time');
  await expect(page.locator('.plate-overlay .region')).toHaveCount(0);
  await expect(page.locator('tr[data-region]')).toHaveCount(0);
  // Nowhere in the page, nor in a name that is only spoken, stands the first mean.
  const everything = await page.evaluate(() =>
    [...document.querySelectorAll('*')].flatMap((element) => [
      ...[...element.childNodes].flatMap((node) =>
        node.nodeType === 3 ? (node.nodeValue ?? '') : [],
      ),
      element.getAttribute('aria-label') ?? '',
      element.getAttribute('title') ?? '',
    ]),
  );
  expect(everything.filter((text) => text.includes(mean))).toEqual([]);
  await page.keyboard.press('Control+i');
  await expect(page.getByRole('dialog')).toHaveCount(0);
});

test('no rule of accessibility is broken while it runs', async () => {
  await page.evaluate(axe.source);
  const result = await page.evaluate(() =>
    (globalThis as unknown as { axe: typeof axe }).axe.run(document, {
      runOnly: ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa'],
    }),
  );
  expect(result.violations.map(({ id, nodes }) => [id, nodes.map(({ html }) => html)])).toEqual([]);
});

test('it survives a reload, goes on, and undo takes the last one back', async () => {
  await draw(PLACES[0]);
  const panel = page.getByRole('region', { name: 'Repeat reading' });
  await expect(panel).toContainText('Repeat reading, 2 of 3');
  await expect(page.locator('header')).toContainText(/Saved \d\d:\d\d/);
  await page.reload();
  await waitForPair(page);
  await expect(panel).toContainText('Repeat reading, 2 of 3');
  await draw([0.56, 0.41]);
  await expect(panel).toContainText('Repeat reading, 3 of 3');
  await page.keyboard.press('Control+z');
  await expect(panel).toContainText('Repeat reading, 2 of 3');
  await draw([0.56, 0.41]);
});

test('after the last one the agreement is shown, with its plot', async () => {
  await draw([0.46, 0.59]);
  const dialog = page.getByRole('dialog', { name: 'Agreement of readings' });
  await expect(dialog).toBeVisible();
  await expect(dialog.getByRole('row', { name: /^Bias/ })).toBeVisible();
  await expect(dialog.getByRole('row', { name: /^ICC\(2,1\)/ })).toBeVisible();
  await expect(dialog.getByRole('img')).toHaveAttribute('aria-label', /plot of 3 regions/);
  await dialog.getByLabel('On the').selectOption('sharp');
  await expect(dialog).toContainText('mean, HU, sharp kernel');
  await dialog.getByRole('button', { name: 'Close', exact: true }).click();
  await expect(regionRow(page, 'L3')).toBeVisible();
});

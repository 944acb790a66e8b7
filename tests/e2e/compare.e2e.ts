import { expect, type Locator, type Page, test } from '@playwright/test';
import axe from 'axe-core';
import { MATRIX, noisyStack, PATCH_PX, PATCHES } from '../corpus/noisyPair.js';
import { acceptCautions, dragOn, regionRow, waitForPair, watchPage } from './support/bench.js';
import { type RunningShell, startShell, temporaryHome } from './support/shell.js';

/** One small synthetic pair whose series are numbered the wrong way round. The tests go on from each other. */
test.describe.configure({ mode: 'serial' });

const home = temporaryHome();
let shell: RunningShell;
let page: Page;
let complaints: readonly string[];

test.beforeAll(async ({ browser }) => {
  const folder = `${home.path}/study`;
  noisyStack(folder, { kind: 'sharp', series: '2.25.51.1', number: 3 });
  noisyStack(folder, { kind: 'soft', series: '2.25.51.2', number: 4 });
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

const plate = (face: string): Locator => page.locator(`[data-plate=${face}]`);
const verdict = (): Locator => page.locator('[data-panel=hinge] .verdict');

/** Red, green, blue and alpha of a slice's pixel as its canvas has it; the fitted slice is found by its middle. */
async function colourAt(layer: string, column: number, row: number): Promise<readonly number[]> {
  const canvas = page.locator(`.plate-canvas[data-layer=${layer}] canvas`);
  return canvas.evaluate(
    (element, { column, row, matrix }) => {
      if (!(element instanceof HTMLCanvasElement)) throw new Error('invalid layer: no canvas');
      const scale = Math.min(element.width, element.height) / matrix;
      const x = element.width / 2 + (column + 0.5 - matrix / 2) * scale;
      const y = element.height / 2 + (row + 0.5 - matrix / 2) * scale;
      // Read from a copy: the browser warns when a canvas that is drawn by the graphics card is read from.
      const copy = document.createElement('canvas');
      [copy.width, copy.height] = [1, 1];
      const context = copy.getContext('2d', { willReadFrequently: true });
      context?.drawImage(element, Math.floor(x), Math.floor(y), 1, 1, 0, 0, 1, 1);
      return [...(context?.getImageData(0, 0, 1, 1).data ?? [])];
    },
    { column, row, matrix: MATRIX },
  );
}

test('the measured order decides where the series numbers have it the wrong way round', async () => {
  await expect(verdict()).toHaveAttribute('data-verdict', 'pair', { timeout: 30_000 });
  await expect(verdict()).toContainText('One acquisition');
  await expect(verdict()).toContainText('same phase 75 % · same frame · shift 0.00 mm');
  await expect(verdict()).toContainText(
    /noise \d+\.\d → \d+\.\d HU · texture 0\.\d\d → 0\.\d\d \/mm/,
  );
  await expect(plate('soft')).toContainText('series 4');
  await expect(plate('sharp')).toContainText('series 3');
  await expect(page.locator('footer, [data-panel=status], .status')).not.toContainText(
    'please check',
  );
});

test('the evidence is one click away, each check with its state and sentence', async () => {
  await verdict().getByRole('button', { name: 'Evidence' }).click();
  const evidence = verdict().locator('.evidence li');
  await expect(evidence.filter({ hasText: 'phase' }).first()).toContainText('75 %');
  await expect(evidence.filter({ hasText: 'shift' }).first().getByRole('img')).toHaveAttribute(
    'aria-label',
    'agrees',
  );
  await expect(evidence.filter({ hasText: 'kernel label' }).getByRole('img')).toHaveAttribute(
    'aria-label',
    'differs',
  );
  await verdict().getByRole('button', { name: 'Evidence' }).click();
});

test('Difference shows sharp − soft in HU on its own scale, and no data as none', async () => {
  await plate('soft').focus();
  await page.keyboard.press('4');
  await expect(plate('difference')).toHaveAttribute('aria-label', /scale plus and minus 200 HU/);
  await expect(page.locator('.difference-scale')).toContainText('never for measuring');
  await expect(page.locator('.difference-scale .ticks')).toHaveText('−200−1000+100+200');
  const middle = (column: number): number => column + PATCH_PX / 2;
  const colours = new Map<number | string, readonly number[]>();
  for (const { column, differenceHu } of PATCHES) {
    colours.set(differenceHu, await colourAt('difference', middle(column), 10));
  }
  // The ends and the middle of the scale as the legend's colours are defined: #6cc5ff, #5f5f5f, #ffb054.
  expect(colours.get(-200)).toEqual([0x6c, 0xc5, 0xff, 255]);
  expect(colours.get(0)).toEqual([0x5f, 0x5f, 0x5f, 255]);
  expect(colours.get(200)).toEqual([0xff, 0xb0, 0x54, 255]);
  expect(colours.get('padding')).toEqual([0, 0, 0, 0]);
  const [red = 0, , blue = 0] = colours.get(100) ?? [];
  expect(red).toBeGreaterThan(blue + 40);
  const [lowRed = 0, , lowBlue = 0] = colours.get(-100) ?? [];
  expect(lowBlue).toBeGreaterThan(lowRed + 40);
});

test('the scale of the difference is changed by keys and by the window tool', async () => {
  const scale = page.getByRole('slider', { name: 'Range of the difference' });
  await scale.focus();
  await page.keyboard.press('ArrowLeft');
  await expect(scale).toHaveAttribute('aria-valuenow', '160');
  await page.keyboard.press('ArrowRight');
  await expect(scale).toHaveAttribute('aria-valuenow', '200');
  await plate('difference').focus();
  await page.keyboard.press('w');
  await dragOn(page, plate('difference'), [0.4, 0.6], [0.4 - 0.05, 0.6]);
  const range = Number(await scale.getAttribute('aria-valuenow'));
  expect(range).toBeLessThan(190);
  // ±100 HU now lie nearer to the ends.
  const [red = 0] = await colourAt('difference', 58, 10);
  expect(red).toBeGreaterThan(0xb0);
});

test('Fold shows soft left and sharp right of an edge that is dragged and moved by keys', async () => {
  await page.getByRole('button', { name: 'Fold 2' }).click();
  await expect(plate('fold')).toBeVisible();
  const edge = page.getByRole('separator', { name: 'Edge between soft and sharp' });
  await expect(edge).toHaveAttribute('aria-valuenow', '50');
  await edge.focus();
  await page.keyboard.press('Shift+ArrowLeft');
  await page.keyboard.press('ArrowLeft');
  await expect(edge).toHaveAttribute('aria-valuenow', '39');
  const sharp = page.locator('.plate-canvas[data-layer=sharp]');
  await expect(sharp).toHaveCSS('clip-path', 'inset(0px 0px 0px 39%)');
  const box = await edge.boundingBox();
  const area = await plate('fold').boundingBox();
  if (box === null || area === null) throw new Error('the fold is not on the screen');
  await page.mouse.move(box.x + box.width / 2, box.y + 60);
  await page.mouse.down();
  await page.mouse.move(area.x + area.width * 0.5, box.y + 90);
  await page.mouse.move(area.x + area.width * 0.7, box.y + 90);
  await page.mouse.up();
  await expect(edge).toHaveAttribute('aria-valuenow', '70');
  // The greys of the +200 HU patch: C 300 W 800 takes 0 HU to 32 and 200 HU to 96 (PS3.3 C.11.2.1.2.1).
  expect((await colourAt('soft', 74, 10))[0]).toBe(32);
  expect((await colourAt('sharp', 74, 10))[0]).toBe(96);
});

test('a region drawn on the folded plate is shown once and measured on both kernels', async () => {
  await plate('fold').focus();
  await page.keyboard.press('e');
  await dragOn(page, plate('fold'), [0.46, 0.5], [0.54, 0.66]);
  await expect(regionRow(page, 'L1')).toBeVisible();
  await expect(plate('fold').locator('.region')).toHaveCount(1);
  const row = await regionRow(page, 'L1').innerText();
  const means = [...row.matchAll(/(\d{3}\.\d) ± /g)].map((match) => Number(match[1]));
  expect(means).toHaveLength(2);
  for (const mean of means) expect(Math.abs(mean - 300)).toBeLessThan(3);
});

test('scrolling, zooming and the window go on in one plate', async () => {
  await plate('fold').focus();
  await page.keyboard.press('PageUp');
  await expect(plate('fold')).toHaveAttribute('aria-label', /slice 7 of 10/);
  await plate('fold').hover();
  await page.mouse.wheel(0, 120);
  await expect(plate('fold')).toHaveAttribute('aria-label', /slice 6 of 10/);
  await page.keyboard.press('c');
  await expect(plate('fold')).toHaveAttribute('aria-label', /window 300 1500/);
  await page.keyboard.press('i');
  await page.keyboard.press('+');
  await page.keyboard.press('f');
  await expect(plate('fold')).toHaveAttribute('aria-label', /slice 6 of 10/);
});

test('Alternate shows the other kernel while a key is held, and switches for those who can’t hold it', async () => {
  await page.keyboard.press('3');
  await plate('alternate').focus();
  const soft = page.locator('.plate-canvas[data-layer=soft]');
  const sharp = page.locator('.plate-canvas[data-layer=sharp]');
  await expect(soft).toBeVisible();
  await expect(sharp).toBeHidden();
  await expect(plate('alternate')).toHaveAttribute('aria-label', /now soft/);
  for (const key of ['a', ' ']) {
    await page.keyboard.down(key);
    await expect(sharp).toBeVisible();
    await expect(soft).toBeHidden();
    await expect(plate('alternate')).toHaveAttribute('aria-label', /now sharp/);
    await expect(plate('alternate')).toContainText('Sharp · series 3');
    await page.keyboard.up(key);
    await expect(soft).toBeVisible();
  }
  await page.keyboard.press('x');
  await expect(sharp).toBeVisible();
  await page.getByRole('group', { name: 'Kernel on the plate' }).getByText('Soft').click();
  await expect(soft).toBeVisible();
  await expect(plate('alternate').locator('.region')).toHaveCount(1);
});

test('no rule of accessibility is broken in any way of comparing', async () => {
  for (const way of ['2', '3', '4', '1']) {
    await page.locator('.plate-surface').first().focus();
    await page.keyboard.press(way);
    await page.evaluate(axe.source);
    const { violations } = await page.evaluate(() =>
      (globalThis as unknown as { axe: typeof axe }).axe.run(document, {
        runOnly: ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa'],
      }),
    );
    expect(violations.map(({ id, nodes }) => `${way} ${id} ${nodes[0]?.html}`)).toEqual([]);
  }
});

test('the noise plot and the areas that it rests on are shown on demand', async () => {
  await page.keyboard.press('1');
  await page.getByRole('tab', { name: 'Noise' }).click();
  const plot = page.locator('[data-panel=plot] svg[role=img]');
  await expect(plot).toHaveAttribute('aria-label', /Soft: highest .* HU² mm² at .* per mm/);
  await expect(plot).toContainText('HU² mm²');
  await plate('soft').focus();
  await page.keyboard.press('h');
  await page.keyboard.press('PageDown');
  await expect(plate('soft').locator('.noise-area').first()).toBeAttached();
  expect(await plate('sharp').locator('.noise-area').count()).toBe(
    await plate('soft').locator('.noise-area').count(),
  );
  await page.keyboard.press('h');
  await expect(page.locator('.noise-area')).toHaveCount(0);
});

test('what is marked is never swapped silently: the reader swaps, is told, and swaps back', async () => {
  await page.keyboard.press('Control+p');
  const dialog = page.getByRole('dialog', { name: 'Choose pair' });
  await expect(dialog.locator('.proposal')).toHaveCount(1, { timeout: 30_000 });
  await expect(dialog.locator('.proposal')).toContainText('Series 4 · “K4” + Series 3 · “K3”');
  await expect(dialog.locator('.proposal')).toHaveAttribute('data-verdict', 'pair');
  await dialog.getByRole('button', { name: 'Swap' }).click();
  await dialog.getByRole('button', { name: 'Read as a pair' }).click();
  await expect(plate('soft')).toContainText('series 3');
  await expect(verdict()).toContainText('soft and sharp look swapped', { timeout: 30_000 });
  await verdict().getByRole('button', { name: 'Swap soft and sharp' }).click();
  await expect(plate('soft')).toContainText('series 4');
  await expect(verdict()).not.toContainText('look swapped');
  await expect(regionRow(page, 'L1')).toBeVisible();
});

test('of three stacks the pair is found and opened, and a frame of reference is answered for with a reason', async ({
  browser,
}) => {
  const other = temporaryHome();
  const folder = `${other.path}/study`;
  noisyStack(folder, { kind: 'sharp', series: '2.25.52.1', number: 3 });
  noisyStack(folder, { kind: 'soft', series: '2.25.52.2', number: 4 });
  noisyStack(folder, {
    kind: 'soft',
    series: '2.25.52.3',
    number: 5,
    frameOfReference: '2.25.52.9',
  });
  const second = await startShell(other.path, folder);
  const own = await (
    await browser.newContext({ viewport: { width: 1440, height: 900 } })
  ).newPage();
  const watched = watchPage(own);
  await own.goto(second.address);
  await acceptCautions(own);
  await waitForPair(own);
  await expect(own.locator('[data-plate=soft]')).toContainText('series 4');
  await expect(own.locator('[data-plate=sharp]')).toContainText('series 3');

  await own.keyboard.press('Control+p');
  const dialog = own.getByRole('dialog', { name: 'Choose pair' });
  await expect(dialog.locator('.proposal').first()).toContainText('“K4” + Series 3');
  const sharp = dialog.getByRole('group', { name: 'Sharp' });
  await sharp.getByRole('radio', { name: /Series 5/ }).check();
  const confirm = dialog.getByRole('button', { name: 'Read as a pair' });
  await expect(confirm).toBeDisabled();
  await dialog
    .getByLabel('Reason although the frame of reference differs')
    .fill('one scan, renamed');
  await expect(confirm).toBeEnabled();
  await confirm.click();
  const hinge = own.locator('[data-panel=hinge]');
  await expect(hinge).toContainText('Linked by slice number');
  await own.keyboard.press('4');
  await expect(own.locator('[data-plate=difference]')).toHaveCount(0);
  await expect(own.getByText('there is no difference to show')).toBeVisible();
  expect(watched.complaints).toEqual([]);
  await own.close();
  await second.stop();
  other.remove();
});

import { join } from 'node:path';
import { expect, type Page, test } from '@playwright/test';
import { writePairStudy } from '../bench/pairStudy.js';
import {
  acceptCautions,
  dragOn,
  regionRow,
  softPlate,
  waitForPair,
  waitForSaved,
  watchPage,
} from './support/bench.js';
import { startShell, temporaryHome } from './support/shell.js';

/** GiB that the page is told of: two fifths of it are six slices of 128² in each of two stacks. */
const MEMORY_GIB = 0.00095;

/** Whether there is a picture in the middle of a plate; looked at in a copy, which leaves the canvas as it is. */
const isDrawn = (page: Page, plate: 'soft' | 'sharp'): Promise<boolean> =>
  page.locator(`[data-plate=${plate}] canvas`).evaluate((canvas: HTMLCanvasElement) => {
    const copy = new OffscreenCanvas(1, 1).getContext('2d');
    copy?.drawImage(canvas, canvas.width >> 1, canvas.height >> 1, 1, 1, 0, 0, 1, 1);
    return (copy?.getImageData(0, 0, 1, 1).data[0] ?? 0) > 16;
  });

/** Runs in the page before its own program: states a memory, and counts the slices that workers have read. */
function prepare(deviceMemory: number): void {
  Object.defineProperty(navigator, 'deviceMemory', { value: deviceMemory });
  const counted = { slices: 0 };
  Object.assign(window, { counted });
  const Native = Worker;
  window.Worker = class extends Native {
    constructor(...given: ConstructorParameters<typeof Worker>) {
      super(...given);
      if (!String(given[0]).includes('decode.worker')) return;
      this.addEventListener('message', () => {
        counted.slices += 1;
      });
    }
  };
}

const slicesRead = (page: Page): Promise<number> =>
  page.evaluate(() => (window as unknown as { counted: { slices: number } }).counted.slices);

test('a pair that is larger than the memory is read as it is scrolled, and keeps its values', async ({
  page,
}) => {
  const home = temporaryHome();
  const study = join(home.path, 'study');
  writePairStudy(study, 40, 128);
  const shell = await startShell(home.path, study);
  try {
    const { complaints } = watchPage(page);
    await page.addInitScript(prepare, MEMORY_GIB);
    await page.goto(shell.address);
    await acceptCautions(page);
    await waitForPair(page);
    await expect.poll(() => isDrawn(page, 'sharp')).toBe(true);
    // Six of forty in each stack, and no more while nothing moves.
    await expect.poll(() => slicesRead(page)).toBe(12);
    await softPlate(page).focus();
    await page.keyboard.press('e');
    await dragOn(page, softPlate(page), [0.4, 0.4], [0.5, 0.5]);
    await expect(regionRow(page, 'L1')).toContainText('±');
    await waitForSaved(page);
    const before = await regionRow(page, 'L1').innerText();
    await softPlate(page).focus();
    for (const key of ['Home', 'End', 'Home']) {
      await page.keyboard.press(key);
      const slice = key === 'Home' ? /slice 1 of 40/ : /slice 40 of 40/;
      await expect(softPlate(page)).toHaveAttribute('aria-label', slice);
      for (const plate of ['soft', 'sharp'] as const) {
        await expect.poll(() => isDrawn(page, plate), `${plate} at ${key}`).toBe(true);
      }
    }
    expect(await regionRow(page, 'L1').innerText()).toBe(before);
    expect(await slicesRead(page)).toBeGreaterThan(12);
    expect(complaints).toEqual([]);
  } finally {
    await shell.stop();
    home.remove();
  }
});

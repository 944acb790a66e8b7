import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, type Page, test } from '@playwright/test';
import axe from 'axe-core';
import type { WriteElement } from '../../core/dicom/write/index.js';
import { ctSlice } from '../corpus/ctSlice.js';
import { change, without } from '../corpus/element.js';
import {
  acceptCautions,
  dragOn,
  regionRow,
  sharpPlate,
  softPlate,
  waitForSaved,
  watchPage,
} from './support/bench.js';
import { startShell, temporaryHome } from './support/shell.js';

const SIDE = 64;

/** A circle of 100 HU, soft, or 200 HU, sharp, in −2000: what scanners write outside it without a mark. */
function circle(hu: number): Int16Array {
  return Int16Array.from({ length: SIDE * SIDE }, (_, index) => {
    const [x, y] = [(index % SIDE) - 31.5, Math.floor(index / SIDE) - 31.5];
    return x * x + y * y > 24 * 24 ? -976 : hu + 1024 + (index % 3) - 1;
  });
}

type Changes = Readonly<Record<number, WriteElement | undefined>>;

function writeStudy(home: string, changes: Changes = {}, kernels: readonly (3 | 4)[] = [3, 4]) {
  const folder = join(home, 'study');
  mkdirSync(folder);
  for (const number of kernels) {
    for (let z = 0; z < 5; z++) {
      const options = {
        rows: SIDE,
        columns: SIDE,
        stored: circle(number === 3 ? 100 : 200),
        series: `2.25.8.${number}`,
        number: z + 1,
        z,
        change: { ...change({ tag: 0x00200011, vr: 'IS', value: number }), ...changes },
      };
      writeFileSync(join(folder, `${number}-${z}`), ctSlice(options));
    }
  }
  return folder;
}

async function withStudy(
  page: Page,
  make: (home: string) => string,
  work: (restart: () => Promise<void>) => Promise<void>,
): Promise<void> {
  const home = temporaryHome();
  const shell = await startShell(home.path, make(home.path));
  const { complaints } = watchPage(page);
  await page.goto(shell.address);
  await acceptCautions(page);
  await expect(softPlate(page)).toHaveAttribute('aria-label', /slice 3 of 5/);
  await work(async () => {
    await page.reload();
    await expect(softPlate(page)).toHaveAttribute('aria-label', /slice 3 of 5/);
  });
  expect(complaints).toEqual([]);
  await page.close();
  await shell.stop();
  home.remove();
}

async function choose(page: Page, item: string): Promise<void> {
  await page.getByRole('button', { name: 'More' }).click();
  await page.getByRole('menuitemcheckbox', { name: item }).click();
}

test('unmarked padding is left out when the reader says so; the note remembers it', async ({
  page,
}) => {
  await withStudy(
    page,
    (home) => writeStudy(home),
    async (restart) => {
      await page.keyboard.press('e');
      await dragOn(page, softPlate(page), [0.3, 0.3], [0.7, 0.7]);
      const row = regionRow(page, 'L1');
      await expect(row).toBeVisible();
      // Over circle and padding: a mean that is neither.
      await expect(row).toContainText('−');
      await waitForSaved(page);
      await choose(page, 'Leave unmarked padding out');
      await expect(page.locator('footer [role=status]')).toContainText(
        'Values below −1500 HU are left out',
      );
      await expect(row).toContainText('100');
      await expect(row).toContainText('200');
      await waitForSaved(page);

      await restart();
      await expect(row).toContainText('100');
      await page.getByRole('button', { name: 'More' }).click();
      await expect(
        page.getByRole('menuitemcheckbox', { name: 'Leave unmarked padding out' }),
      ).toHaveAttribute('aria-checked', 'true');
      await page.keyboard.press('Escape');
      await choose(page, 'Leave unmarked padding out');
      await expect(page.locator('footer [role=status]')).toContainText('Nothing is left out');
    },
  );
});

test('names in a wrong character set are read in the one that the reader chooses', async ({
  page,
}) => {
  const gbk = change(
    { tag: 0x00080005, vr: 'CS', value: 'ISO_IR 100' },
    { tag: 0x00100010, vr: 'PN', value: Uint8Array.of(0xcd, 0xf5, 0x5e, 0xd0, 0xa1, 0xb6, 0xab) },
  );
  await withStudy(
    page,
    (home) => writeStudy(home, gbk),
    async () => {
      await expect(page.locator('header')).toContainText('Íõ');
      await page.getByRole('button', { name: 'More' }).click();
      await page.getByRole('menuitem', { name: /Folder contents/ }).click();
      const dialog = page.getByRole('dialog');
      await dialog.getByLabel('Read names and descriptions as').selectOption('GBK');
      await page.evaluate(axe.source);
      const problems = await page.evaluate(async () => {
        const { axe: checker } = window as unknown as { axe: typeof axe };
        return (await checker.run('[role=dialog], dialog')).violations.map(({ id }) => id);
      });
      expect(problems).toEqual([]);
      await dialog.getByRole('button', { name: 'Read again' }).click();
      await expect(page.locator('header')).toContainText('王');
      await expect(softPlate(page)).toHaveAttribute('aria-label', /slice 3 of 5/);
    },
  );
});

test('a stack without a pixel spacing is shown pixel by pixel, and nothing is measured on it', async ({
  page,
}) => {
  await withStudy(
    page,
    (home) => writeStudy(home, without(0x00280030), [3]),
    async () => {
      await expect(page.locator('footer [role=status]')).toContainText('no pixel spacing');
      await expect(softPlate(page)).toContainText('no pixel spacing');
      await expect(softPlate(page).locator('.scale-bar')).toHaveCount(0);
      await page.keyboard.press('e');
      await dragOn(page, softPlate(page), [0.4, 0.4], [0.6, 0.6]);
      await expect(page.locator('tr[data-region]')).toHaveCount(0);
      await softPlate(page).hover();
      await expect(page.locator('footer')).toContainText(/column \d+, row \d+/);
      await expect(page.locator('footer')).not.toContainText('mm');
    },
  );
});

test('a lookup table for display is one of the windows of the file', async ({ page }) => {
  const table = change(
    { tag: 0x00281050, vr: 'DS', value: 40 },
    { tag: 0x00281051, vr: 'DS', value: 400 },
    {
      tag: 0x00283010,
      vr: 'SQ',
      items: [
        [
          { tag: 0x00283002, vr: 'SS', value: [4, -1, 8] },
          { tag: 0x00283003, vr: 'LO', value: 'BONE' },
          { tag: 0x00283006, vr: 'US', value: [0, 80, 160, 255] },
        ],
      ],
    },
  );
  await withStudy(
    page,
    (home) => writeStudy(home, table),
    async () => {
      await expect(softPlate(page)).toContainText('C 40 W 400');
      await softPlate(page).focus();
      await page.keyboard.press('i');
      await expect(softPlate(page)).toContainText('LUT “BONE”');
      await expect(sharpPlate(page)).toContainText('LUT “BONE”');
      await page.keyboard.press('i');
      await expect(softPlate(page)).toContainText('C 40 W 400');
    },
  );
});

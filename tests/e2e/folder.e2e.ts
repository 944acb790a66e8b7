import { mkdirSync, readFileSync, symlinkSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from '@playwright/test';
import axe from 'axe-core';
import { ctSlice } from '../corpus/ctSlice.js';
import { acceptCautions, watchPage } from './support/bench.js';
import { startShell, temporaryHome } from './support/shell.js';

/** A folder as they come: two small synthetic series, and files that are no slices. */
function makeFolder(home: string): string {
  const folder = join(home, 'study');
  mkdirSync(join(folder, 'deeper'), { recursive: true });
  const stored = Int16Array.from({ length: 64 * 64 }, (_, index) => 1000 + (index % 400));
  for (const [series, number] of [
    ['2.25.8.1', 3],
    ['2.25.8.2', 4],
  ] as const) {
    for (let slice = 0; slice < 5; slice++) {
      const change = { 2097169: { tag: 0x00200011, vr: 'IS', value: number } } as const;
      const options = { rows: 64, columns: 64, stored, series, number: slice, z: slice, change };
      writeFileSync(join(folder, `${number}-${slice}`), ctSlice(options));
    }
  }
  writeFileSync(join(folder, 'empty.dcm'), '');
  writeFileSync(join(folder, 'deeper', 'letter.txt'), '<b>not an image</b>\n'.repeat(20));
  writeFileSync(join(folder, 'cut.dcm'), readFileSync(join(folder, '3-0')).subarray(0, 900));
  symlinkSync(folder, join(folder, 'deeper', 'loop'));
  return folder;
}

test('a folder with files that are no slices opens, and each of them is named with its reason', async ({
  page,
}) => {
  const home = temporaryHome();
  const shell = await startShell(home.path, makeFolder(home.path));
  const { complaints } = watchPage(page);
  await page.goto(shell.address);
  await acceptCautions(page);
  await expect(page.locator('[data-plate=soft]')).toHaveAttribute('aria-label', /slice 3 of 5/);

  await page.getByRole('button', { name: '4 left out' }).click();
  const contents = page.getByRole('dialog');
  await expect(contents).toBeVisible();
  for (const words of [
    'empty.dcm',
    'Empty file: it holds no bytes.',
    'letter.txt',
    'Not a DICOM file',
    'cut.dcm',
    'The file ends at byte 900',
    'loop',
  ]) {
    await expect(contents).toContainText(words);
  }
  expect(complaints).toEqual([]);
  await page.close();
  await shell.stop();
  home.remove();
});

test('no rule of accessibility is broken, in the dark and in the light theme', async ({ page }) => {
  const home = temporaryHome();
  const shell = await startShell(home.path, makeFolder(home.path));
  await page.goto(shell.address);
  await acceptCautions(page);
  await expect(page.locator('[data-plate=soft]')).toHaveAttribute('aria-label', /slice 3 of 5/);
  for (const theme of ['dark', 'light']) {
    await page.evaluate((name) => document.documentElement.setAttribute('data-theme', name), theme);
    await page.evaluate(axe.source);
    const { violations } = await page.evaluate(() =>
      (globalThis as unknown as { axe: typeof axe }).axe.run(document, {
        runOnly: ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa'],
      }),
    );
    expect(violations.map(({ id, nodes }) => `${theme} ${id} ${nodes[0]?.html}`)).toEqual([]);
  }
  await page.close();
  await shell.stop();
  home.remove();
});

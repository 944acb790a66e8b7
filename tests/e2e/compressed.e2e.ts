import { execFileSync } from 'node:child_process';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, type Page, test } from '@playwright/test';
import { type CtSliceOptions, ctSlice } from '../corpus/ctSlice.js';
import { enhancedCt } from '../corpus/enhancedCt.js';
import { highThroughput } from '../corpus/highThroughput.js';
import { acceptCautions, dragOn, sharpPlate, softPlate, watchPage } from './support/bench.js';
import { startShell, temporaryHome } from './support/shell.js';

// The encoders are dcmtk's and gdcm's: the page decodes what others wrote.
const TOOLS = ['dcmcjpeg', 'dcmcjpls', 'dcmcrle', 'gdcmconv'].map((name) => `/usr/bin/${name}`);
test.skip(!TOOLS.every((path) => existsSync(path)), 'needs dcmtk and gdcm');

const SIDE = 64;
/** HU of every pixel of a series: soft and sharp differ, so that one can't pass for the other. */
const SOFT_HU = 300;
const SHARP_HU = -40;

type Encode = (from: string, to: string) => void;

const encoder =
  (tool: string, ...flags: readonly string[]): Encode =>
  (from, to) => {
    execFileSync(`/usr/bin/${tool}`, [...flags, from, to], { stdio: 'ignore' });
  };

function flat(hu: number): Int16Array {
  // A little texture, mean 0, so that nothing is compressed away and the mean stays.
  return Int16Array.from({ length: SIDE * SIDE }, (_, index) => hu + 1024 + (index % 3) - 1);
}

function writeFileAs(folder: string, name: string, bytes: Uint8Array, encode: Encode): void {
  const plain = join(folder, '..', `${name}.plain`);
  writeFileSync(plain, bytes);
  encode(plain, join(folder, name));
}

function slices(series: string, number: number, hu: number): readonly CtSliceOptions[] {
  return Array.from({ length: 5 }, (_, z) => ({
    rows: SIDE,
    columns: SIDE,
    stored: flat(hu),
    series,
    number: z + 1,
    z,
    change: { 2097169: { tag: 0x00200011, vr: 'IS', value: number } },
  }));
}

async function openFolder(page: Page, home: string, folder: string) {
  const shell = await startShell(home, folder);
  const { complaints } = watchPage(page);
  await page.goto(shell.address);
  await acceptCautions(page);
  await expect(softPlate(page)).toHaveAttribute('aria-label', /slice 3 of 5/);
  await expect(sharpPlate(page)).toHaveAttribute('aria-label', /slice 3 of 5/);
  return { shell, complaints };
}

/** Draws a region on the soft plate and waits until its row shows both means. */
async function expectMeasured(page: Page): Promise<void> {
  await page.keyboard.press('e');
  await dragOn(page, softPlate(page), [0.4, 0.4], [0.6, 0.6]);
  const row = page.locator('tr[data-region]').first();
  await expect(row).toContainText(`${SOFT_HU}`);
  await expect(row).toContainText(`${SHARP_HU}`.replace('-', '−'));
}

const PAIRS: readonly (readonly [string, Encode, Encode])[] = [
  ['JPEG-LS and JPEG 2000', encoder('dcmcjpls', '+el'), encoder('gdcmconv', '--j2k')],
  ['JPEG lossless and RLE', encoder('dcmcjpeg', '+e1'), encoder('dcmcrle')],
];

for (const [name, soft, sharp] of PAIRS) {
  test(`a pair in ${name} is decoded in the page, and a truncated slice is a gap with its sentence`, async ({
    page,
  }) => {
    const home = temporaryHome();
    const folder = join(home.path, 'study');
    mkdirSync(folder);
    for (const [index, slice] of slices('2.25.8.1', 3, SOFT_HU).entries()) {
      writeFileAs(folder, `soft${index}`, ctSlice(slice), soft);
    }
    for (const [index, slice] of slices('2.25.8.2', 4, SHARP_HU).entries()) {
      writeFileAs(folder, `sharp${index}`, ctSlice(slice), sharp);
    }
    const cut = join(folder, 'sharp3');
    const whole = readFileSync(cut);
    writeFileSync(cut, whole.subarray(0, whole.length - 60));
    const { shell, complaints } = await openFolder(page, home.path, folder);

    await expectMeasured(page);
    await softPlate(page).focus();
    await page.keyboard.press('PageUp');
    await expect(softPlate(page)).toHaveAttribute('aria-label', /slice 4 of 5/);
    await expect(sharpPlate(page)).toContainText(
      /No data for this slice\. (The file ends at byte \d+, inside its pixels|The compressed pixels are cut)/,
    );
    expect(complaints).toEqual([]);
    await page.close();
    await shell.stop();
    home.remove();
  });
}

test('a pair in HTJ2K is decoded in the page', async ({ page }) => {
  const home = temporaryHome();
  const folder = join(home.path, 'study');
  mkdirSync(folder);
  for (const [name, series, number, hu] of [
    ['soft', '2.25.8.1', 3, SOFT_HU],
    ['sharp', '2.25.8.2', 4, SHARP_HU],
  ] as const) {
    const coded = await highThroughput(flat(hu), SIDE, SIDE);
    const pixels = { 2145386512: { tag: 0x7fe00010, vr: 'OB', fragments: [coded] } } as const;
    for (const [index, slice] of slices(series, number, hu).entries()) {
      const change = { ...slice.change, ...pixels };
      const transferSyntaxUid = '1.2.840.10008.1.2.4.201';
      writeFileSync(
        join(folder, `${name}${index}`),
        ctSlice({ ...slice, change, transferSyntaxUid }),
      );
    }
  }
  const { shell, complaints } = await openFolder(page, home.path, folder);
  await expectMeasured(page);
  expect(complaints).toEqual([]);
  await page.close();
  await shell.stop();
  home.remove();
});

test('a pair of enhanced multi-frame images is read frame by frame', async ({ page }) => {
  const home = temporaryHome();
  const folder = join(home.path, 'study');
  mkdirSync(folder);
  const file = (series: string, hu: number) =>
    enhancedCt({
      rows: SIDE,
      columns: SIDE,
      series,
      frames: [3, 0, 4, 1, 2].map((z) => ({ z, stored: flat(hu) })),
    });
  writeFileAs(folder, 'soft', file('2.25.8.1', SOFT_HU), encoder('dcmcjpls', '+el'));
  writeFileSync(join(folder, 'sharp'), file('2.25.8.2', SHARP_HU));
  const asked: string[] = [];
  page.context().on('request', (request) => {
    if (request.url().includes('/frames/')) asked.push(new URL(request.url()).search);
  });
  const { shell, complaints } = await openFolder(page, home.path, folder);
  await expectMeasured(page);
  // A worker’s first requests can go out before the browser reports them, so they are not counted.
  await expect.poll(() => asked.length).toBeGreaterThan(0);
  expect(asked.every((search) => /^\?frame=[0-4]$/.test(search))).toBe(true);
  expect(complaints).toEqual([]);
  await page.close();
  await shell.stop();
  home.remove();
});

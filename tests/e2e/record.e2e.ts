import { readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, type Locator, type Page, test } from '@playwright/test';
import axe from 'axe-core';
import type { Note } from '../../core/note/index.js';
import { MATRIX, noisyStack } from '../corpus/noisyPair.js';
import { acceptCautions, dragOn, regionRow, waitForPair, watchPage } from './support/bench.js';
import { type RunningShell, startShell, temporaryHome } from './support/shell.js';

/** The life of a note, from the first mark to an amendment. The tests go on from each other. */
test.describe.configure({ mode: 'serial' });

const home = temporaryHome();
const folder = `${home.path}/study`;
let shell: RunningShell;
let page: Page;
let complaints: readonly string[];

test.beforeAll(async ({ browser }) => {
  noisyStack(folder, { kind: 'soft', series: '2.25.52.1', number: 3 });
  noisyStack(folder, { kind: 'sharp', series: '2.25.52.2', number: 4 });
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

const dialog = (): Locator => page.getByRole('dialog', { name: 'Reading note' });

function notePath(): string {
  const notes = join(home.path, 'data', 'notes');
  const [name] = readdirSync(notes);
  return join(notes, name ?? '', 'note.json');
}

const savedNote = (): Note => JSON.parse(readFileSync(notePath(), 'utf8')) as Note;

test('the note says what it still lacks, and takes what the files do not state', async () => {
  await page.keyboard.press('e');
  await dragOn(page, page.locator('[data-plate=soft]'), [0.45, 0.45], [0.55, 0.55]);
  await expect(regionRow(page, 'L1')).toBeVisible();
  const ledger = page.locator('[data-panel=ledger]');
  await ledger.getByLabel('Finding').selectOption('stent');
  await ledger.getByLabel('Segment').selectOption('7');
  await page.keyboard.press('Control+i');
  await expect(dialog()).toContainText('Stent in mLAD: the nominal length.');
  await expect(dialog()).toContainText('The contrast agent: the files do not state it.');

  const agent = dialog().getByLabel('Contrast agent');
  await agent.fill('iodine 370, 70 ml');
  await agent.press('Enter');
  await expect(dialog()).not.toContainText('The contrast agent: the files do not state it.');
  await expect(dialog()).toContainText('stated by the reader');
  await dialog().getByLabel('Dominance').selectOption('right');
  const length = dialog().getByLabel('Nominal length, mm');
  await length.fill('18');
  await length.press('Enter');
  await expect(dialog()).not.toContainText('the nominal length');
  const comment = dialog().getByLabel('Comment on the whole reading');
  await comment.fill('Motion in the distal part.');
  await comment.blur();
  await expect
    .poll(() => savedNote())
    .toMatchObject({
      conditions: { contrastAgent: 'iodine 370, 70 ml' },
      conditionsByReader: ['contrastAgent'],
      anatomy: { dominance: 'right' },
      comment: 'Motion in the distal part.',
    });
});

test('no rule of accessibility is broken in the dialog', async () => {
  await page.evaluate(axe.source);
  const result = await page.evaluate(() =>
    (globalThis as unknown as { axe: typeof axe }).axe.run(document, {
      runOnly: ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa'],
    }),
  );
  expect(result.violations.map(({ id, nodes }) => [id, nodes.map(({ html }) => html)])).toEqual([]);
});

test('it is verified under a name, and frozen', async () => {
  await dialog().getByLabel('Completion').selectOption('complete');
  await dialog().getByLabel('Your name').fill('R. Example');
  await dialog().getByRole('button', { name: 'Verify and freeze the note' }).click();
  await expect(dialog()).toContainText('By R. Example');
  await expect.poll(() => savedNote().verification).toBe('VERIFIED');
  const note = savedNote();
  expect(note.completion).toBe('COMPLETE');
  expect(note.seal?.sha256).toMatch(/^[0-9a-f]{64}$/);
  // One slice on each kernel.
  expect(note.frames).toHaveLength(2);
  await dialog().getByRole('button', { name: 'Close', exact: true }).click();
  await regionRow(page, 'L1').click();
  await page.keyboard.press('Delete');
  await expect(page.getByText('This note is verified. To change it, amend it')).toBeVisible();
  await page.keyboard.press('Control+z');
  expect(savedNote().verification).toBe('VERIFIED');
});

test('measured again, every value holds', async () => {
  await page.keyboard.press('Control+i');
  await dialog().getByRole('button', { name: 'Compute every value from the images again' }).click();
  await expect(dialog()).toContainText('Every value holds.');
  await expect(dialog()).toContainText('The content is what was verified.');
});

test('an amendment keeps what was verified, with who and why', async () => {
  await dialog().getByLabel('Your name').fill('S. Sample');
  await dialog().getByLabel('Why it is amended').fill('other length');
  await dialog().getByRole('button', { name: 'Amend: open it for changes' }).click();
  await expect(dialog().getByRole('button', { name: 'Verify and freeze the note' })).toBeVisible();
  const length = dialog().getByLabel('Nominal length, mm');
  await length.fill('23');
  await length.press('Enter');
  await expect.poll(() => savedNote().findings[0]?.lengthMm).toBe(23);
  const [amendment] = savedNote().amendments;
  expect(amendment).toMatchObject({ by: 'S. Sample', why: 'other length' });
  expect(amendment?.before).toMatchObject({
    verification: 'VERIFIED',
    findings: [{ lengthMm: 18 }],
    seal: { by: 'R. Example' },
  });
  await expect(dialog()).toContainText('S. Sample');
});

test('a changed pixel and a changed note are seen when it is measured again', async () => {
  await dialog().getByRole('button', { name: 'Verify and freeze the note' }).click();
  await expect.poll(() => savedNote().verification).toBe('VERIFIED');
  const uid = savedNote().regions[0]?.soft?.sopInstanceUid ?? '';
  changePixel(uid);
  const note = savedNote();
  writeFileSync(notePath(), `${JSON.stringify({ ...note, comment: 'edited by hand' }, null, 2)}\n`);
  await page.reload();
  await waitForPair(page);
  await expect(page.getByText('its content is not what was verified')).toBeVisible();
  await page.keyboard.press('Control+i');
  await dialog().getByRole('button', { name: 'Compute every value from the images again' }).click();
  await expect(dialog()).toContainText('The content is not what was verified');
  await expect(dialog()).toContainText(`Other pixels than when verified: image ${uid}`);
  await expect(dialog().getByRole('row', { name: /Lumen 1 soft meanHu/ })).toBeVisible();
  await dialog().getByRole('button', { name: 'Close', exact: true }).click();
});

test('the key image of a region shows both kernels, and is saved as a picture', async () => {
  await regionRow(page, 'L1').click();
  await page.keyboard.press('j');
  const picture = page.getByRole('dialog', { name: 'Key image of Lumen 1' });
  await expect(picture.getByRole('img')).toHaveAttribute('aria-label', /Soft: Mean .* Sharp: Mean/);
  const download = page.waitForEvent('download');
  await picture.getByRole('button', { name: 'Save as PNG' }).click();
  const file = await download;
  expect(file.suggestedFilename()).toBe('key-image-L1.png');
  expect(
    readFileSync(await file.path())
      .subarray(1, 4)
      .toString(),
  ).toBe('PNG');
});

/** Adds 9 to the pixel in the middle of the image with this UID. */
function changePixel(uid: string): void {
  for (const name of readdirSync(folder)) {
    const path = join(folder, name);
    const file = readFileSync(path);
    if (!file.includes(uid)) continue;
    const at = file.length - MATRIX * MATRIX * 2 + (MATRIX * (MATRIX / 2) + MATRIX / 2) * 2;
    file.writeInt16LE(file.readInt16LE(at) + 9, at);
    writeFileSync(path, file);
  }
}

import { expect, type Locator, type Page } from '@playwright/test';

/** Fails a test on an error of the page, a warning, or a breach of its content security policy. */
export function watchPage(page: Page): { readonly complaints: string[] } {
  const complaints: string[] = [];
  page.on('pageerror', (error) => complaints.push(error.message));
  page.on('console', (message) => {
    const isMissingNote = /status of 404/.test(message.text());
    if (['error', 'warning'].includes(message.type()) && !isMissingNote) {
      complaints.push(message.text());
    }
  });
  return { complaints };
}

export const softPlate = (page: Page): Locator => page.locator('[data-plate=soft]');
export const sharpPlate = (page: Page): Locator => page.locator('[data-plate=sharp]');
export const regionRow = (page: Page, id: string): Locator =>
  page.locator(`tr[data-region="${id}"]`);

/** Accepts the cautions that stand before the first reading. */
export async function acceptCautions(page: Page): Promise<void> {
  const dialog = page.getByRole('dialog', { name: 'Before you measure' });
  await expect(dialog).toBeVisible();
  await dialog.getByRole('button', { name: 'I have read this and accept it' }).click();
  await expect(dialog).toBeHidden();
}

/** Waits until both plates show a slice and all slices are read. */
export async function waitForPair(page: Page): Promise<void> {
  await expect(softPlate(page)).toHaveAttribute('aria-label', /slice \d+ of \d+/, {
    timeout: 60_000,
  });
  await expect(sharpPlate(page)).toHaveAttribute('aria-label', /slice \d+ of \d+/);
}

/** Waits until the note says that it is saved. */
export async function waitForSaved(page: Page): Promise<void> {
  await expect(page.locator('header')).toContainText(/Saved \d\d:\d\d/);
}

/** Drags on a plate between two places given as fractions of its size. */
export async function dragOn(
  page: Page,
  plate: Locator,
  from: readonly [number, number],
  to: readonly [number, number],
): Promise<void> {
  const box = await plate.boundingBox();
  if (box === null) throw new Error('the plate is not on the screen');
  const at = ([x, y]: readonly [number, number]) =>
    [box.x + box.width * x, box.y + box.height * y] as const;
  await page.mouse.move(...at(from));
  await page.mouse.down();
  await page.mouse.move(...at([(from[0] + to[0]) / 2, (from[1] + to[1]) / 2]));
  await page.mouse.move(...at(to));
  await page.mouse.up();
}

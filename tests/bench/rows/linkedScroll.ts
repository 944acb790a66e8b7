import { existsSync, mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { chromium, type Page } from 'playwright';
import { ctSlice } from '../../corpus/ctSlice.js';
import { startShell } from '../../e2e/support/shell.js';
import type { Row } from '../row.js';

const BROWSER = process.env.DIPTYCH_BROWSER ?? '/usr/bin/chromium';
const SLICES = 60;

/** Linked scrolling of 512² and 1024² plates in a headless browser: the 95th percentile of the frame times. */
export async function linkedScroll(): Promise<readonly Row[]> {
  if (!existsSync(BROWSER)) return [];
  const folder = mkdtempSync(join(tmpdir(), 'diptych-scroll-'));
  try {
    const rows: Row[] = [];
    for (const matrix of [512, 1024]) rows.push(await scrollRow(folder, matrix));
    return rows;
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

async function scrollRow(folder: string, matrix: number): Promise<Row> {
  const study = join(folder, String(matrix));
  mkdirSync(study);
  for (const [series, number] of [
    ['2.25.9.1', 3],
    ['2.25.9.2', 4],
  ] as const) {
    for (let slice = 0; slice < SLICES; slice++) {
      const stored = Int16Array.from(
        { length: matrix * matrix },
        (_, i) => 1000 + ((i * 31 + slice * 977) % 900),
      );
      const change = { 2097169: { tag: 0x00200011, vr: 'IS', value: number } } as const;
      const options = { rows: matrix, columns: matrix, stored, series, number: slice, change };
      writeFileSync(join(study, `${number}-${slice}`), ctSlice({ ...options, z: slice }));
    }
  }
  const shell = await startShell(join(folder, `home-${matrix}`), study);
  const browser = await chromium.launch({ executablePath: BROWSER, args: ['--no-sandbox'] });
  try {
    const page = await browser.newPage({ viewport: { width: 1440, height: 900 } });
    await page.goto(shell.address);
    const measured = await scrollFrames(page);
    return {
      work: `linked scroll of two plates of ${matrix}², 95th percentile of frames`,
      measured,
      unit: 'ms',
      // Half a millisecond for the clock of the display, whose frames are 16.6 to 16.8 ms when nothing is drawn.
      budget: 17.2,
    };
  } finally {
    await browser.close();
    await shell.stop();
  }
}

/** Turns the wheel once a frame through the whole stack and back, and takes the time of each frame. */
async function scrollFrames(page: Page): Promise<number> {
  await page.getByRole('button', { name: 'I have read this and accept it' }).click();
  await page.locator('[data-plate=sharp][aria-label*="slice"]').waitFor();
  // Scrolling is measured when all is read and compared: both take processors of their own for a while.
  await page.waitForTimeout(1500);
  await page.waitForFunction(
    () =>
      !/measur/i.test(document.querySelector('[data-panel=hinge] .verdict')?.textContent ?? '') &&
      !/\d+ of \d+/.test(document.querySelector('[data-panel=status]')?.textContent ?? ''),
    undefined,
    { timeout: 60_000 },
  );
  await page.waitForTimeout(1000);
  return page.evaluate(
    (slices) =>
      new Promise<number>((done) => {
        const plate = document.querySelector('[data-plate=soft]');
        const times: number[] = [];
        let last = 0;
        let frame = 0;
        const step = (now: number): void => {
          if (frame > 10) times.push(now - last);
          last = now;
          const down = Math.floor(frame / (slices / 2)) % 2 === 0;
          plate?.dispatchEvent(
            new WheelEvent('wheel', { deltaY: down ? 60 : -60, bubbles: true, cancelable: true }),
          );
          frame++;
          if (frame < 310) requestAnimationFrame(step);
          else done(times.sort((a, b) => a - b)[Math.floor(times.length * 0.95)] ?? Number.NaN);
        };
        requestAnimationFrame(step);
      }),
    SLICES,
  );
}

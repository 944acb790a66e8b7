import { existsSync, mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { type Browser, chromium, type Page } from 'playwright';
import { startShell } from '../../e2e/support/shell.js';
import { writePairStudy } from '../pairStudy.js';
import type { Row } from '../row.js';

const BROWSER = process.env.DIPTYCH_BROWSER ?? '/usr/bin/chromium';
const SLICES = 500;

/**
 * Time from the page's asking for the folder's index until both plates have pixels, in a headless browser: with
 * an empty cache of headers, and with the cache that the first opening left. The files lie in the system's file
 * cache, as they do after they were copied.
 */
export async function firstImage(): Promise<readonly Row[]> {
  if (!existsSync(BROWSER)) return [];
  const folder = mkdtempSync(join(tmpdir(), 'diptych-first-'));
  const browser = await chromium.launch({ executablePath: BROWSER, args: ['--no-sandbox'] });
  try {
    const study = join(folder, 'study');
    writePairStudy(study, SLICES, 512);
    // The cache keeps no file that changed in the last two seconds.
    await new Promise((resolve) => setTimeout(resolve, 2500));
    const home = join(folder, 'home');
    const unread = await open(browser, home, study);
    const again = await open(browser, home, study);
    return [
      row('first paired image, 2 × 500 slices of 512²', unread),
      row('first paired image, 2 × 500 slices of 512², folder read before', again),
    ];
  } finally {
    await browser.close();
    rmSync(folder, { recursive: true, force: true });
  }
}

function row(work: string, { ms, read }: Opened): Row {
  if (read >= 2 * SLICES) throw new Error('the first image came after all others');
  return {
    work: `${work}; ${read} slices were read by then`,
    measured: ms,
    unit: 'ms',
    budget: 1000,
  };
}

interface Opened {
  readonly ms: number;
  /** Slices that had been read when both plates were drawn. */
  readonly read: number;
}

async function open(browser: Browser, home: string, study: string): Promise<Opened> {
  mkdirSync(join(home, 'config'), { recursive: true });
  writeFileSync(
    join(home, 'config', 'settings.json'),
    JSON.stringify({ cautionsAccepted: true, theme: 'dark', letterKeys: true, reader: '' }),
  );
  const shell = await startShell(home, study);
  const context = await browser.newContext({ viewport: { width: 1440, height: 900 } });
  try {
    const page = await context.newPage();
    await page.addInitScript(watchPlates);
    await page.goto(shell.address);
    await page.waitForFunction(() => 'bothDrawn' in window, undefined, { timeout: 60_000 });
    return await timesOf(page);
  } finally {
    await context.close();
    await shell.stop();
  }
}

/** Runs in the page before its own program: notes when both plates have pixels in their middle. */
function watchPlates(): void {
  const isDrawn = (kernel: string): boolean => {
    const canvas = document.querySelector<HTMLCanvasElement>(`[data-plate=${kernel}] canvas`);
    if (canvas === null || canvas.width === 0) return false;
    // In a copy: reading from the canvas itself would take it from the graphics processor.
    const copy = new OffscreenCanvas(1, 1).getContext('2d');
    copy?.drawImage(canvas, canvas.width >> 1, canvas.height >> 1, 1, 1, 0, 0, 1, 1);
    return (copy?.getImageData(0, 0, 1, 1).data[0] ?? 0) > 16;
  };
  // Each message of a worker is the answer to one slice.
  let read = 0;
  const Native = Worker;
  window.Worker = class extends Native {
    constructor(...given: ConstructorParameters<typeof Worker>) {
      super(...given);
      if (!String(given[0]).includes('decode.worker')) return;
      this.addEventListener('message', () => {
        read += 1;
      });
    }
  };
  const look = (): void => {
    if (!isDrawn('soft') || !isDrawn('sharp')) {
      requestAnimationFrame(look);
      return;
    }
    const bothDrawn = { at: performance.now(), read };
    Object.assign(window, { bothDrawn });
  };
  requestAnimationFrame(look);
}

async function timesOf(page: Page): Promise<Opened> {
  const found = await page.evaluate(() => {
    const index = performance
      .getEntriesByType('resource')
      .find(({ name }) => /\/api\/folders\/[^/]+\/index/.test(name));
    const { bothDrawn } = window as unknown as { bothDrawn: { at: number; read: number } };
    return { asked: index?.startTime, ...bothDrawn };
  });
  if (found.asked === undefined) throw new Error('the page never asked for the index');
  return { ms: found.at - found.asked, read: found.read };
}

import { existsSync, mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { type Browser, chromium, type Page } from 'playwright';
import { startShell } from '../../e2e/support/shell.js';
import { pairBytes, writePairStudy } from '../pairStudy.js';
import type { Row } from '../row.js';

const BROWSER = process.env.DIPTYCH_BROWSER ?? '/usr/bin/chromium';
const SLICES = 500;
const MATRIX = 512;
const MEGABYTE = 1e6;

/**
 * Memory of the page and of the host with a whole pair read, as Linux counts it (proc(5)): of the renderer
 * process what is its own (RssAnon) and what it shares (RssShmem), without the browser's program file
 * (RssFile); of the host the most it ever had resident (VmHWM), program file and all.
 */
export async function memory(): Promise<readonly Row[]> {
  if (!existsSync(BROWSER) || process.platform !== 'linux') return [];
  const folder = mkdtempSync(join(tmpdir(), 'diptych-memory-'));
  const browser = await chromium.launch({ executablePath: BROWSER, args: ['--no-sandbox'] });
  try {
    const study = join(folder, 'study');
    writePairStudy(study, SLICES, MATRIX);
    const shell = await startShell(join(folder, 'home'), study);
    try {
      const page = await browser.newPage({ viewport: { width: 1440, height: 900 } });
      await page.addInitScript(countSlices);
      await page.goto(shell.address);
      await allRead(page);
      const renderer = await pageKilobytes(browser);
      const host = kilobytesOf(hostProcess(), 'VmHWM');
      const stored = pairBytes(SLICES, MATRIX);
      return [
        {
          work: `memory of the page, 2 × ${SLICES} slices of ${MATRIX}² (${stored / MEGABYTE} MB of pixels)`,
          measured: (renderer * 1024) / MEGABYTE,
          unit: 'MB',
          budget: (1.4 * stored) / MEGABYTE,
        },
        {
          work: `memory of the host, 2 × ${SLICES} slices of ${MATRIX}², at its most`,
          measured: (host * 1024) / MEGABYTE,
          unit: 'MB',
          budget: 250,
        },
      ];
    } finally {
      await shell.stop();
    }
  } finally {
    await browser.close();
    rmSync(folder, { recursive: true, force: true });
  }
}

/** Runs in the page before its own program: counts the answers of the workers, one for each slice. */
function countSlices(): void {
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

async function allRead(page: Page): Promise<void> {
  await page.waitForFunction(
    (slices) => (window as unknown as { counted: { slices: number } }).counted.slices === slices,
    2 * SLICES,
    { timeout: 180_000 },
  );
  // The workers have ended; what they left behind is collected in the next seconds.
  await page.waitForTimeout(5000);
}

/** Of the renderer that holds the page: the largest one, for a browser keeps a spare one. */
async function pageKilobytes(browser: Browser): Promise<number> {
  const session = await browser.newBrowserCDPSession();
  const { processInfo } = await session.send('SystemInfo.getProcessInfo');
  const renderers = processInfo.filter(({ type }) => type === 'renderer');
  return Math.max(
    ...renderers.map(({ id }) => kilobytesOf(id, 'RssAnon') + kilobytesOf(id, 'RssShmem')),
  );
}

/** The browser shell that this program started. */
function hostProcess(): number {
  for (const name of readdirSync('/proc')) {
    if (!/^\d+$/.test(name) || !existsSync(`/proc/${name}/status`)) continue;
    const isOurs = /^PPid:\s+(\d+)$/m.exec(statusOf(Number(name)))?.[1] === String(process.pid);
    if (isOurs && readFileSync(`/proc/${name}/cmdline`, 'utf8').includes('loopback.js')) {
      return Number(name);
    }
  }
  throw new Error('the shell is not among the processes');
}

function kilobytesOf(process: number, field: string): number {
  const found = new RegExp(`^${field}:\\s+(\\d+) kB$`, 'm').exec(statusOf(process))?.[1];
  if (found === undefined) throw new Error(`no ${field} of process: ${process}`);
  return Number(found);
}

function statusOf(process: number): string {
  return readFileSync(`/proc/${process}/status`, 'utf8');
}

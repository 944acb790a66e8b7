// Programs outside the package registry of Node: fetched from Debian when that is possible, else named.
import { spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import { isInstalled, run, say } from './project.mjs';

const BROWSERS = [
  'chromium',
  'chromium-browser',
  'google-chrome',
  'microsoft-edge',
  'brave-browser',
];

/** What the reference tests compare with: independent readers and writers of DICOM, and numerics. */
const REFERENCE_TOOLS = [
  { package: 'dcmtk', there: () => isInstalled('dcmdump') },
  { package: 'libgdcm-tools', there: () => isInstalled('gdcmconv') },
  { package: 'poppler-utils', there: () => isInstalled('pdftotext') },
  { package: 'dicom3tools', there: () => isInstalled('dciodvfy') },
  { package: 'poppler-utils', there: () => isInstalled('pdftotext') },
  { package: 'python3-pydicom', there: () => pythonHas('pydicom') },
  { package: 'python3-numpy', there: () => pythonHas('numpy') },
  { package: 'python3-scipy', there: () => pythonHas('scipy') },
  { package: 'python3-skimage', there: () => pythonHas('skimage') },
];

function pythonHas(module) {
  if (!existsSync('/usr/bin/python3')) return false;
  const found = `import importlib.util, sys; sys.exit(importlib.util.find_spec("${module}") is None)`;
  return spawnSync('/usr/bin/python3', ['-c', found], { stdio: 'ignore' }).status === 0;
}

export async function ensureBrowser() {
  if (process.platform !== 'linux' || BROWSERS.some(isInstalled)) return;
  await installFromDebian(['chromium'], 'a browser of the Chromium family');
}

export async function ensureReferenceTools() {
  await ensureBrowser();
  const missing = REFERENCE_TOOLS.filter((tool) => !tool.there()).map((tool) => tool.package);
  if (missing.length > 0) await installFromDebian(missing, 'the reference tools of the tests');
}

async function installFromDebian(packages, what) {
  const root = process.getuid?.() === 0;
  const sudo = !root && spawnSync('sudo', ['-n', 'true'], { stdio: 'ignore' }).status === 0;
  if (!isInstalled('apt-get') || (!root && !sudo)) {
    say(`Please install ${what}: ${packages.join(' ')} (the names of Debian's packages).`);
    return;
  }
  say(`Installing ${packages.join(' ')} …`);
  const apt = async (...args) => {
    const line = ['apt-get', '-qq', '-o', 'DPkg::Lock::Timeout=300', ...args];
    const [command, ...rest] = sudo ? ['sudo', '-n', ...line] : line;
    return run(command, rest, { env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' } });
  };
  await apt('update');
  if ((await apt('install', '-y', '--no-install-recommends', ...packages)) !== 0) {
    say(`These could not be installed: ${packages.join(' ')}. Tests that need them say so.`);
  }
}

import { spawnSync } from 'node:child_process';

const PYTHON = '/usr/bin/python3';

/** True when Debian's Python has the modules; a test that needs them says so when it is skipped. */
export function pythonHas(...modules: readonly string[]): boolean {
  const found = modules.map((name) => `importlib.util.find_spec("${name}") is None`).join(' or ');
  const code = `import importlib.util, sys; sys.exit(${found})`;
  return spawnSync(PYTHON, ['-c', code], { stdio: 'ignore' }).status === 0;
}

/** Runs a Python program and reads the one JSON document that it prints. */
export function pythonJson(program: string, args: readonly string[] = []): unknown {
  const run = spawnSync(PYTHON, ['-c', program, ...args], {
    encoding: 'utf8',
    maxBuffer: 64 * 1024 * 1024,
  });
  if (run.status !== 0) throw new Error(`python failed: ${run.stderr}`);
  return JSON.parse(run.stdout);
}

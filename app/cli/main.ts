import { setMaxListeners } from 'node:events';
import { run } from './run.js';

const interruption = new AbortController();
// Each task of a worker pool listens, so many listeners are no leak here.
setMaxListeners(0, interruption.signal);
// The first interrupt lets the work stop in order; the second one ends the process at once.
process.once('SIGINT', () => interruption.abort());
process.stdout.on('error', (error: NodeJS.ErrnoException) => {
  // The reader of a pipe went away, as `head` does: nothing is wrong.
  if (error.code !== 'EPIPE') throw error;
  process.exit();
});

process.exitCode = await run(process.argv.slice(2), {
  out: (text) => process.stdout.write(text),
  err: (text) => process.stderr.write(text),
  // npm runs scripts in the package's folder; relative paths are meant from where the user is.
  cwd:
    process.env.npm_lifecycle_event === 'diptych'
      ? (process.env.INIT_CWD ?? process.cwd())
      : process.cwd(),
  signal: interruption.signal,
  watched: process.stderr.isTTY === true,
});

import { parseArgs } from 'node:util';
import { type Result, refuse, success } from '../../core/result.js';

/** How the browser shell was started. */
export interface LoopbackArguments {
  readonly folder?: string;
  readonly window: boolean;
  /** 0 for any free port. */
  readonly port: number;
  readonly help: boolean;
}

export const USAGE = `Usage: diptych-loopback [FOLDER] [--no-window]

Serves Diptych to a browser of this machine and opens it as a window of its own.
  FOLDER        folder to open; without one, the synthetic demonstration study
  --no-window   only serve, and print the address; so too when there is no display
  --port N      port to serve on, for tests; by default any that is free
  --help        this text`;

/** Reads the command line of the browser shell. */
export function parseArguments(words: readonly string[]): Result<LoopbackArguments> {
  let parsed: ReturnType<typeof parse>;
  try {
    parsed = parse(words);
  } catch (error) {
    if (!(error instanceof TypeError)) throw error;
    return refuse('usage', `${error.message}\n\n${USAGE}`);
  }
  const { values, positionals } = parsed;
  const port = Number(values.port);
  if (positionals.length > 1) return refuse('usage', `Give one folder.\n\n${USAGE}`);
  if (!/^\d+$/.test(values.port) || port > 65_535) {
    return refuse('usage', `Not a port: ${values.port}\n\n${USAGE}`);
  }
  const [folder] = positionals;
  return success({
    ...(folder === undefined ? {} : { folder }),
    window: !values['no-window'],
    port,
    help: values.help,
  });
}

function parse(words: readonly string[]) {
  return parseArgs({
    args: [...words],
    allowPositionals: true,
    options: {
      'no-window': { type: 'boolean', default: false },
      port: { type: 'string', default: '0' },
      help: { type: 'boolean', default: false },
    },
  });
}

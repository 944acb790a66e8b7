import { visibleText } from '../../core/format/index.js';
import type { Refusal, Result } from '../../core/result.js';
import { cancelled } from '../host/library/cancelled.js';
import { programVersion } from '../host/version.js';
import { toolHelp, verbHelp } from './help.js';
import type { CliIo } from './io.js';
import { jsonText } from './jsonText.js';
import { nearest } from './nearest.js';
import { progressLine } from './progressLine.js';
import { readArguments } from './readArguments.js';
import type { Verb, VerbOutcome } from './verb.js';

import { exportVerb } from './verbs/export.js';
import { indexVerb } from './verbs/index.js';
import { measureVerb } from './verbs/measure.js';
import { pairsVerb } from './verbs/pairs.js';
import { phantomVerb } from './verbs/phantom.js';
import { recheckVerb } from './verbs/recheck.js';

export const VERBS: readonly Verb[] = [
  indexVerb,
  pairsVerb,
  measureVerb,
  recheckVerb,
  exportVerb,
  phantomVerb,
];

/** Exit code of a process that was interrupted from the keyboard: 128 + SIGINT, as shells count. */
const INTERRUPTED = 130;

/**
 * The command line without its process: prints through `io` and returns the exit code. A mistake of the user or of
 * the input is one sentence on standard error, and with --json also the one document on standard output.
 */
export async function run(argv: readonly string[], io: CliIo): Promise<number> {
  const [name, ...rest] = argv;
  if (name === undefined || name === '--help' || name === '-h' || name === 'help') {
    const help = toolHelp(VERBS, programVersion());
    if (name === undefined) io.err(help);
    else io.out(help);
    return name === undefined ? 2 : 0;
  }
  if (name === '--version') {
    io.out(`${programVersion()}\n`);
    return 0;
  }
  const json = argv.includes('--json');
  const verb = VERBS.find((known) => known.name === name);
  if (verb === undefined) return refused(unknownVerb(name), io, json);
  const given = readArguments(verb, rest);
  if (!given.ok) return refused(given.refusal, io, json);
  if (given.value.switches.has('help')) {
    io.out(verbHelp(verb));
    return 0;
  }
  const progress = progressLine(io);
  const outcome = await untilAborted(
    verb.run(given.value, {
      cwd: io.cwd,
      say(text) {
        progress.clear();
        io.err(`${text}\n`);
      },
      job: {
        signal: io.signal,
        onProgress: progress.show,
        ...(io.threads === undefined ? {} : { threads: io.threads }),
      },
    }),
    io.signal,
  );
  progress.clear();
  if (!outcome.ok) return refused(outcome.refusal, io, json);
  io.out(json ? jsonText(outcome.value.document) : outcome.value.text);
  return outcome.value.exitCode;
}

/** Work that was interrupted may reject; that is no mistake of the program. Every other error is thrown on. */
async function untilAborted(
  work: Promise<Result<VerbOutcome>>,
  signal: AbortSignal,
): Promise<Result<VerbOutcome>> {
  try {
    return await work;
  } catch (error) {
    if (signal.aborted) return cancelled();
    throw error;
  }
}

function refused({ code, text }: Refusal, io: CliIo, json: boolean): number {
  io.err(`${visibleText(text)}\n`);
  if (json) io.out(jsonText({ error: { code, text } }));
  return io.signal.aborted ? INTERRUPTED : 2;
}

function unknownVerb(name: string): Refusal {
  const near = nearest(
    name,
    VERBS.map((verb) => verb.name),
  );
  const hint = near === undefined ? 'See: diptych --help' : `Did you mean ${near}?`;
  return { code: 'bad-usage', text: `There is no verb “${name}”. ${hint}` };
}

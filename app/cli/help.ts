import { COMMON_OPTIONS } from './readArguments.js';
import type { Verb, VerbOption } from './verb.js';

/** Help for the whole tool. */
export function toolHelp(verbs: readonly Verb[], version: string): string {
  const lines = verbs.map((verb) => [usage(verb), verb.summary] as const);
  return `Diptych ${version}: measures cardiac CT on two reconstructions of one acquisition.

Usage: diptych VERB … [--json]

${columns(lines)}

Every verb takes --json (one JSON document on standard output, messages on standard error)
and --help. Exit code: 0 done; 1 done, and something that you asked about does not hold;
2 bad usage or input; 130 interrupted.

A measuring aid under investigation: not a medical device, not for diagnosis or treatment.
`;
}

/** Help for one verb. */
export function verbHelp(verb: Verb): string {
  const options: readonly VerbOption[] = [...verb.options, ...COMMON_OPTIONS];
  const lines = options.map(
    ({ name, value, help }) =>
      [`--${name}${value === undefined ? '' : ` ${value}`}`, help] as const,
  );
  return `Usage: diptych ${usage(verb)}

${verb.summary}.
${verb.details}

${columns(lines)}
`;
}

function usage({ name, operands, options }: Verb): string {
  const shown = options.map(({ name: option, value, required }) => {
    const text = `--${option}${value === undefined ? '' : ` ${value}`}`;
    return required ? text : `[${text}]`;
  });
  return [name, ...operands, ...shown].join(' ');
}

function columns(lines: readonly (readonly [string, string])[]): string {
  const width = Math.max(...lines.map(([left]) => left.length));
  if (width > 44) return lines.map(([left, right]) => `  ${left}\n      ${right}`).join('\n');
  return lines.map(([left, right]) => `  ${left.padEnd(width)}  ${right}`).join('\n');
}

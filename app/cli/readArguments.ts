import { parseArgs } from 'node:util';
import { visibleText } from '../../core/format/index.js';
import { type Result, refuse, success } from '../../core/result.js';
import { nearest } from './nearest.js';
import type { Verb, VerbArguments } from './verb.js';

/** Options that every verb takes. */
export const COMMON_OPTIONS = [
  { name: 'json', help: 'print one JSON document on standard output' },
  { name: 'help', help: 'show this help' },
] as const;

/** Checks what stands after a verb. Every mistake is a sentence that names it, with the nearest known word. */
export function readArguments(verb: Verb, argv: readonly string[]): Result<VerbArguments> {
  const known = [...verb.options, ...COMMON_OPTIONS];
  const options = Object.fromEntries(
    known.map((option) => [
      option.name,
      { type: 'value' in option ? ('string' as const) : ('boolean' as const) },
    ]),
  );
  const { tokens } = parseArgs({
    args: [...argv],
    options,
    strict: false,
    allowPositionals: true,
    tokens: true,
  });
  const operands: string[] = [];
  const values: Record<string, string> = {};
  const switches = new Set<string>();
  for (const token of tokens) {
    if (token.kind === 'positional') operands.push(token.value);
    if (token.kind !== 'option') continue;
    const option = known.find(({ name }) => name === token.name);
    if (option === undefined) return unknownOption(verb, token.rawName, known);
    if (!('value' in option)) {
      if (token.value !== undefined) return bad(verb, `--${option.name} takes no value`);
      switches.add(option.name);
      continue;
    }
    // A value that begins with '-' is an option that was meant, unless it is written as --name=value.
    const missing =
      token.value === undefined || (!token.inlineValue && /^--?[a-z]/i.test(token.value));
    if (missing)
      return bad(verb, `--${option.name} needs a value: --${option.name} ${option.value}`);
    if (option.name in values) return bad(verb, `--${option.name} is given twice`);
    values[option.name] = token.value ?? '';
  }
  if (switches.has('help')) return success({ operands, values, switches });
  return complete(verb, { operands, values, switches });
}

function complete(verb: Verb, given: VerbArguments): Result<VerbArguments> {
  const missing = verb.operands[given.operands.length];
  if (missing !== undefined) return bad(verb, `${missing} is missing`);
  const extra = given.operands[verb.operands.length];
  if (extra !== undefined) return bad(verb, `“${visibleText(extra)}” is one thing too many`);
  for (const { name, value, required } of verb.options) {
    if (required && given.values[name] === undefined) {
      return bad(verb, `--${name} ${value ?? ''} is missing`);
    }
    if (given.values[name] === '') return bad(verb, `--${name} is empty`);
  }
  return success(given);
}

function unknownOption(
  verb: Verb,
  rawName: string,
  known: readonly { readonly name: string }[],
): Result<never> {
  const near = nearest(
    rawName.replace(/^-+/, ''),
    known.map(({ name }) => name),
  );
  const hint = near === undefined ? '' : ` Did you mean --${near}?`;
  return bad(verb, `there is no option ${visibleText(rawName)}.${hint}`);
}

function bad(verb: Verb, what: string): Result<never> {
  const end = /[.?]$/.test(what) ? '' : '.';
  return refuse('bad-usage', `${verb.name}: ${what}${end} See: diptych ${verb.name} --help`);
}

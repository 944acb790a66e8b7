import type { z } from 'zod';

type Issue = z.core.$ZodIssue;

/** 'regions[0].shape.radiiMm[1]': where in a document something is, as one would write it. */
export function fieldPath(path: readonly PropertyKey[]): string {
  return path.reduce<string>((text, part) => {
    if (typeof part === 'number') return `${text}[${part}]`;
    return text === '' ? String(part) : `${text}.${String(part)}`;
  }, '');
}

/** The first problems of a document in plain words, each with its field. */
export function fieldProblems(error: z.ZodError, most = 3): string {
  const lines = error.issues.slice(0, most).map((issue) => {
    const where = fieldPath(issue.path);
    return where === '' ? problem(issue) : `${where} ${problem(issue)}`;
  });
  const more = error.issues.length - lines.length;
  return `${lines.join('; ')}${more > 0 ? `; and ${more} more` : ''}.`;
}

function problem(issue: Issue): string {
  switch (issue.code) {
    case 'invalid_type':
      return issue.input === undefined
        ? 'is missing'
        : `must be ${A_TYPE[issue.expected] ?? issue.expected}`;
    case 'invalid_value':
      return `must be ${issue.values.map((value) => JSON.stringify(value)).join(' or ')}`;
    case 'too_small':
      return tooSmall(issue);
    case 'too_big':
      return `has more than ${issue.maximum} ${ITEMS[issue.origin] ?? ''}`.trimEnd();
    case 'invalid_union':
      return 'must be one of the kinds that there are: "ellipse" or "outline"';
    default:
      return `is not as it should be (${issue.message})`;
  }
}

function tooSmall({ origin, minimum, inclusive }: Extract<Issue, { code: 'too_small' }>): string {
  const items = ITEMS[origin];
  if (items !== undefined) return `needs at least ${minimum} ${items}`;
  return inclusive ? `must be ${minimum} or more` : `must be greater than ${minimum}`;
}

const ITEMS: Readonly<Record<string, string>> = { array: 'entries', string: 'characters' };

const A_TYPE: Readonly<Record<string, string>> = {
  number: 'a number',
  int: 'a whole number',
  string: 'a text',
  boolean: 'true or false',
  array: 'a list',
  tuple: 'a list',
  object: 'an object',
};

import { type Result, refuse, success } from '../result.js';
import { fieldPath, fieldProblems } from './fieldProblem.js';
import { type Plan, PlanSchema } from './plan.js';

/** A plan, and the fields of it that this version does not know: they are told, since a misspelt one measures nothing. */
export interface ParsedPlan {
  readonly plan: Plan;
  readonly unknownFields: readonly string[];
}

/** Checks a plan as read from JSON. A field that is null counts as left out. */
export function parsePlan(json: unknown): Result<ParsedPlan> {
  const given = withoutNulls(json);
  if (!isRecord(given) || !('plan' in given)) {
    return refuse('not-a-plan', 'This is not a plan: it has no "plan": 1 at its top level.');
  }
  if (typeof given.plan === 'number' && given.plan > 1) {
    return refuse(
      'newer-plan',
      `The plan is of version ${given.plan}; this version of Diptych reads version 1. Use a newer Diptych.`,
    );
  }
  const parsed = PlanSchema.safeParse(given, { reportInput: true });
  return parsed.success
    ? success({ plan: parsed.data, unknownFields: unknownFields(given, parsed.data) })
    : refuse('broken-plan', `The plan can’t be read: ${fieldProblems(parsed.error)}`);
}

function unknownFields(
  given: unknown,
  known: unknown,
  path: readonly PropertyKey[] = [],
): string[] {
  if (Array.isArray(given) && Array.isArray(known)) {
    return given.flatMap((item, index) => unknownFields(item, known[index], [...path, index]));
  }
  if (!isRecord(given) || !isRecord(known)) return [];
  return Object.keys(given).flatMap((key) =>
    key in known
      ? unknownFields(given[key], known[key], [...path, key])
      : [fieldPath([...path, key])],
  );
}

function withoutNulls(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(withoutNulls);
  if (!isRecord(value)) return value;
  const kept = Object.entries(value).filter(([, field]) => field !== null);
  return Object.fromEntries(kept.map(([key, field]) => [key, withoutNulls(field)]));
}

function isRecord(value: unknown): value is Readonly<Record<string, unknown>> {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

import type { z } from 'zod';
import { Invalid, type FieldError } from './problems.ts';

type Place = 'body' | 'query';

/** Parses or throws `Invalid` with every fault at its place: `/a/0/b` in a body, `?name` in a query. */
export function validate<S extends z.ZodType>(schema: S, value: unknown, place: Place): z.output<S> {
  const parsed = schema.safeParse(value, { error: plainWords });
  if (parsed.success) return parsed.data;
  throw new Invalid(parsed.error.issues.flatMap((issue) => fieldErrors(issue, place)));
}

function fieldErrors(issue: z.core.$ZodIssue, place: Place): FieldError[] {
  if (issue.code === 'unrecognized_keys') {
    return issue.keys.map((key) => ({
      pointer: pointerTo([...issue.path, key], place),
      detail: 'There is no such field here.',
    }));
  }
  return [{ pointer: pointerTo(issue.path, place), detail: issue.message }];
}

function pointerTo(path: readonly PropertyKey[], place: Place): string {
  if (place === 'query') return `?${path.map(String).join('.')}`;
  return path.map((step) => `/${String(step).replaceAll('~', '~0').replaceAll('/', '~1')}`).join('');
}

/** Only where the schema itself says nothing better. */
function plainWords(issue: z.core.$ZodRawIssue): string | undefined {
  if (issue.input === undefined && issue.code === 'invalid_type') return 'Fill this in.';
  if (issue.code === 'invalid_type') return `This takes ${article(issue.expected)}.`;
  if (issue.code === 'invalid_value') return `Choose one of: ${issue.values.map(String).join(', ')}.`;
  if (issue.code === 'too_big' && issue.origin === 'string')
    return `Use at most ${String(issue.maximum)} characters.`;
  if (issue.code === 'too_big' && issue.origin === 'array')
    return `At most ${String(issue.maximum)} entries are taken.`;
  if (issue.code === 'too_big') return `Use at most ${String(issue.maximum)}.`;
  if (issue.code === 'too_small' && issue.origin === 'string') return 'Fill this in.';
  if (issue.code === 'too_small' && issue.origin === 'array') return 'Choose at least one.';
  if (issue.code === 'too_small') return `Use at least ${String(issue.minimum)}.`;
  if (issue.code === 'invalid_format' && issue.format === 'email')
    return 'Write a mail address, such as name@company.example.';
  if (issue.code === 'invalid_format' && issue.format === 'date') return 'Write a date as YYYY-MM-DD.';
  return undefined;
}

function article(expected: string): string {
  const words: Record<string, string> = {
    string: 'text',
    number: 'a number',
    int: 'a whole number',
    boolean: 'true or false',
    array: 'a list',
    object: 'an object',
    null: 'nothing',
  };
  return words[expected] ?? expected;
}

import { z } from 'zod';
import type { IssueList } from './issue-list.ts';
import type { RawRow } from './raw-row.ts';

const decimal = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i;

/** A number that may stand as text (CSV) or as a number (GeoJSON); everything but a plain decimal is refused. */
export function numeric<S extends z.ZodType>(schema: S) {
  return z.preprocess((value) => {
    if (value === null || value === undefined) return undefined;
    return typeof value === 'string' && decimal.test(value.trim()) ? Number(value) : value;
  }, schema);
}

/** A name that may stand as text or number; blanks around it do not count. */
export function text(maximumCount: number) {
  return z.preprocess(
    (value) => (typeof value === 'number' ? String(value) : (value ?? undefined)),
    z
      .string({ error: (issue) => (issue.input === undefined ? 'is required' : 'must be text') })
      .trim()
      .min(1, 'must not be empty')
      .regex(/^[^\p{Cc}\p{Cs}]*$/u, 'must not hold control characters')
      .max(maximumCount, `must be at most ${maximumCount} characters long`),
  );
}

/** One of a few words, in any case. */
export function word<const W extends readonly [string, ...string[]]>(words: W) {
  return z.preprocess(
    (value) => (typeof value === 'string' ? value.trim().toLowerCase() : (value ?? undefined)),
    z.enum(words, { error: () => `must be one of: ${words.join(', ')}` }),
  );
}

interface RowCheck<S extends z.ZodType> {
  readonly schema: S;
  /** What is allowed, for fields whose message alone does not say it. */
  readonly allowed: Readonly<Record<string, string>>;
}

/** The checked row, or null with one error a field. */
export function checkRow<S extends z.ZodType>(raw: RawRow, check: RowCheck<S>, issues: IssueList): z.infer<S> | null {
  const parsed = check.schema.safeParse(raw.values);
  if (parsed.success) return parsed.data;
  for (const issue of parsed.error.issues) {
    const field = String(issue.path[0] ?? '');
    const allowed = check.allowed[field];
    const message = `${field} ${issue.message}${allowed === undefined ? '' : `; allowed: ${allowed}`}.`;
    issues.addError({ row: raw.row, field, value: raw.values[field], message });
  }
  return null;
}

import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { aeolianAnswers, unansweredAeolian } from './aeolian-answers.ts';
import fixture from './fixtures/aeolian-checks.json' with { type: 'json' };

const checkSchema = z.strictObject({
  id: z.string(),
  topic: z.string(),
  what: z.string(),
  inputs: z.record(z.string(), z.number()),
  expected: z.number(),
  unit: z.string(),
  tolerance: z.number().positive(),
  toleranceReason: z.string().min(1),
  source: z.string().min(1),
  standing: z.enum(['published', 'closed form', 'common practice', 'from memory']),
});
const checks = z.array(checkSchema).parse(fixture);

describe('aeolian checks', () => {
  it('answers every check, or says why not', () => {
    const ids = checks.map((check) => check.id);
    expect(new Set(ids).size).toBe(ids.length);
    expect([...Object.keys(aeolianAnswers), ...Object.keys(unansweredAeolian)].sort()).toEqual([...ids].sort());
  });

  const answered = checks.filter((check) => !(check.id in unansweredAeolian));
  for (const check of answered) {
    const title = `${check.id} [${check.standing}; ${check.source}] within ${check.tolerance} ${check.unit}: ${check.toleranceReason}`;
    it(title, () => {
      const input = (name: string) => {
        const value = check.inputs[name];
        if (value === undefined) throw new Error(`${check.id} has no input ${name}`);
        return value;
      };
      const answer = aeolianAnswers[check.id]?.(input) ?? NaN;
      expect(Math.abs(answer - check.expected), `${check.what}: ${answer}`).toBeLessThanOrEqual(check.tolerance);
    });
  }

  for (const [id, reason] of Object.entries(unansweredAeolian)) it.skip(`${id}: ${reason}`, () => undefined);
});

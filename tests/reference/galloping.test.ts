import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { EngineInputError, gallopingOnset, symmetricModeRatio, twoLoopEllipse } from '#shared/engine/index.ts';
import fixture from './fixtures/galloping-checks.json' with { type: 'json' };
import { gallopingAnswers } from './galloping-answers.ts';

const checkSchema = z.strictObject({
  id: z.string(),
  topic: z.string(),
  what: z.string(),
  inputs: z.record(z.string(), z.number()),
  expected: z.union([z.number(), z.array(z.number())]),
  unit: z.string(),
  tolerance: z.number().positive(),
  toleranceReason: z.string().min(1),
  source: z.string().min(1),
  standing: z.enum(['published', 'closed form', 'common practice', 'from memory']),
});
const checks = z.array(checkSchema).parse(fixture);

describe('galloping checks', () => {
  for (const check of checks) {
    const title = `${check.id} [${check.standing}; ${check.source}] within ${check.tolerance} ${check.unit}`;
    const answer = gallopingAnswers.find(([pattern]) => pattern.test(check.id))?.[1];
    if (answer === undefined) {
      it.skip(`${title}: the engine does not compute this`, () => undefined);
      continue;
    }
    it(title, () => {
      const input = (name: string) => {
        const value = check.inputs[name];
        if (value === undefined) throw new Error(`${check.id} has no input ${name}`);
        return value;
      };
      const value = answer(input);
      const expected = typeof check.expected === 'number' ? check.expected : NaN;
      expect(Math.abs(value - expected), `${check.what}: ${value}`).toBeLessThanOrEqual(check.tolerance);
    });
  }

  it('answers as many checks as it says', () => {
    const answered = checks.filter(({ id }) => gallopingAnswers.some(([pattern]) => pattern.test(id)));
    expect(answered).toHaveLength(35);
  });
});

describe('galloping limits', () => {
  const wire = {
    massKgPerM: 2.5,
    frequencyHz: 0.45,
    dampingRatio: 0.004,
    airDensityKgPerM3: 1.25,
    referenceLengthM: 0.04,
    liftSlopeCoef: -2.2,
    dragCoef: 1.1,
  };

  it('is stable where drag outweighs the falling lift', () => {
    expect(gallopingOnset({ ...wire, dragCoef: 2.2 }).outcome).toBe('stable');
    expect(gallopingOnset({ ...wire, dragCoef: 2.1999 }).outcome).toBe('unstable');
  });

  it('tends to the string in a taut span and to tan u = u in a stiff one', () => {
    expect(symmetricModeRatio(1e-6, 1)).toBeCloseTo(1, 6);
    expect(symmetricModeRatio(1e12, 1)).toBeCloseTo(2.860593, 5);
  });

  it('tends to 1 ft + S/√8 in a flat span of two loops', () => {
    expect(twoLoopEllipse(1000, 0.1).majorAxisM).toBeCloseTo(0.3048 + 0.1 / Math.sqrt(8), 6);
  });

  it('names what it refuses', () => {
    expect(() => gallopingOnset({ ...wire, massKgPerM: 0 })).toThrow(EngineInputError);
    expect(() => gallopingOnset({ ...wire, massKgPerM: 0 })).toThrow('massKgPerM');
  });
});

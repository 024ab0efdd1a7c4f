import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { EngineInputError, catenary, rulingSpan, stateChange } from '#shared/engine/index.ts';
import fixture from './fixtures/statics-checks.json' with { type: 'json' };
import { staticsAnswers, unansweredStatics } from './statics-answers.ts';

const checkSchema = z.strictObject({
  id: z.string(),
  topic: z.string(),
  what: z.string(),
  inputs: z.record(z.string(), z.number()),
  expected: z.union([z.number(), z.array(z.number())]),
  unit: z.string(),
  tolerance: z.number().nonnegative(),
  toleranceReason: z.string().min(1),
  source: z.string().min(1),
  standing: z.enum(['published', 'closed form', 'common practice', 'from memory']),
});
const checks = z.array(checkSchema).parse(fixture);

describe('statics checks', () => {
  for (const check of checks) {
    const title = `${check.id} [${check.standing}; ${check.source}] within ${check.tolerance} ${check.unit}`;
    const answer = staticsAnswers.find(([pattern]) => pattern.test(check.id))?.[1];
    const reason = unansweredStatics.find(([pattern]) => pattern.test(check.id))?.[1];
    if (reason !== undefined) {
      it.skip(`${title}: ${reason}`, () => undefined);
      continue;
    }
    it(title, () => {
      const input = (name: string) => {
        const value = check.inputs[name];
        if (value === undefined) throw new Error(`${check.id} has no input ${name}`);
        return value;
      };
      if (answer === undefined) throw new Error(`${check.id} is neither answered nor listed as unanswered`);
      const found = [answer(input)].flat();
      const expected = [check.expected].flat();
      expect(found).toHaveLength(expected.length);
      found.forEach((value, index) => {
        const error = Math.abs(value - (expected[index] ?? NaN));
        expect(error, `${check.what}: ${value}`).toBeLessThanOrEqual(check.tolerance);
      });
    });
  }
});

const spans = fc.record({
  lengthM: fc.double({ min: 50, max: 1500, noNaN: true }),
  riseM: fc.double({ min: -200, max: 200, noNaN: true }),
  tensionN: fc.double({ min: 5000, max: 60000, noNaN: true }),
  weightNPerM: fc.double({ min: 2, max: 40, noNaN: true }),
});

describe('catenary', () => {
  it('has the length of its arc summed from short chords', () => {
    const span = { lengthM: 300, riseM: 40, tensionN: 12000, weightNPerM: 15.966 };
    const { lowPointM, wireLengthM } = catenary(span);
    const c = span.tensionN / span.weightNPerM;
    const stepCount = 20000;
    const stepM = span.lengthM / stepCount;
    let sumM = 0;
    for (let index = 0; index < stepCount; index += 1) {
      const height = (x: number) => c * Math.cosh((x - lowPointM) / c);
      sumM += Math.hypot(stepM, height((index + 1) * stepM) - height(index * stepM));
    }
    // Chords are short of the arc by the square of the step over the radius: 1e-10 of the length here.
    expect(Math.abs(sumM - wireLengthM)).toBeLessThan(1e-6);
  });

  it('gives the mirrored result for the mirrored span', () => {
    fc.assert(
      fc.property(spans, (span) => {
        const one = catenary(span);
        const other = catenary({ ...span, riseM: -span.riseM });
        expect(other.sagM / one.sagM).toBeCloseTo(1, 6);
        expect(other.endTensionsN[0] / one.endTensionsN[1]).toBeCloseTo(1, 9);
        expect(one.sagM).toBeGreaterThan(0);
      }),
    );
  });

  it('names what it refuses', () => {
    const refused = () => catenary({ lengthM: 300, tensionN: NaN, weightNPerM: 16 });
    expect(refused).toThrow(EngineInputError);
    expect(refused).toThrow('tensionN');
  });
});

describe('state change', () => {
  const base = {
    rulingSpanM: 300,
    axialStiffnessN: 35e6,
    expansionPerK: 1.9e-5,
    from: { tensionN: 28000, weightNPerM: 16, temperatureK: 288 },
  };
  const tension = (temperatureK: number, creepRatio: number) => {
    const result = stateChange({ ...base, to: { weightNPerM: 16, temperatureK, creepRatio } });
    if (result.outcome !== 'steady') throw new Error(result.outcome);
    return result.tensionN;
  };

  it('slackens when warmer, and creep acts as warmth', () => {
    const temperature = fc.double({ min: 233, max: 393, noNaN: true });
    fc.assert(
      fc.property(temperature, (temperatureK) => {
        expect(tension(temperatureK + 5, 0)).toBeLessThan(tension(temperatureK, 0));
        expect(tension(temperatureK, 1.9e-4) / tension(temperatureK + 10, 0)).toBeCloseTo(1, 9);
      }),
    );
  });

  it('has no ruling span of no spans', () => {
    expect(() => rulingSpan([])).toThrow(EngineInputError);
  });
});

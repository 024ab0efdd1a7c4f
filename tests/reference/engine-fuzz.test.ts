import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { z } from 'zod';
import { damperInputSchema, endInputSchema, spanInputSchema, wavesInputSchema } from '#shared/contract/engine.ts';
import {
  assessSpanWire,
  damperCommand,
  endCommand,
  EngineInputError,
  spanCommand,
  wavesCommand,
  type SpanWireCase,
} from '#shared/engine/index.ts';
import { aBasis } from './engine-cases.ts';

/** Log-uniform between two positive bounds, ends included: extremes come as often as the middle. */
const log = (min: number, max: number) =>
  fc.oneof(
    {
      weight: 8,
      arbitrary: fc
        .double({ min: Math.log(min), max: Math.log(max), noNaN: true })
        .map((at) => Math.min(Math.max(Math.exp(at), min), max)),
    },
    { weight: 1, arbitrary: fc.constantFrom(min, max) },
  );
const between = (min: number, max: number) => fc.double({ min, max, noNaN: true });

const wire = fc.record({
  diameterM: log(0.001, 0.2),
  massKgPerM: log(0.005, 50),
  ratedStrengthN: log(100, 5e6),
  bendingStiffnessMinNm2: log(1e-4, 1e6),
  outerStrandDiameterM: log(1e-4, 0.2),
  outerStrandModulusPa: log(1e9, 1e12),
});
const half = fc.record({
  massKg: log(1e-3, 50),
  inertiaKgM2: fc.oneof(fc.constant(0), log(1e-6, 5)),
  armLengthM: log(1e-3, 2),
  armStiffnessNm2: log(1e-3, 5000),
  offsetM: between(-0.5, 0.5),
  lossRatio: fc.oneof(fc.constant(0), log(1e-4, 2)),
});
const halves = fc.record({
  kind: fc.constant('halves' as const),
  clampMassKg: fc.oneof(fc.constant(0), log(1e-3, 20)),
  halves: fc.array(half, { minLength: 1, maxLength: 2 }),
});
const table = fc.record({
  kind: fc.constant('table' as const),
  rows: fc
    .array(
      fc.record({
        stepHz: log(1e-3, 100),
        realNsPerM: fc.oneof(fc.constant(0), log(1e-3, 1e5)),
        imaginaryNsPerM: between(-1e5, 1e5),
      }),
      {
        minLength: 2,
        maxLength: 8,
      },
    )
    .map((rows) => {
      let frequencyHz = 0;
      return rows.map(({ stepHz, ...row }) => ({ frequencyHz: (frequencyHz += stepHz), ...row }));
    }),
});
const model = fc.oneof(halves, table);
const end = fc.record({
  clampReflectionRatio: fc.constantFrom(0, 1e-9, 0.3, 0.999999999, 1),
  dampers: fc.array(fc.record({ distanceM: log(1e-4, 500), model }), { maxLength: 3 }),
});
const frequenciesHz = fc.array(log(1e-3, 1000), { minLength: 1, maxLength: 6 });
const methods = fc.record({
  windPower: fc.constantFrom('wind-power-diana-falco', 'wind-power-diana-falco-cubic'),
  turbulence: fc.constantFrom('turbulence-none', 'turbulence-time-share', 'turbulence-lock-in-index'),
});
const span = fc
  .record({
    wire,
    air: fc.record({ densityKgPerM3: between(0.3, 2), turbulenceIntensityRatio: between(0, 1) }),
    ends: fc.tuple(end, end),
    frequenciesHz,
    methods,
    lengthM: log(1, 10_000),
    tensionShare: log(1e-3, 1),
  })
  .map(({ lengthM, tensionShare, ...rest }) => ({
    ...rest,
    // Most documents are made to fit; some strands and dampers stay out of place to be refused.
    wire: { ...rest.wire, outerStrandDiameterM: Math.min(rest.wire.outerStrandDiameterM, rest.wire.diameterM) },
    ends: rest.ends.map((given) => ({
      ...given,
      dampers: given.dampers.map((damper) => ({
        ...damper,
        distanceM: damper.distanceM > 400 ? damper.distanceM : (damper.distanceM / 1000) * lengthM,
      })),
    })),
    span: { lengthM, tensionN: Math.max(tensionShare * rest.wire.ratedStrengthN, 1) },
  }));

const junk = fc.oneof(
  fc.constantFrom(NaN, Infinity, -Infinity, -1, 0, 1e308, -1e308, 5e-324, null, '', '7', [], {}),
  fc.jsonValue({ maxDepth: 2 }),
);

/** Puts junk somewhere into a document. */
function spoil(document: unknown, picks: readonly number[], value: unknown): unknown {
  const [pick = 0, ...rest] = picks;
  if (typeof document !== 'object' || document === null || picks.length === 0) return value;
  const keys = Object.keys(document);
  if (keys.length === 0) return value;
  const key = keys[pick % keys.length] ?? '';
  const changed = spoil(Reflect.get(document, key), rest, value);
  if (Array.isArray(document)) return document.map((item: unknown, index) => (String(index) === key ? changed : item));
  return { ...document, [key]: changed };
}

/** Every number in an answer is finite. */
function badPath(value: unknown, path = ''): string | null {
  if (typeof value === 'number') return Number.isFinite(value) ? null : `${path} is ${value}`;
  if (typeof value !== 'object' || value === null) return null;
  for (const [key, inner] of Object.entries(value)) {
    const bad = badPath(inner, `${path}/${key}`);
    if (bad !== null) return bad;
  }
  return null;
}

const longestMs = 1000;

/** Answers a document or refuses it by name; anything else fails. */
function run<Input>(
  schema: z.ZodType<Input>,
  command: (input: Input) => unknown,
  document: unknown,
): 'answered' | 'refused' {
  const start = performance.now();
  const parsed = schema.safeParse(document);
  if (!parsed.success) return 'refused';
  try {
    const output = command(parsed.data);
    expect(badPath(output)).toBeNull();
  } catch (error) {
    if (!(error instanceof EngineInputError)) throw error;
    expect(error.path).not.toBe('');
    return 'refused';
  }
  expect(performance.now() - start).toBeLessThan(longestMs);
  return 'answered';
}

const seed = 20_261_201;

describe('random documents', () => {
  it('5000 spans within the bounds are answered with finite numbers, or refused by name', () => {
    let answeredCount = 0;
    fc.assert(
      fc.property(span, (document) => {
        if (run(spanInputSchema, spanCommand, document) === 'answered') answeredCount += 1;
      }),
      { numRuns: 5000, seed },
    );
    expect(answeredCount).toBeGreaterThan(400);
  });

  it('1000 span wires go through the whole assessment', () => {
    fc.assert(
      fc.property(span, ({ frequenciesHz: _unused, methods: chosen, ...rest }) => {
        const [left, right] = rest.ends;
        if (left === undefined || right === undefined) throw new Error('a span has two ends');
        const input: SpanWireCase = { ...rest, ends: [left, right], span: { ...rest.span, bearingRad: 1 } };
        try {
          expect(badPath(assessSpanWire(input, aBasis({ frequencyCount: 20, methods: chosen })))).toBeNull();
        } catch (error) {
          if (!(error instanceof EngineInputError)) throw error;
        }
      }),
      { numRuns: 1000, seed },
    );
  });

  it('3000 ends, dampers and waves likewise', () => {
    fc.assert(
      fc.property(span, model, (document, damper) => {
        const { wire: given, ends, frequenciesHz: at } = document;
        run(endInputSchema, endCommand, {
          wire: given,
          tensionN: document.span.tensionN,
          end: ends[0],
          frequenciesHz: at,
        });
        run(damperInputSchema, damperCommand, { model: damper, frequenciesHz: at });
        run(wavesInputSchema, wavesCommand, { wire: given, span: document.span, frequenciesHz: at });
      }),
      { numRuns: 1000, seed },
    );
  });

  it('3000 spoiled spans are refused or answered, never worse', () => {
    fc.assert(
      fc.property(span, fc.array(fc.nat(50), { minLength: 1, maxLength: 7 }), junk, (document, picks, value) => {
        run(spanInputSchema, spanCommand, spoil(document, picks, value));
      }),
      { numRuns: 3000, seed },
    );
  });
});

import { assertEndsApart, prepareEnd, type PreparedEnd } from '../ends/prepare-end.ts';
import type { SpanEnd } from '../ends/span-end.ts';
import type { PartialMethodChoice } from '../methods/method-choice.ts';
import { resolveMethods, type ResolvedMethods } from '../methods/resolve-methods.ts';
import type { UserCurves } from '../methods/user-curves.ts';
import { assertNumber } from '../numerics/assert-number.ts';
import { assertTension, assertWireProperties, type WireProperties } from './wire-properties.ts';

/** A span wire in its wind, as given. */
export interface SpanInput {
  readonly wire: WireProperties;
  readonly span: { readonly lengthM: number; readonly tensionN: number };
  readonly air: { readonly densityKgPerM3: number; readonly turbulenceIntensityRatio: number };
  readonly ends: readonly [SpanEnd, SpanEnd];
}

/** How methods are chosen for a span. */
export interface SpanMethods {
  readonly methods: PartialMethodChoice;
  readonly curves?: UserCurves | undefined;
  readonly outsideValidity: 'refuse' | 'fall-back';
}

/** A checked span with its methods applied. */
export interface SpanSetup {
  readonly wire: WireProperties;
  readonly lengthM: number;
  readonly tensionN: number;
  readonly airDensityKgPerM3: number;
  readonly ends: readonly [PreparedEnd, PreparedEnd];
  readonly methods: ResolvedMethods;
}

/** @source common practice: bounds that refuse slips of the pen, not unusual spans */
const lengthLimits = { atLeast: 1, atMost: 10_000 } as const;
const densityLimits = { atLeast: 0.3, atMost: 2 } as const;

/**
 * Checks a span and applies the chosen methods to it.
 *
 * @param input  wire, span, air and both ends
 * @param choice methods by name
 * @returns what the sweep needs
 * @throws EngineInputError naming the field by its path
 * @source common practice
 */
export function spanSetup(input: SpanInput, choice: SpanMethods): SpanSetup {
  const { wire, span, air } = input;
  assertWireProperties(wire, 'wire');
  assertNumber('span.lengthM', span.lengthM, lengthLimits);
  assertTension(span.tensionN, { path: 'span.tensionN', ratedStrengthN: wire.ratedStrengthN });
  assertNumber('air.densityKgPerM3', air.densityKgPerM3, densityLimits);
  const left = prepareEnd(input.ends[0], { path: 'ends[0]', lengthM: span.lengthM });
  const right = prepareEnd(input.ends[1], { path: 'ends[1]', lengthM: span.lengthM });
  assertEndsApart(left, right, span.lengthM);
  const methods = resolveMethods(choice.methods, {
    wire: { ...wire, tensionN: span.tensionN },
    turbulenceIntensityRatio: air.turbulenceIntensityRatio,
    curves: choice.curves,
    outsideValidity: choice.outsideValidity,
  });
  return {
    wire,
    lengthM: span.lengthM,
    tensionN: span.tensionN,
    airDensityKgPerM3: air.densityKgPerM3,
    ends: [left, right],
    methods,
  };
}

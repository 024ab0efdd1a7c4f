import { assertWindClimate } from '../climate/wind-climate.ts';
import { safeBorderLines } from '../life/fatigue-curve.ts';
import { methodEntry } from '../methods/method-registry.ts';
import { assertNumber } from '../numerics/assert-number.ts';
import { EngineInputError } from '../numerics/engine-input-error.ts';
import type { SpanWireCase, VibrationBasis } from './span-wire-assessment.ts';

/** @source common practice: bounds that refuse slips of the pen */
const stressLimits = { above: 0, atMost: 1e9 } as const;
const strainLimits = { above: 0, atMost: 0.01 } as const;
const bearingLimits = { atLeast: -2 * Math.PI, atMost: 4 * Math.PI } as const;

/**
 * Refuses a basis or a bearing that cannot be; wire, span and ends are checked with the span's setup.
 *
 * @throws EngineInputError naming the field
 * @source common practice
 */
export function assertBasis(input: SpanWireCase, basis: VibrationBasis): void {
  assertNumber('span.bearingRad', input.span.bearingRad, bearingLimits);
  assertNumber('endurance.stressPa', basis.endurance.stressPa, stressLimits);
  if (basis.damperedStrain !== null) {
    assertNumber('damperedStrain.strainRatio', basis.damperedStrain.strainRatio, strainLimits);
  }
  if (!(basis.fatigueCurve in safeBorderLines)) {
    throw new EngineInputError('fatigueCurve', `must be one of ${Object.keys(safeBorderLines).join(', ')}`);
  }
  methodEntry('life', basis.methods.life);
  if (basis.climate !== null) assertWindClimate(basis.climate);
}

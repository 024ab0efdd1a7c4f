import { assertDamperModel } from '../dampers/assert-damper-model.ts';
import type { DamperModel } from '../dampers/damper-model.ts';
import { assertNumber } from '../numerics/assert-number.ts';
import { EngineInputError } from '../numerics/engine-input-error.ts';
import type { ArmourRods, ClampSupport, SpanEnd } from './span-end.ts';

/** An end with its dampers at rising distances, and where each stood in the input. */
export interface PreparedEnd {
  readonly clampReflectionRatio: number;
  readonly distancesM: Float64Array;
  readonly models: readonly DamperModel[];
  /** Position in the input of each damper in rising order. */
  readonly inputIndexes: readonly number[];
  readonly armourRods: ArmourRods | null;
  readonly support: ClampSupport | null;
}

/** Two dampers nearer than this are at one place. */
const sameDistanceM = 1e-6;
const damperLimitCount = 12;

/** @source common practice: bounds that refuse slips of the pen */
const rodLimits = {
  massKgPerM: { above: 0, atMost: 100 },
  bendingStiffnessNm2: { atLeast: 1e-4, atMost: 1e7 },
} as const;
const supportLimits = {
  massKg: { atLeast: 0, atMost: 5000 },
  stiffnessNPerM: { atLeast: 0, atMost: 1e9 },
  dampingNsPerM: { atLeast: 0, atMost: 1e6 },
} as const;

function assertFittings(
  { armourRods, support }: SpanEnd,
  reach: { readonly path: string; readonly lengthM: number },
): void {
  if (armourRods !== undefined) {
    const path = `${reach.path}.armourRods`;
    assertNumber(`${path}.lengthM`, armourRods.lengthM, { above: 0, below: reach.lengthM });
    assertNumber(`${path}.massKgPerM`, armourRods.massKgPerM, rodLimits.massKgPerM);
    assertNumber(`${path}.bendingStiffnessNm2`, armourRods.bendingStiffnessNm2, rodLimits.bendingStiffnessNm2);
  }
  if (support === undefined) return;
  for (const [key, limits] of Object.entries(supportLimits)) {
    assertNumber(`${reach.path}.support.${key}`, support[key as keyof ClampSupport], limits); // keys of the table are keys of a support
  }
}

/**
 * Checks an end and puts its dampers into rising order.
 *
 * @param end clamp with dampers in any order
 * @param reach.path    name of the end in the caller's input
 * @param reach.lengthM length of wire the dampers must lie on, scalar [m]
 * @returns the end in rising order with the way back to the input's order
 * @throws EngineInputError naming the damper: beyond the wire, at or below 0, two at one distance
 * @source common practice
 */
export function prepareEnd(end: SpanEnd, reach: { readonly path: string; readonly lengthM: number }): PreparedEnd {
  const { path, lengthM } = reach;
  const clampReflectionRatio = end.clampReflectionRatio ?? 1;
  assertNumber(`${path}.clampReflectionRatio`, clampReflectionRatio, { atLeast: 0, atMost: 1 });
  if (end.dampers.length > damperLimitCount) {
    throw new EngineInputError(`${path}.dampers`, `must be at most ${damperLimitCount} dampers`);
  }
  end.dampers.forEach((damper, index) => {
    const here = `${path}.dampers[${index}]`;
    assertNumber(`${here}.distanceM`, damper.distanceM, { above: 0 });
    if (damper.distanceM >= lengthM) {
      throw new EngineInputError(
        `${here}.distanceM`,
        `lies beyond the span of ${lengthM} m, it is ${damper.distanceM}`,
      );
    }
    assertDamperModel(damper.model, `${here}.model`);
  });
  assertFittings(end, reach);
  const order = end.dampers.map((damper, index) => ({ damper, index }));
  order.sort((a, b) => a.damper.distanceM - b.damper.distanceM);
  order.forEach(({ damper, index }, place) => {
    const before = order[place - 1];
    if (before === undefined || damper.distanceM - before.damper.distanceM >= sameDistanceM) return;
    throw new EngineInputError(
      `${path}.dampers[${index}].distanceM`,
      `is the place of dampers[${before.index}] too: two dampers cannot sit at one distance`,
    );
  });
  return {
    clampReflectionRatio,
    distancesM: Float64Array.from(order, ({ damper }) => damper.distanceM),
    models: order.map(({ damper }) => damper.model),
    inputIndexes: order.map(({ index }) => index),
    armourRods: end.armourRods ?? null,
    support: end.support ?? null,
  };
}

/**
 * Checks that the dampers of both ends fit on one span.
 *
 * @throws EngineInputError naming the right end if they meet or pass each other
 * @source common practice
 */
export function assertEndsApart(left: PreparedEnd, right: PreparedEnd, lengthM: number): void {
  const reachM = (left.distancesM.at(-1) ?? 0) + (right.distancesM.at(-1) ?? 0);
  if (reachM >= lengthM) {
    throw new EngineInputError('ends[1].dampers', `meet the dampers of the other end: together they reach ${reachM} m`);
  }
}

import { assertNumber } from '../numerics/assert-number.ts';
import { EngineInputError } from '../numerics/engine-input-error.ts';
import type { DamperHalf, DamperModel } from './damper-model.ts';
import { impedanceTable } from './impedance-table.ts';
import { assertVelocityTables } from './velocity-tables.ts';

/** @source common practice: bounds that refuse slips of the pen, not unusual dampers */
const halfLimits = {
  massKg: { above: 0, atMost: 50 },
  inertiaKgM2: { atLeast: 0, atMost: 5 },
  armLengthM: { above: 0, atMost: 2 },
  armStiffnessNm2: { above: 0, atMost: 5000 },
  offsetM: { atLeast: -0.5, atMost: 0.5 },
  lossRatio: { atLeast: 0, atMost: 2 },
} as const;
const clampMassLimits = { atLeast: 0, atMost: 20 } as const;
const clampVelocityLimits = { above: 0, atMost: 5 } as const;

function assertHalf(half: DamperHalf, path: string): void {
  for (const [key, limits] of Object.entries(halfLimits)) {
    assertNumber(`${path}.${key}`, half[key as keyof DamperHalf], limits); // keys of the table are keys of a half
  }
}

/**
 * Refuses a damper that cannot be.
 *
 * @param model damper
 * @param path  name of the model in the caller's input
 * @throws EngineInputError naming the field
 * @source common practice
 */
export function assertDamperModel(model: DamperModel, path: string): void {
  if (model.kind === 'halves') {
    assertNumber(`${path}.clampMassKg`, model.clampMassKg, clampMassLimits);
    if (model.halves.length < 1 || model.halves.length > 2) {
      throw new EngineInputError(`${path}.halves`, 'must be one or two halves');
    }
    model.halves.forEach((half, index) => assertHalf(half, `${path}.halves[${index}]`));
    return;
  }
  if (model.kind === 'velocity-tables') {
    assertVelocityTables(model, path);
    return;
  }
  if (model.clampVelocityMPerS !== undefined) {
    assertNumber(`${path}.clampVelocityMPerS`, model.clampVelocityMPerS, clampVelocityLimits);
  }
  impedanceTable(model, path);
}

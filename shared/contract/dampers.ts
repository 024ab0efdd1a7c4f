import { z } from 'zod';

/** One half of a damper: messenger of a length and stiffness with a weight at its tip. */
export const damperHalfSchema = z.strictObject({
  massKg: z.number().positive().max(50),
  inertiaKgM2: z.number().min(0).max(5),
  armLengthM: z.number().positive().max(2),
  armStiffnessNm2: z.number().positive().max(5000),
  offsetM: z.number().min(-0.5).max(0.5),
  lossRatio: z.number().min(0).max(2),
});

/** Impedance row: force over velocity at the damper clamp. */
export const impedanceRowSchema = z.union([
  z.strictObject({
    frequencyHz: z.number().positive().max(1000),
    realNsPerM: z.number().min(0, 'must not be negative: a damper takes energy, it gives none'),
    imaginaryNsPerM: z.number(),
  }),
  z.strictObject({
    frequencyHz: z.number().positive().max(1000),
    magnitudeNsPerM: z.number().min(0),
    phaseRad: z
      .number()
      .min(-Math.PI / 2)
      .max(Math.PI / 2),
  }),
]);

/** What the engine knows of a damper: half-damper parameters, or a measured impedance table. */
export const damperModelSchema = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('halves'),
    clampMassKg: z.number().min(0).max(20),
    halves: z.array(damperHalfSchema).min(1).max(2),
  }),
  z.strictObject({
    kind: z.literal('table'),
    rows: z.array(impedanceRowSchema).min(2).max(2000),
    clampVelocityMPerS: z.number().positive().max(5).optional(),
  }),
]);
export type DamperModel = z.infer<typeof damperModelSchema>;

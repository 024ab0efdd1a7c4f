import { z } from 'zod';
import { engineSchemaName } from './engine.ts';

const pair = <T extends z.ZodType>(value: T) => z.tuple([value, value]).describe('[left, right]');
const orNull = z.number().nullable();
const complex = z.object({ re: z.number(), im: z.number() });

const note = z.object({
  name: z.string(),
  standing: z.enum(['published', 'closed form', 'common practice', 'from memory', 'own model']),
  source: z.string(),
});
const head = {
  schema: z.literal(engineSchemaName),
  engineVersion: z.string(),
  methods: z.array(note).describe('Methods used, with how well each is founded'),
  warnings: z.array(z.object({ code: z.string(), text: z.string() })),
};

/** Output of the engine's `waves` command. */
export const wavesOutputSchema = z.object({
  ...head,
  rows: z.array(
    z.object({
      frequencyHz: z.number(),
      phaseSpeedMPerS: z.number(),
      groupSpeedMPerS: z.number(),
      impedanceNsPerM: z.number(),
      wavelengthM: z.number(),
      loopLengthM: z.number(),
    }),
  ),
});

/** Output of the engine's `end` command. */
export const endOutputSchema = z.object({
  ...head,
  rows: z.array(
    z.object({
      frequencyHz: z.number(),
      outcome: z.enum(['steady', 'no-damper-data']),
      reflection: complex.nullable(),
      absorbedRatio: orNull,
      iswRatio: orNull,
      clampCurvaturePerM2: orNull.describe('Curvature per antinode amplitude, 1/m²'),
      damperCurvaturePerM2: z.array(orNull).describe('The same at each damper clamp, in the order of the input'),
      damperMotionRatio: z.array(orNull).describe('Motion of each damper clamp over the antinode amplitude'),
    }),
  ),
});

/** Output of the engine's `damper` command. */
export const damperOutputSchema = z.object({
  ...head,
  naturalFrequenciesHz: z.array(z.array(z.number())).nullable().describe('Per half; null for a table'),
  rows: z.array(
    z.object({ frequencyHz: z.number(), impedance: complex.nullable().describe('N·s/m; null outside a table') }),
  ),
});

/** Output of the engine's `span` command. */
export const spanOutputSchema = z.object({
  ...head,
  rows: z.array(
    z.object({
      frequencyHz: z.number(),
      windSpeedMPerS: z.number(),
      outcome: z.enum(['steady', 'quiet', 'amplitude-limit', 'no-damper-data']),
      midAmplitudeM: orNull,
      endAmplitudeM: pair(orNull),
      endReflectionRatio: pair(orNull),
      clampStrainRatio: pair(orNull),
      damperClampStrainRatio: pair(z.array(orNull)),
      windPowerW: orNull,
      selfDampingPowerW: orNull,
      endPowerW: pair(orNull),
      energyClosureRatio: orNull,
    }),
  ),
});

/** Output of the engine's `life` command. */
export const lifeOutputSchema = z.object({
  ...head,
  life: z.discriminatedUnion('outcome', [
    z.object({ outcome: z.literal('finite'), years: z.number(), damagePerYearRatio: z.number() }),
    z.object({ outcome: z.literal('unlimited') }),
    z.object({ outcome: z.literal('no-climate') }),
  ]),
  damagePerYearRatio: z.number(),
  maxStressPa: z.number(),
  endIndex: z.number().int().nullable(),
  damperIndex: z.number().int().nullable(),
  bins: z.array(
    z.object({
      frequencyHz: z.number(),
      stressPa: z.number(),
      cyclesPerYearCount: z.number(),
      damagePerYearRatio: z.number(),
      windSpeedMPerS: z.number().optional(),
      hoursPerYearCount: z.number().optional(),
    }),
  ),
});

/** Output of the engine's `place` command. */
export const placeOutputSchema = z.object({
  ...head,
  trialCount: z.number().int(),
  choices: z.array(
    z.object({
      damperCount: z.number().int(),
      dampers: z.array(z.object({ catalogueIndex: z.number().int(), name: z.string(), distanceM: z.number() })),
      worstUtilisationRatio: z.number(),
      worstStressPa: z.number(),
      plannedUtilisationRatio: z.number(),
      isWorthwhile: z.boolean(),
      reasons: z.array(
        z.object({
          tensionN: z.number(),
          rows: z.array(z.object({ frequencyHz: z.number(), absorbedRatio: z.number(), utilisationRatio: z.number() })),
        }),
      ),
    }),
  ),
});

import { z } from 'zod';

/** Why a finding has its grade: numbers in SI with the source of each limit; sentences are made at the edge. */
export const reasonSchema = z.discriminatedUnion('code', [
  z.object({
    code: z.literal('stress-against-limit'),
    structureName: z.string(),
    place: z.enum(['clamp', 'damper-clamp']),
    stressPa: z.number(),
    limitPa: z.number(),
    limitSource: z.string(),
    frequencyHz: z.number(),
    windSpeedMPerS: z.number(),
    isOver: z.boolean(),
  }),
  z.object({
    code: z.literal('strain-against-limit'),
    structureName: z.string(),
    place: z.enum(['clamp', 'damper-clamp']),
    strainRatio: z.number().describe('Zero to peak'),
    limitRatio: z.number().describe('Zero to peak, converted from the convention of the source'),
    limitSource: z.string(),
    frequencyHz: z.number(),
    windSpeedMPerS: z.number(),
    isOver: z.boolean(),
  }),
  z.object({
    code: z.literal('band-over-limit'),
    windLowerMPerS: z.number(),
    windUpperMPerS: z.number(),
    frequencyLowerHz: z.number(),
    frequencyUpperHz: z.number(),
  }),
  z.object({ code: z.literal('life'), lifeYears: z.number(), thresholdYears: z.number().nullable() }),
  z.object({
    code: z.literal('no-damper'),
    structureName: z.string(),
    tensionRatedRatio: z.number(),
    hOverWM: z.number(),
  }),
  z.object({
    code: z.literal('weak-absorption'),
    structureName: z.string(),
    absorbedRatio: z.number(),
    frequencyHz: z.number(),
    dampersCount: z.number().int(),
  }),
  z.object({
    code: z.literal('damper-off-plan'),
    structureName: z.string(),
    distanceM: z.number(),
    plannedDistanceM: z.number(),
    offsetM: z.number(),
  }),
  z.object({ code: z.literal('amplitude-limit'), frequencyHz: z.number(), windSpeedMPerS: z.number() }),
  z.object({
    code: z.literal('no-damper-data'),
    frequencyLowerHz: z.number().describe('Lower end of the band that the damper tables cover'),
    frequencyUpperHz: z.number().describe('Upper end of the band that the damper tables cover'),
  }),
  z.object({ code: z.literal('refused-input'), field: z.string(), problem: z.string() }),
  z.object({ code: z.literal('quiet') }),
  z.object({ code: z.literal('assumed-input') }),
]);
export type Reason = z.infer<typeof reasonSchema>;

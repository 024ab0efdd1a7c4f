import { readFileSync } from 'node:fs';
import { z } from 'zod';
import { damperModelSchema } from '#shared/contract/dampers.ts';
import { sideSchema } from '#shared/contract/placements.ts';

const directory = new URL('../../seeds/data/', import.meta.url);

/** Bytes of a file of the demo. */
export function demoFile(name: string): Buffer {
  return readFileSync(new URL(name, directory));
}

function readJson<S extends z.ZodType>(name: string, schema: S): z.infer<S> {
  return schema.parse(JSON.parse(demoFile(name).toString('utf8')));
}

const damperTypesSchema = z.array(
  z.object({ name: z.string(), massKg: z.number(), costAmount: z.number(), model: damperModelSchema }),
);
const climatesSchema = z.array(
  z.object({
    name: z.string(),
    icingHoursPerYearCount: z.number(),
    meanSpeedsMPerS: z.array(z.number()),
    shares: z.array(z.number()),
  }),
);
const sourcesSchema = z.record(z.string(), z.object({ title: z.string() }));
const terrainSchema = z.object({
  features: z.array(
    z.object({
      properties: z.object({ name: z.string(), roughness_m: z.number() }),
      geometry: z.object({ type: z.string(), coordinates: z.unknown() }),
    }),
  ),
});
const fittedSchema = z.object({
  line: z.string(),
  damperType: z.string(),
  distanceM: z.number(),
  spansPerHundredCount: z.number(),
  wires: z.array(z.string()),
});
const plannedSchema = z.object({
  line: z.string(),
  damperType: z.string(),
  distanceM: z.number(),
  fromSpanIndex: z.number(),
  spanCount: z.number(),
  wires: z.array(z.string()),
});
const dampersSchema = z.object({
  fitted: z.array(fittedSchema),
  badlyPlaced: z.object({
    line: z.string(),
    spanIndex: z.number(),
    wire: z.string(),
    side: sideSchema,
    distanceM: z.number(),
    plannedDistanceM: z.number(),
  }),
  planned: z.array(plannedSchema),
});
export type DemoDampers = z.infer<typeof dampersSchema>;

export const readDamperTypes = () => readJson('damper-types.json', damperTypesSchema);
export const readClimates = () => readJson('climates.json', climatesSchema);
export const readSources = () => readJson('conductor-sources.json', sourcesSchema);
export const readTerrain = (utilityCode: string) => readJson(`${utilityCode}/terrain.geojson`, terrainSchema);
export const readDampers = () => readJson('dampers-tern.json', dampersSchema);

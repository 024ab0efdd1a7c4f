import { z } from 'zod';
import { basisSpecSchema } from '#shared/contract/bases.ts';
import { climateSectorSchema } from '#shared/contract/catalogue.ts';
import { damperModelSchema } from '#shared/contract/dampers.ts';

/*
 * The input of an assessment as it was when the assessment began. Conductors, dampers and the climate stand once in a
 * chunk and are named by key, because a chunk holds hundreds of span wires that share them.
 */
export const frozenConductorSchema = z.object({
  name: z.string(),
  standard: z.string(),
  kind: z.string(),
  source: z.string(),
  standing: z.string(),
  aluminiumLayerCount: z.number(),
  diameterM: z.number(),
  massKgPerM: z.number(),
  ratedStrengthN: z.number(),
  bendingStiffnessMinNm2: z.number(),
  outerStrandDiameterM: z.number(),
  outerStrandModulusPa: z.number(),
});
const frozenDamperTypeSchema = z.object({
  name: z.string(),
  model: damperModelSchema,
  source: z.string(),
  standing: z.string(),
});
const frozenPlacementSchema = z.object({
  placementId: z.uuid(),
  side: z.enum(['from', 'to']),
  damperTypeId: z.uuid(),
  distanceM: z.number(),
  plannedDistanceM: z.number().nullable(),
});
const frozenItemSchema = z.object({
  spanWireId: z.uuid(),
  conductorTypeId: z.uuid(),
  spanLengthM: z.number(),
  bearingDeg: z.number(),
  meanWireHeightM: z.number(),
  roughnessM: z.number(),
  tensionN: z.number(),
  fromStructureName: z.string(),
  toStructureName: z.string(),
  isAssumed: z.boolean(),
  placements: z.array(frozenPlacementSchema),
});
export const frozenChunkSchema = z.object({
  basis: z.object({ name: z.string(), versionNumber: z.number(), spec: basisSpecSchema }),
  climate: z.object({ name: z.string(), source: z.string(), sectors: z.array(climateSectorSchema) }).nullable(),
  conductors: z.record(z.string(), frozenConductorSchema),
  damperTypes: z.record(z.string(), frozenDamperTypeSchema),
  items: z.array(frozenItemSchema),
});

export type FrozenChunk = z.infer<typeof frozenChunkSchema>;
export type FrozenItem = z.infer<typeof frozenItemSchema>;
export type FrozenConductor = z.infer<typeof frozenConductorSchema>;

/** Everything one span wire was assessed with. */
export interface FrozenCase {
  readonly basis: FrozenChunk['basis'];
  readonly climate: FrozenChunk['climate'];
  readonly conductor: FrozenConductor;
  readonly damperTypes: FrozenChunk['damperTypes'];
  readonly item: FrozenItem;
}

/** Picks one span wire out of a chunk, with the catalogue rows it names. */
export function frozenCase(chunk: FrozenChunk, itemIndex: number): FrozenCase {
  const item = chunk.items[itemIndex];
  const conductor = item === undefined ? undefined : chunk.conductors[item.conductorTypeId];
  if (item === undefined || conductor === undefined)
    throw new Error(`the frozen chunk has no complete item ${itemIndex}`);
  const named = new Set(item.placements.map(({ damperTypeId }) => damperTypeId));
  const damperTypes = Object.fromEntries(Object.entries(chunk.damperTypes).filter(([id]) => named.has(id)));
  return { basis: chunk.basis, climate: chunk.climate, conductor, damperTypes, item };
}

import { z } from 'zod';
import type { UtilityTransaction } from './database.ts';

const conductorSchema = z.object({
  id: z.uuid(),
  name: z.string(),
  standard: z.string(),
  massKgPerM: z.number(),
  ratedStrengthN: z.number(),
});

/** Every conductor type of the utility with what an import needs of it. */
export function listConductorsForImport(tx: UtilityTransaction): Promise<z.infer<typeof conductorSchema>[]> {
  return tx.rows(
    conductorSchema,
    'select id, name, standard, mass_kg_per_m, rated_strength_n from conductor_types order by name, standard',
  );
}

/** Those of the names that lines of the utility bear already. */
export async function storedLineNames(tx: UtilityTransaction, names: readonly string[]): Promise<Set<string>> {
  const rows = await tx.rows(
    z.object({ name: z.string() }),
    'select name from lines where name = any(:names::text[])',
    {
      names,
    },
  );
  return new Set(rows.map(({ name }) => name));
}

const extentSchema = z.object({ extentDeg: z.array(z.number()).length(4).nullable() });

/** West, south, east and north of everything the utility has on the map; null when it has nothing yet. */
export async function storedExtentDeg(tx: UtilityTransaction): Promise<readonly number[] | null> {
  const row = await tx.first(
    extentSchema,
    `select case when bounds.box is null then null else
       array[st_xmin(bounds.box), st_ymin(bounds.box), st_xmax(bounds.box), st_ymax(bounds.box)] end as extent_deg
     from (
       select st_extent(things.geom) as box
       from (select geom from sections union all select geom from terrain_zones) as things
     ) as bounds`,
  );
  return row?.extentDeg ?? null;
}

import type { z } from 'zod';
import { climateSchema, conductorTypeSchema, damperTypeSchema, terrainZoneSchema } from '#shared/contract/catalogue.ts';
import { keysetPage, type PageRequest } from './cursor.ts';
import type { UtilityTransaction } from './database.ts';
import { containing } from './lines.read-model.ts';

type CatalogueQuery = PageRequest & { search?: string | undefined };

function byName<S extends z.ZodType>(
  tx: UtilityTransaction,
  query: CatalogueQuery,
  list: { schema: S; table: string; columns: string },
) {
  const name = `${list.table}.name`;
  return keysetPage(tx, query, {
    schema: list.schema,
    columns: list.columns,
    from: list.table,
    where: query.search === undefined ? [] : [`${name} ilike :search`],
    bindings: query.search === undefined ? {} : { search: containing(query.search) },
    key: { expression: name, type: 'text', direction: 'ascending' },
    id: `${list.table}.id`,
    countFrom: list.table,
  });
}

export const listConductorTypes = (tx: UtilityTransaction, query: CatalogueQuery) =>
  byName(tx, query, {
    schema: conductorTypeSchema,
    table: 'conductor_types',
    columns: `id, name, standard, kind, diameter_m, mass_kg_per_m, rated_strength_n, aluminium_layer_count, outer_strand_diameter_m,
      outer_strand_modulus_pa, bending_stiffness_min_nm2, bending_stiffness_max_nm2, modulus_pa, thermal_expansion_per_k,
      (outer_strand_diameter_m is not null and bending_stiffness_min_nm2 is not null) as is_assessable, source, standing`,
  });

export const listDamperTypes = (tx: UtilityTransaction, query: CatalogueQuery) =>
  byName(tx, query, {
    schema: damperTypeSchema,
    table: 'damper_types',
    columns: 'id, name, mass_kg, model, source, standing, cost_amount::double precision as cost_amount, version_number',
  });

export const listClimates = (tx: UtilityTransaction, query: CatalogueQuery) =>
  byName(tx, query, {
    schema: climateSchema,
    table: 'climates',
    columns: 'id, name, sectors, icing_hours_per_year_count, source, version_number',
  });

const terrainColumns = 'id, name, roughness_m, st_asgeojson(geom, 6)::json as geometry, version_number';

export const listTerrainZones = (tx: UtilityTransaction, query: CatalogueQuery) =>
  byName(tx, query, { schema: terrainZoneSchema, table: 'terrain_zones', columns: terrainColumns });

export function findTerrainZone(tx: UtilityTransaction, terrainZoneId: string) {
  return tx.first(terrainZoneSchema, `select ${terrainColumns} from terrain_zones where id = :terrainZoneId`, {
    terrainZoneId,
  });
}

/** Writes a terrain zone and the roughness of the spans in it, if the version is the one that was read. */
export async function updateTerrainZone(
  tx: UtilityTransaction,
  zone: { id: string; versionNumber: number; name: string; roughnessM: number },
): Promise<boolean> {
  const changed = await tx.run(
    `update terrain_zones set name = :name, roughness_m = :roughnessM, version_number = version_number + 1
     where id = :id and version_number = :versionNumber`,
    zone,
  );
  if (changed !== 1) return false;
  await tx.run('update spans set roughness_m = :roughnessM where terrain_zone_id = :id', zone);
  return true;
}

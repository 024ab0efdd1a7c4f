import type { DamperModel } from '#shared/contract/dampers.ts';
import type { Climate } from '#shared/contract/catalogue.ts';
import type { UtilityTransaction } from './database.ts';
import { jsonRows } from './line-import-json-rows.ts';

export interface ConductorRecord {
  readonly id: string;
  readonly name: string;
  readonly standard: string;
  readonly kind: string;
  readonly diameterM: number;
  readonly massKgPerM: number;
  readonly ratedStrengthN: number;
  readonly aluminiumLayerCount: number;
  readonly outerStrandDiameterM: number | null;
  readonly outerStrandModulusPa: number;
  readonly bendingStiffnessMinNm2: number | null;
  readonly bendingStiffnessMaxNm2: number | null;
  readonly modulusPa: number | null;
  readonly thermalExpansionPerK: number | null;
  readonly source: string;
  readonly standing: string;
  /** The row as its source prints it, by column. */
  readonly asPublished: Readonly<Record<string, string>>;
}

export interface DamperRecord {
  readonly id: string;
  readonly name: string;
  readonly massKg: number;
  readonly model: DamperModel;
  readonly source: string;
  readonly standing: string;
  readonly costAmount: number | null;
}

export type ClimateRecord = Omit<Climate, 'versionNumber'>;

export interface TerrainRecord {
  readonly id: string;
  readonly name: string;
  readonly roughnessM: number;
  readonly geometry: { readonly type: string; readonly coordinates: unknown };
}

const conductorColumns = `id, name, standard, kind, diameter_m, mass_kg_per_m, rated_strength_n, aluminium_layer_count,
  outer_strand_diameter_m, outer_strand_modulus_pa, bending_stiffness_min_nm2, bending_stiffness_max_nm2, modulus_pa,
  thermal_expansion_per_k, source, standing, as_published`;

/** Adds conductor types; those of a name and standard that are stored already stay as they are. */
export function insertConductorTypes(tx: UtilityTransaction, records: readonly ConductorRecord[]): Promise<number> {
  return tx.run(
    `insert into conductor_types (utility_id, ${conductorColumns})
     select :utilityId::uuid, ${conductorColumns}
     from jsonb_to_recordset(:rows::jsonb) as item(id uuid, name text, standard text, kind text,
       diameter_m double precision, mass_kg_per_m double precision, rated_strength_n double precision,
       aluminium_layer_count int, outer_strand_diameter_m double precision, outer_strand_modulus_pa double precision,
       bending_stiffness_min_nm2 double precision, bending_stiffness_max_nm2 double precision,
       modulus_pa double precision, thermal_expansion_per_k double precision, source text, standing text,
       as_published jsonb)
     on conflict (utility_id, name, standard) do nothing`,
    { utilityId: tx.actor.utilityId, rows: jsonRows(records) },
  );
}

/** Adds damper types; names that are stored already stay as they are. */
export function insertDamperTypes(tx: UtilityTransaction, records: readonly DamperRecord[]): Promise<number> {
  return tx.run(
    `insert into damper_types (utility_id, id, name, mass_kg, model, source, standing, cost_amount)
     select :utilityId::uuid, id, name, mass_kg, model, source, standing, cost_amount
     from jsonb_to_recordset(:rows::jsonb) as item(id uuid, name text, mass_kg double precision, model jsonb,
       source text, standing text, cost_amount numeric)
     on conflict (utility_id, name) do nothing`,
    { utilityId: tx.actor.utilityId, rows: jsonRows(records) },
  );
}

/** Adds wind climates; names that are stored already stay as they are. */
export function insertClimates(tx: UtilityTransaction, records: readonly ClimateRecord[]): Promise<number> {
  return tx.run(
    `insert into climates (utility_id, id, name, sectors, icing_hours_per_year_count, source)
     select :utilityId::uuid, id, name, sectors, icing_hours_per_year_count, source
     from jsonb_to_recordset(:rows::jsonb) as item(id uuid, name text, sectors jsonb,
       icing_hours_per_year_count double precision, source text)
     on conflict (utility_id, name) do nothing`,
    { utilityId: tx.actor.utilityId, rows: jsonRows(records) },
  );
}

/** Adds terrain zones; names that are stored already stay as they are. */
export function insertTerrainZones(tx: UtilityTransaction, records: readonly TerrainRecord[]): Promise<number> {
  return tx.run(
    `insert into terrain_zones (utility_id, id, name, roughness_m, geom)
     select :utilityId::uuid, id, name, roughness_m, st_multi(st_setsrid(st_geomfromgeojson(geometry), 4326))
     from jsonb_to_recordset(:rows::jsonb) as item(id uuid, name text, roughness_m double precision, geometry jsonb)
     on conflict (utility_id, name) do nothing`,
    { utilityId: tx.actor.utilityId, rows: jsonRows(records) },
  );
}

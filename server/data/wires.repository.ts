import { z } from 'zod';
import { wireSchema, type Wire } from '#shared/contract/sections.ts';
import type { UtilityTransaction } from './database.ts';

const select = `select wires.id, wires.name, wires.kind, wires.conductor_type_id, conductor_types.name as conductor_name,
    conductor_types.diameter_m as conductor_diameter_m, conductor_types.mass_kg_per_m as conductor_mass_kg_per_m,
    conductor_types.rated_strength_n, wires.tension_n, wires.is_assumed, wires.version_number
  from wires join conductor_types on conductor_types.id = wires.conductor_type_id`;

/** Wires of a section: phases first, then earth wires. */
export function listSectionWires(tx: UtilityTransaction, sectionId: string): Promise<Wire[]> {
  return tx.rows(wireSchema, `${select} where wires.section_id = :sectionId order by wires.kind, wires.name`, {
    sectionId,
  });
}

export function findWire(tx: UtilityTransaction, wireId: string): Promise<Wire | null> {
  return tx.first(wireSchema, `${select} where wires.id = :wireId`, { wireId });
}

/** Writes tension and conductor of a wire if its version is still the one that was read; says whether it was. */
export async function updateWire(
  tx: UtilityTransaction,
  wire: { id: string; versionNumber: number; tensionN: number; conductorTypeId: string },
): Promise<boolean> {
  const changed = await tx.run(
    `update wires set tension_n = :tensionN, conductor_type_id = :conductorTypeId, is_assumed = false, version_number = version_number + 1
     where id = :id and version_number = :versionNumber`,
    wire,
  );
  return changed === 1;
}

/** Rated strength of a conductor type, or null when there is no such type. */
export async function findRatedStrengthN(tx: UtilityTransaction, conductorTypeId: string): Promise<number | null> {
  const row = await tx.first(
    z.object({ ratedStrengthN: z.number() }),
    'select rated_strength_n from conductor_types where id = :conductorTypeId',
    { conductorTypeId },
  );
  return row?.ratedStrengthN ?? null;
}

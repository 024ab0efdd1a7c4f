import { randomUUID } from 'node:crypto';
import { z } from 'zod';
import { basisSchema, type Basis, type BasisSpec } from '#shared/contract/bases.ts';
import { keysetPage, type PageRequest } from './cursor.ts';
import type { UtilityTransaction } from './database.ts';
import { instantColumn } from './rows.ts';

const rowSchema = basisSchema.extend({ createdAt: instantColumn });
const columns = `bases.id, bases.name, bases.version_number, bases.is_default, bases.spec, bases.created_at,
  people.display_name as created_by_name,
  not exists (select from bases as later where later.name = bases.name and later.version_number > bases.version_number) as is_latest`;
const from = 'bases left join people on people.id = bases.created_by_person_id';

/** Bases by name, newest version first within a name. */
export function listBases(tx: UtilityTransaction, page: PageRequest) {
  return keysetPage(tx, page, {
    schema: rowSchema,
    columns,
    from,
    where: [],
    bindings: {},
    key: {
      expression: `bases.name || chr(1) || lpad((100000 - bases.version_number)::text, 6, '0')`,
      type: 'text',
      direction: 'ascending',
    },
    id: 'bases.id',
    countFrom: 'bases',
  });
}

export function findBasis(tx: UtilityTransaction, basisId: string): Promise<Basis | null> {
  return tx.first(rowSchema, `select ${columns} from ${from} where bases.id = :basisId`, { basisId });
}

export function findDefaultBasis(tx: UtilityTransaction): Promise<Basis | null> {
  return tx.first(rowSchema, `select ${columns} from ${from} where bases.is_default`);
}

export async function isClimateKnown(tx: UtilityTransaction, climateId: string): Promise<boolean> {
  return (
    (await tx.first(z.object({ id: z.uuid() }), 'select id from climates where id = :climateId', { climateId })) !==
    null
  );
}

/** Saves the next version of a name; versions are never changed afterwards. */
export async function insertBasis(
  tx: UtilityTransaction,
  basis: { name: string; spec: BasisSpec; isDefault: boolean },
): Promise<string> {
  const id = randomUUID();
  if (basis.isDefault) await tx.run('update bases set is_default = false where is_default');
  await tx.run(
    `insert into bases (id, utility_id, name, version_number, spec, is_default, created_by_person_id)
     values (:id, :utilityId, :name, (select coalesce(max(version_number), 0) + 1 from bases where name = :name),
       :spec::jsonb, :isDefault, :personId)`,
    { id, ...tx.actor, name: basis.name, isDefault: basis.isDefault, spec: JSON.stringify(basis.spec) },
  );
  return id;
}

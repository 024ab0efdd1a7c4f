import { randomUUID } from 'node:crypto';
import { z } from 'zod';
import { personSchema } from '#shared/contract/people.ts';
import type { Role } from '#shared/contract/roles.ts';
import { writeAudit } from './audit.ts';
import { keysetPage, type PageRequest } from './cursor.ts';
import type { UtilityTransaction } from './database.ts';
import { instantColumn } from './rows.ts';

interface StatedPerson {
  readonly issuer: string;
  readonly subject: string;
  readonly displayName: string;
  readonly email: string;
  readonly roles: readonly Role[];
}

const savedSchema = z.object({
  personId: z.uuid(),
  utilityCode: z.string(),
  utilityName: z.string(),
  currencyCode: z.string(),
});

/** Keeps name, address and roles as the identity provider states them now; a change of roles is audited. */
export async function savePersonAtSignIn(
  tx: UtilityTransaction,
  person: StatedPerson,
): Promise<z.infer<typeof savedSchema>> {
  const { utilityId } = tx.actor;
  const { issuer, subject, displayName, email } = person;
  const saved = await tx.first(
    savedSchema,
    `with saved as (
       insert into people (id, utility_id, issuer, subject, display_name, email, last_signed_in_at)
       values (:id, :utilityId, :issuer, :subject, :displayName, :email, now())
       on conflict (utility_id, issuer, subject) do update
         set display_name = excluded.display_name, email = excluded.email, last_signed_in_at = now()
       returning id
     )
     select saved.id as person_id, utilities.code as utility_code, utilities.name as utility_name, utilities.currency_code
     from saved, utilities where utilities.id = :utilityId`,
    { id: randomUUID(), utilityId, issuer, subject, displayName, email },
  );
  if (saved === null) throw new Error('the utility of the person vanished during sign-in');
  await replaceRoles(tx, saved.personId, person.roles);
  return saved;
}

/** Names a person before the first sign-in, so that messages reach them; the identity provider has the last word. */
export async function savePersonAhead(tx: UtilityTransaction, person: StatedPerson): Promise<void> {
  const { personId } = await savePersonAtSignIn(tx, person);
  await tx.run('update people set last_signed_in_at = null where id = :personId', { personId });
}

async function replaceRoles(tx: UtilityTransaction, personId: string, roles: readonly Role[]): Promise<void> {
  const before = await tx.rows(
    z.object({ role: z.string() }),
    'select role from person_roles where person_id = :personId',
    { personId },
  );
  const held = before.map(({ role }) => role).sort();
  const stated = [...new Set(roles)].sort();
  if (held.join() === stated.join()) return;
  await tx.run('delete from person_roles where person_id = :personId', { personId });
  await tx.run(
    `insert into person_roles (person_id, utility_id, role)
     select :personId, :utilityId, role::person_role from unnest(:stated::text[]) as role`,
    { personId, utilityId: tx.actor.utilityId, stated },
  );
  await writeAudit(tx, { action: 'change-roles', thingKind: 'person', thingId: personId, before: held, after: stated });
}

/** People of the utility by name. */
export function listPeople(tx: UtilityTransaction, page: PageRequest) {
  return keysetPage(tx, page, {
    schema: personSchema.extend({ lastSignedInAt: instantColumn.nullable() }),
    columns: `people.id, people.display_name, people.email, people.last_signed_in_at,
      coalesce((select json_agg(role order by role) from person_roles where person_id = people.id), '[]') as roles`,
    from: 'people',
    where: [],
    bindings: {},
    key: { expression: 'people.display_name', type: 'text', direction: 'ascending' },
    id: 'people.id',
    countFrom: 'people',
  });
}

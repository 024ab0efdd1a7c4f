import { listAudit } from '#server/data/audit.read-model.ts';
import { listPeople } from '#server/data/people.repository.ts';
import { json } from '#server/http/handler.ts';
import type { Deps } from '../deps.ts';

export const peopleHandlers = ({ database }: Pick<Deps, 'database'>) => ({
  listPeople: json<'listPeople'>(({ actor, query }) => database.withUtility(actor, (tx) => listPeople(tx, query))),
  listAudit: json<'listAudit'>(({ actor, query }) => database.withUtility(actor, (tx) => listAudit(tx, query))),
});

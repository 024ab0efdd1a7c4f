import { listRisk } from '#server/data/risk.read-model.ts';
import { json } from '#server/http/handler.ts';
import type { Deps } from '../deps.ts';

export const riskHandlers = ({ database }: Pick<Deps, 'database'>) => ({
  listRisk: json<'listRisk'>(({ actor, query }) => database.withUtility(actor, (tx) => listRisk(tx, query))),
});

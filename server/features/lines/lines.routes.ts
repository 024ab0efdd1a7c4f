import { listLines, listSpans } from '#server/data/lines.read-model.ts';
import { json } from '#server/http/handler.ts';
import type { Deps } from '../deps.ts';

export const lineHandlers = ({ database }: Pick<Deps, 'database'>) => ({
  listLines: json<'listLines'>(({ actor, query }) => database.withUtility(actor, (tx) => listLines(tx, query))),
  listSpans: json<'listSpans'>(({ actor, query }) => database.withUtility(actor, (tx) => listSpans(tx, query))),
});

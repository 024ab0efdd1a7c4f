import { listSpanWireFindings } from '#server/data/findings.read-model.ts';
import { json } from '#server/http/handler.ts';
import type { Deps } from '../deps.ts';
import { findingService } from './findings.service.ts';

export const findingHandlers = (deps: Pick<Deps, 'database'>) => {
  const service = findingService(deps);
  return {
    getFinding: json<'getFinding'>(({ actor, params }) => service.getFinding(actor, params.findingId)),
    getFindingSeries: json<'getFindingSeries'>(({ actor, params, query }) =>
      service.getSeries(actor, params.findingId, query.frequencyHz ?? null),
    ),
    listSpanWireFindings: json<'listSpanWireFindings'>(({ actor, params, query }) =>
      deps.database.withUtility(actor, (tx) => listSpanWireFindings(tx, params.spanWireId, query)),
    ),
  };
};

import { listAlerts } from '#server/data/alerts.repository.ts';
import { json } from '#server/http/handler.ts';
import type { Deps } from '../deps.ts';
import { alertService } from './alerts.service.ts';

export const alertHandlers = (deps: Pick<Deps, 'database'>) => {
  const service = alertService(deps);
  return {
    listAlerts: json<'listAlerts'>(({ actor, query }) =>
      deps.database.withUtility(actor, (tx) => listAlerts(tx, query)),
    ),
    acknowledgeAlert: json<'acknowledgeAlert'>(({ actor, params, body }) =>
      service.move(actor, { alertId: params.alertId, to: 'acknowledged', note: body.note }),
    ),
    closeAlert: json<'closeAlert'>(({ actor, params, body }) =>
      service.move(actor, { alertId: params.alertId, to: 'closed', note: body.note }),
    ),
  };
};

import type { Alert } from '#shared/contract/alerts.ts';
import { findAlert, moveAlert } from '#server/data/alerts.repository.ts';
import { writeAudit } from '#server/data/audit.ts';
import type { Actor } from '#server/data/database.ts';
import { AppError, notFound } from '#server/platform/errors.ts';
import type { Deps } from '../deps.ts';

interface Move {
  readonly alertId: string;
  readonly to: 'acknowledged' | 'closed';
  readonly note: string;
}

export const alertService = ({ database }: Pick<Deps, 'database'>) => ({
  move: (actor: Actor, { alertId, to, note }: Move): Promise<Alert> =>
    database.withUtility(actor, async (tx) => {
      const before = await findAlert(tx, alertId);
      if (before === null) throw notFound('alert', alertId);
      if (!(await moveAlert(tx, { id: alertId, to, note }))) {
        throw new AppError('wrong-state', `This alert is ${before.state} already.`, { current: before });
      }
      const after = await findAlert(tx, alertId);
      if (after === null) throw notFound('alert', alertId);
      const action = to === 'acknowledged' ? 'acknowledge' : 'close';
      await writeAudit(tx, {
        action,
        thingKind: 'alert',
        thingId: alertId,
        before: { state: before.state, note: before.note },
        after: { state: after.state, note: after.note },
      });
      return after;
    }),
});

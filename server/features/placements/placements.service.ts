import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import type { Placement, plannedPlacementInputSchema } from '#shared/contract/placements.ts';
import { writeAudit } from '#server/data/audit.ts';
import type { Actor, UtilityTransaction } from '#server/data/database.ts';
import {
  endPlacement,
  findPlacement,
  findSpanWireBounds,
  insertPlacement,
  isDistanceTaken,
  type NewPlacement,
} from '#server/data/placements.repository.ts';
import { AppError, invalidField, notFound } from '#server/platform/errors.ts';
import type { Deps } from '../deps.ts';

/** Refuses a damper beyond the middle of its span or within a centimetre of another. */
export async function checkPlace(
  tx: UtilityTransaction,
  place: Pick<NewPlacement, 'spanWireId' | 'side' | 'state' | 'distanceM'>,
): Promise<void> {
  const bounds = await findSpanWireBounds(tx, place.spanWireId);
  if (bounds === null) throw notFound('span wire', place.spanWireId);
  const middleM = bounds.spanLengthM / 2;
  if (place.distanceM >= middleM) {
    throw invalidField(
      '/distanceM',
      `must be below ${middleM.toFixed(1)} m, the middle of the span: log it from the other end (got ${place.distanceM})`,
    );
  }
  if (await isDistanceTaken(tx, place)) {
    throw new AppError('duplicate', `A damper stands at ${place.distanceM} m already on this side.`, {
      errors: [{ pointer: '/distanceM', message: 'another damper is within a centimetre of this distance' }],
    });
  }
}

/** Adds a placement and reads it back. */
export async function addPlacement(tx: UtilityTransaction, placement: NewPlacement): Promise<Placement> {
  await checkPlace(tx, placement);
  await insertPlacement(tx, placement);
  const added = await findPlacement(tx, placement.id);
  if (added === null) throw notFound('placement', placement.id);
  return added;
}

export const placementService = ({ database }: Pick<Deps, 'database'>) => ({
  plan: (actor: Actor, input: z.infer<typeof plannedPlacementInputSchema>): Promise<Placement> =>
    database.withUtility(actor, async (tx) => {
      const { id = randomUUID(), ...rest } = input;
      const added = await addPlacement(tx, {
        ...rest,
        id,
        state: 'planned',
        plannedDistanceM: null,
        replacesPlacementId: null,
        startedAt: new Date().toISOString(),
        photoFileId: null,
      });
      await writeAudit(tx, { action: 'plan', thingKind: 'placement', thingId: id, after: added });
      return added;
    }),
  withdraw: (actor: Actor, placementId: string, versionNumber: number): Promise<void> =>
    database.withUtility(actor, async (tx) => {
      const before = await findPlacement(tx, placementId);
      if (before === null) throw notFound('placement', placementId);
      if (before.state !== 'planned')
        throw new AppError(
          'wrong-state',
          'Only planned dampers can be withdrawn; a fitted one is replaced by a field log.',
        );
      await endPlacement(tx, { id: placementId, endedAt: new Date().toISOString(), versionNumber });
      await writeAudit(tx, { action: 'withdraw', thingKind: 'placement', thingId: placementId, before });
    }),
});

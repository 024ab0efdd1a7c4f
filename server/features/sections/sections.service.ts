import type { Section, Wire, wirePatchSchema } from '#shared/contract/sections.ts';
import type { z } from 'zod';
import { writeAudit } from '#server/data/audit.ts';
import type { Actor, UtilityTransaction } from '#server/data/database.ts';
import { readSection } from '#server/data/sections.read-model.ts';
import { markStale } from '#server/data/staleness.ts';
import { findRatedStrengthN, findWire, updateWire } from '#server/data/wires.repository.ts';
import { AppError, invalidField, notFound } from '#server/platform/errors.ts';
import type { Deps } from '../deps.ts';

interface WireEdit {
  readonly wireId: string;
  readonly versionNumber: number;
  readonly patch: z.infer<typeof wirePatchSchema>;
}

async function editWire(tx: UtilityTransaction, { wireId, versionNumber, patch }: WireEdit): Promise<Wire> {
  const before = await findWire(tx, wireId);
  if (before === null) throw notFound('wire', wireId);
  const stale = (current: Wire) =>
    new AppError(
      'stale-version',
      'Somebody changed this wire since you read it. Both versions are here; decide and save again.',
      { current, submitted: patch },
    );
  if (before.versionNumber !== versionNumber) throw stale(before);
  const tensionN = patch.tensionN ?? before.tensionN;
  const conductorTypeId = patch.conductorTypeId ?? before.conductorTypeId;
  const ratedStrengthN = await findRatedStrengthN(tx, conductorTypeId);
  if (ratedStrengthN === null) throw invalidField('/conductorTypeId', 'is not in the conductor catalogue');
  if (tensionN > ratedStrengthN) {
    throw invalidField(
      '/tensionN',
      `must be below the rated strength of the conductor, ${Math.round(ratedStrengthN)} N (got ${tensionN})`,
    );
  }
  if (!(await updateWire(tx, { id: wireId, versionNumber, tensionN, conductorTypeId })))
    throw stale((await findWire(tx, wireId)) ?? before);
  const after = await findWire(tx, wireId);
  if (after === null) throw notFound('wire', wireId);
  await markStale(tx, { kind: 'wire', wireId }, 'Conductor or tension of the wire was changed');
  await writeAudit(tx, { action: 'edit', thingKind: 'wire', thingId: wireId, before, after });
  return after;
}

export const sectionService = ({ database }: Pick<Deps, 'database'>) => ({
  getSection: async (actor: Actor, sectionId: string): Promise<Section> => {
    const section = await database.withUtility(actor, (tx) => readSection(tx, sectionId));
    if (section === null) throw notFound('section', sectionId);
    return section;
  },
  editWire: (actor: Actor, edit: WireEdit): Promise<Wire> => database.withUtility(actor, (tx) => editWire(tx, edit)),
});

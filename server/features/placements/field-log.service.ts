import { createHash } from 'node:crypto';
import type { z } from 'zod';
import type { FieldLog, fieldLogInputSchema, Placement } from '#shared/contract/placements.ts';
import { insertAssessment } from '#server/data/assessments.repository.ts';
import { writeAudit } from '#server/data/audit.ts';
import { findDefaultBasis } from '#server/data/bases.repository.ts';
import type { Actor, UtilityTransaction } from '#server/data/database.ts';
import { findFieldLogHash, insertFieldLog, readGrade } from '#server/data/field-logs.repository.ts';
import { findFieldLog } from '#server/data/field.read-model.ts';
import { askForJob } from '#server/data/outbox.ts';
import { endPlacement, findPlacement, findSpanWireBounds } from '#server/data/placements.repository.ts';
import { markStale } from '#server/data/staleness.ts';
import { findFile } from '#server/data/stored-files.repository.ts';
import { AppError, invalidField, notFound } from '#server/platform/errors.ts';
import type { Deps } from '../deps.ts';
import { addPlacement } from './placements.service.ts';

type FieldLogInput = z.infer<typeof fieldLogInputSchema>;
const clockSlackMs = 10 * 60_000;

async function replacedPlacement(tx: UtilityTransaction, input: FieldLogInput): Promise<Placement | null> {
  if (input.replacesPlacementId === null) return null;
  const replaced = await findPlacement(tx, input.replacesPlacementId);
  if (replaced === null) throw notFound('placement', input.replacesPlacementId);
  if (replaced.spanWireId !== input.spanWireId || replaced.side !== input.side) {
    throw invalidField('/replacesPlacementId', 'is a damper of another wire or side');
  }
  return replaced;
}

async function fit(tx: UtilityTransaction, input: FieldLogInput): Promise<Placement> {
  if (Date.parse(input.fittedAt) > Date.now() + clockSlackMs) throw invalidField('/fittedAt', 'lies in the future');
  if (input.photoFileId !== null && (await findFile(tx, input.photoFileId, 'photo')) === null) {
    throw invalidField('/photoFileId', 'is not an uploaded photo');
  }
  const replaced = await replacedPlacement(tx, input);
  if (replaced !== null) await endPlacement(tx, { id: replaced.id, endedAt: input.fittedAt });
  return addPlacement(tx, {
    id: input.id,
    spanWireId: input.spanWireId,
    side: input.side,
    damperTypeId: input.damperTypeId,
    distanceM: input.distanceM,
    plannedDistanceM: replaced?.plannedDistanceM ?? (replaced?.state === 'planned' ? replaced.distanceM : null),
    state: 'as-built',
    replacesPlacementId: replaced?.id ?? null,
    startedAt: input.fittedAt,
    photoFileId: input.photoFileId,
    note: input.note,
  });
}

/** Queues the assessment of the span that changed; without a default basis there is nothing to assess it against. */
async function reassess(tx: UtilityTransaction, input: FieldLogInput, placement: Placement): Promise<string | null> {
  const basis = await findDefaultBasis(tx);
  const bounds = await findSpanWireBounds(tx, input.spanWireId);
  if (basis === null || bounds === null) return null;
  await insertAssessment(tx, {
    id: input.id,
    title: `Damper fitted: ${placement.damperTypeName}`,
    basisId: basis.id,
    selection: { kind: 'spans', spanIds: [bounds.spanId] },
    cause: 'field-log',
  });
  const payload = { payloadVersion: 1 as const, utilityId: tx.actor.utilityId, assessmentId: input.id };
  await askForJob(tx, { name: 'run-assessment', payload, dedupeKey: `run-assessment-${input.id}-first` });
  return input.id;
}

async function log(tx: UtilityTransaction, input: FieldLogInput): Promise<FieldLog> {
  const requestHash = createHash('sha256').update(JSON.stringify(input)).digest('hex');
  const formerHash = await findFieldLogHash(tx, input.id);
  if (formerHash === null) {
    const gradeBefore = await readGrade(tx, input.spanWireId);
    const placement = await fit(tx, input);
    await markStale(
      tx,
      { kind: 'span-wire', spanWireId: input.spanWireId },
      'A damper was fitted since the assessment',
    );
    const assessmentId = await reassess(tx, input, placement);
    await insertFieldLog(tx, {
      id: input.id,
      placementId: placement.id,
      fittedAt: input.fittedAt,
      gradeBefore,
      assessmentId,
      requestHash,
    });
    await writeAudit(tx, { action: 'log', thingKind: 'placement', thingId: placement.id, after: placement });
  } else if (formerHash !== requestHash) {
    throw new AppError(
      'duplicate',
      'A field log with this id exists and says something else. Log it again as a new one.',
    );
  }
  const saved = await findFieldLog(tx, input.id);
  if (saved === null) throw notFound('field log', input.id);
  return saved;
}

export const fieldLogService = ({ database, jobs }: Pick<Deps, 'database' | 'jobs'>) => ({
  create: async (actor: Actor, input: FieldLogInput): Promise<FieldLog> => {
    const saved = await database.withUtility(actor, (tx) => log(tx, input));
    jobs.outboxFilled();
    return saved;
  },
});

import { z } from 'zod';
import { gradeSchema, type Grade } from '#shared/contract/grades.ts';
import type { UtilityTransaction } from './database.ts';

/** Digest of a stored log, or null; two deliveries of the same log are told apart from two logs with one id. */
export async function findFieldLogHash(tx: UtilityTransaction, id: string): Promise<string | null> {
  const row = await tx.first(
    z.object({ requestHash: z.string() }),
    'select request_hash from field_logs where id = :id',
    { id },
  );
  return row?.requestHash ?? null;
}

/** Current grade of a span wire, or null. */
export async function readGrade(tx: UtilityTransaction, spanWireId: string): Promise<Grade | null> {
  const row = await tx.first(
    z.object({ grade: gradeSchema.nullable() }),
    'select grade from span_wires where id = :spanWireId',
    { spanWireId },
  );
  return row?.grade ?? null;
}

export async function insertFieldLog(
  tx: UtilityTransaction,
  log: {
    id: string;
    placementId: string;
    fittedAt: string;
    gradeBefore: Grade | null;
    assessmentId: string | null;
    requestHash: string;
  },
): Promise<void> {
  await tx.run(
    `insert into field_logs (id, utility_id, placement_id, person_id, fitted_at, grade_before, assessment_id, request_hash)
     values (:id, :utilityId, :placementId, :personId, :fittedAt::timestamptz, :gradeBefore::grade, :assessmentId, :requestHash)`,
    { ...log, ...tx.actor },
  );
}

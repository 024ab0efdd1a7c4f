import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import type { Assessment, assessmentInputSchema } from '#shared/contract/assessments.ts';
import {
  countSelection,
  findAssessment,
  insertAssessment,
  requestCancel,
  requeueAssessment,
} from '#server/data/assessments.repository.ts';
import { writeAudit } from '#server/data/audit.ts';
import { findBasis, findDefaultBasis } from '#server/data/bases.repository.ts';
import type { Actor, UtilityTransaction } from '#server/data/database.ts';
import { askForJob } from '#server/data/outbox.ts';
import { AppError, invalidField, notFound } from '#server/platform/errors.ts';
import type { Deps } from '../deps.ts';

type AssessmentInput = z.infer<typeof assessmentInputSchema>;

async function basisOf(tx: UtilityTransaction, basisId: string | undefined) {
  const basis = basisId === undefined ? await findDefaultBasis(tx) : await findBasis(tx, basisId);
  if (basis !== null) return basis;
  throw invalidField(
    '/basisId',
    basisId === undefined ? 'is required: the utility has no default basis' : 'is not a basis of this utility',
  );
}

async function readOrRefuse(tx: UtilityTransaction, assessmentId: string): Promise<Assessment> {
  const found = await findAssessment(tx, assessmentId);
  if (found === null) throw notFound('assessment', assessmentId);
  return found;
}

const runJob = (utilityId: string, assessmentId: string, turn: string) => ({
  name: 'run-assessment' as const,
  payload: { payloadVersion: 1 as const, utilityId, assessmentId },
  dedupeKey: `run-assessment-${assessmentId}-${turn}`,
});

async function create(tx: UtilityTransaction, input: AssessmentInput): Promise<Assessment> {
  const basis = await basisOf(tx, input.basisId);
  const { namedCount, foundCount } = await countSelection(tx, input.selection);
  if (foundCount < namedCount) {
    throw invalidField(
      '/selection',
      `${namedCount - foundCount} of the ${namedCount} picked things are not in this utility's lines`,
    );
  }
  const id = input.id ?? randomUUID();
  const title = input.title === '' ? `${basis.name} v${basis.versionNumber}` : input.title;
  await insertAssessment(tx, { id, title, basisId: basis.id, selection: input.selection, cause: 'engineer' });
  await askForJob(tx, runJob(tx.actor.utilityId, id, 'first'));
  await writeAudit(tx, {
    action: 'create',
    thingKind: 'assessment',
    thingId: id,
    after: { title, basisId: basis.id, selectionKind: input.selection.kind },
  });
  return readOrRefuse(tx, id);
}

export const assessmentService = ({ database, jobs }: Pick<Deps, 'database' | 'jobs'>) => ({
  get: (actor: Actor, assessmentId: string) => database.withUtility(actor, (tx) => readOrRefuse(tx, assessmentId)),
  create: async (actor: Actor, input: AssessmentInput): Promise<Assessment> => {
    const created = await database.withUtility(actor, (tx) => create(tx, input));
    jobs.outboxFilled();
    return created;
  },
  cancel: async (actor: Actor, assessmentId: string): Promise<Assessment> => {
    const cancelled = await database.withUtility(actor, async (tx) => {
      const before = await readOrRefuse(tx, assessmentId);
      if (!(await requestCancel(tx, assessmentId))) {
        throw new AppError('wrong-state', `This assessment is ${before.state} already.`, { current: before });
      }
      await writeAudit(tx, { action: 'cancel', thingKind: 'assessment', thingId: assessmentId });
      return readOrRefuse(tx, assessmentId);
    });
    jobs.cancelRequested(assessmentId);
    return cancelled;
  },
  retry: async (actor: Actor, assessmentId: string): Promise<Assessment> => {
    const queued = await database.withUtility(actor, async (tx) => {
      const before = await readOrRefuse(tx, assessmentId);
      if (!(await requeueAssessment(tx, assessmentId))) {
        throw new AppError(
          'wrong-state',
          `Only a failed or cancelled assessment can go on; this one is ${before.state}.`,
          { current: before },
        );
      }
      await askForJob(tx, runJob(tx.actor.utilityId, assessmentId, randomUUID()));
      await writeAudit(tx, { action: 'retry', thingKind: 'assessment', thingId: assessmentId });
      return readOrRefuse(tx, assessmentId);
    });
    jobs.outboxFilled();
    return queued;
  },
});

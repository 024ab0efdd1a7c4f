import { findProgress, listAssessments } from '#server/data/assessments.repository.ts';
import { listAssessmentFindings } from '#server/data/findings.read-model.ts';
import { json, type Call } from '#server/http/handler.ts';
import type { Deps } from '../deps.ts';
import { assessmentService } from './assessments.service.ts';

export const assessmentHandlers = (deps: Pick<Deps, 'database' | 'jobs' | 'progress'>) => {
  const { database, progress } = deps;
  const service = assessmentService(deps);
  return {
    listAssessments: json<'listAssessments'>(({ actor, query }) =>
      database.withUtility(actor, (tx) => listAssessments(tx, query)),
    ),
    createAssessment: json<'createAssessment'>(({ actor, body }) => service.create(actor, body)),
    getAssessment: json<'getAssessment'>(({ actor, params }) => service.get(actor, params.assessmentId)),
    listAssessmentFindings: json<'listAssessmentFindings'>(({ actor, params, query }) =>
      database.withUtility(actor, (tx) => listAssessmentFindings(tx, params.assessmentId, query)),
    ),
    cancelAssessment: json<'cancelAssessment'>(({ actor, params }) => service.cancel(actor, params.assessmentId)),
    retryAssessment: json<'retryAssessment'>(({ actor, params }) => service.retry(actor, params.assessmentId)),
    watchAssessment: {
      kind: 'events' as const,
      open: async ({ actor, params }: Call<'watchAssessment'>) => {
        const { id } = await service.get(actor, params.assessmentId);
        const read = () => database.withUtility(actor, (tx) => findProgress(tx, id));
        return (signal: AbortSignal) => progress.follow({ kind: 'assessment', id }, read, signal);
      },
    },
  };
};

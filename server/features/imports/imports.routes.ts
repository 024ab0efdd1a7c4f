import { findImportProgress, listImportRuns } from '#server/data/import-runs.repository.ts';
import { json, type Call } from '#server/http/handler.ts';
import type { Deps } from '../deps.ts';
import { importService } from './imports.service.ts';

export const importHandlers = (deps: Pick<Deps, 'database' | 'files' | 'jobs' | 'progress'>) => {
  const { database, progress } = deps;
  const service = importService(deps);
  return {
    createImport: json<'createImport'>(({ actor, request }) => service.create(actor, request)),
    listImports: json<'listImports'>(({ actor, query }) =>
      database.withUtility(actor, (tx) => listImportRuns(tx, query)),
    ),
    getImport: json<'getImport'>(({ actor, params }) => service.get(actor, params.importId)),
    watchImport: {
      kind: 'events' as const,
      open: async ({ actor, params }: Call<'watchImport'>) => {
        const { id } = await service.get(actor, params.importId);
        const read = () => database.withUtility(actor, (tx) => findImportProgress(tx, id));
        return (signal: AbortSignal) => progress.follow({ kind: 'import', id }, read, signal);
      },
    },
  };
};

import { listFieldLogs, listFieldStructures, readStructureWork } from '#server/data/field.read-model.ts';
import { json, type Call } from '#server/http/handler.ts';
import { notFound } from '#server/platform/errors.ts';
import type { Deps } from '../deps.ts';
import { fieldLogService } from './field-log.service.ts';
import { photoService } from './photos.service.ts';
import { placementService } from './placements.service.ts';

export const placementHandlers = (deps: Pick<Deps, 'database' | 'jobs' | 'files'>) => {
  const { database } = deps;
  const placements = placementService(deps);
  const logs = fieldLogService(deps);
  const photos = photoService(deps);
  return {
    createPlannedPlacement: json<'createPlannedPlacement'>(({ actor, body }) => placements.plan(actor, body)),
    removePlannedPlacement: json<'removePlannedPlacement'>(async ({ actor, params, version }) => {
      await placements.withdraw(actor, params.placementId, version ?? 0);
      return null;
    }),
    listFieldStructures: json<'listFieldStructures'>(({ actor, query }) =>
      database.withUtility(actor, (tx) => listFieldStructures(tx, query)),
    ),
    getFieldStructure: json<'getFieldStructure'>(async ({ actor, params: { structureId } }) => {
      const work = await database.withUtility(actor, (tx) => readStructureWork(tx, structureId));
      if (work === null) throw notFound('structure', structureId);
      return work;
    }),
    createFieldLog: json<'createFieldLog'>(({ actor, body }) => logs.create(actor, body)),
    listFieldLogs: json<'listFieldLogs'>(({ actor, query }) =>
      database.withUtility(actor, (tx) => listFieldLogs(tx, query)),
    ),
    uploadPhoto: json<'uploadPhoto'>(({ actor, params, request }) => photos.upload(actor, params.fileId, request)),
    getPhoto: {
      kind: 'file' as const,
      read: ({ actor, params }: Call<'getPhoto'>) => photos.read(actor, params.fileId),
    },
  };
};

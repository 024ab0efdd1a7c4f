import { json } from '#server/http/handler.ts';
import type { Deps } from '../deps.ts';
import { sectionService } from './sections.service.ts';

export const sectionHandlers = (deps: Pick<Deps, 'database'>) => {
  const service = sectionService(deps);
  return {
    getSection: json<'getSection'>(({ actor, params }) => service.getSection(actor, params.sectionId)),
    editWire: json<'editWire'>(({ actor, params, body, version }) =>
      service.editWire(actor, { wireId: params.wireId, versionNumber: version ?? 0, patch: body }),
    ),
  };
};

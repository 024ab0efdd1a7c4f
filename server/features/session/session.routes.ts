import { json } from '#server/http/handler.ts';
import type { Deps } from '../deps.ts';

export const sessionHandlers = ({ config }: Pick<Deps, 'config'>) => ({
  getSession: json<'getSession'>(async ({ person }) => ({
    person: { id: person.personId, displayName: person.displayName, email: person.email },
    utility: {
      id: person.utilityId,
      code: person.utilityCode,
      name: person.utilityName,
      currencyCode: person.currencyCode,
    },
    roles: [...person.roles],
    csrfToken: person.csrfToken,
    idleTimeoutMs: config.STILLSPAN_SESSION_IDLE_MINUTES * 60_000,
    tileUrl: config.STILLSPAN_TILE_URL ?? null,
  })),
});

import type { Handlers } from '#server/http/handler.ts';
import { alertHandlers } from './alerts/alerts.routes.ts';
import { assessmentHandlers } from './assessments/assessments.routes.ts';
import { basisHandlers } from './bases/bases.routes.ts';
import { catalogueHandlers } from './catalogue/catalogue.routes.ts';
import type { Deps } from './deps.ts';
import { findingHandlers } from './findings/findings.routes.ts';
import { importHandlers } from './imports/imports.routes.ts';
import { lineHandlers } from './lines/lines.routes.ts';
import { mapHandlers } from './map/map.routes.ts';
import { peopleHandlers } from './people/people.routes.ts';
import { placementHandlers } from './placements/placements.routes.ts';
import { riskHandlers } from './risk/risk.routes.ts';
import { sectionHandlers } from './sections/sections.routes.ts';
import { sessionHandlers } from './session/session.routes.ts';

/** Every handler of the contract; the type says when one is missing. */
export function handlersOf(deps: Deps): Handlers {
  return {
    ...sessionHandlers(deps),
    ...mapHandlers(deps),
    ...lineHandlers(deps),
    ...sectionHandlers(deps),
    ...placementHandlers(deps),
    ...findingHandlers(deps),
    ...assessmentHandlers(deps),
    ...riskHandlers(deps),
    ...alertHandlers(deps),
    ...catalogueHandlers(deps),
    ...basisHandlers(deps),
    ...importHandlers(deps),
    ...peopleHandlers(deps),
  };
}

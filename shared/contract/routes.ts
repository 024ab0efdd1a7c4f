import { alertRoutes } from './alerts.ts';
import { assessmentRoutes } from './assessments.ts';
import { basisRoutes } from './bases.ts';
import { catalogueRoutes } from './catalogue.ts';
import { findingRoutes } from './findings.ts';
import { importRoutes } from './imports.ts';
import { lineRoutes } from './lines.ts';
import { mapRoutes } from './map.ts';
import { peopleRoutes } from './people.ts';
import { placementRoutes } from './placements.ts';
import { riskRoutes } from './risk.ts';
import { sectionRoutes } from './sections.ts';
import { sessionRoutes } from './session.ts';

/** Every route of the API by its operation id. */
export const apiRoutes = {
  ...sessionRoutes,
  ...mapRoutes,
  ...lineRoutes,
  ...sectionRoutes,
  ...placementRoutes,
  ...findingRoutes,
  ...assessmentRoutes,
  ...riskRoutes,
  ...alertRoutes,
  ...catalogueRoutes,
  ...basisRoutes,
  ...importRoutes,
  ...peopleRoutes,
};
export type ApiRoutes = typeof apiRoutes;
export type RouteName = keyof ApiRoutes;
export const apiPrefix = '/api/v1';

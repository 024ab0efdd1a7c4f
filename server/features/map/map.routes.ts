import {
  readExtent,
  readMapSections,
  readMapSpans,
  readMapStructures,
  readMapTerrain,
} from '#server/data/map.read-model.ts';
import { json } from '#server/http/handler.ts';
import type { Deps } from '../deps.ts';

export const mapHandlers = ({ database }: Pick<Deps, 'database'>) => ({
  getMapExtent: json<'getMapExtent'>(({ actor }) => database.withUtility(actor, readExtent)),
  getMapSections: json<'getMapSections'>(({ actor, query }) =>
    database.withUtility(actor, (tx) => readMapSections(tx, query.bboxDeg)),
  ),
  getMapSpans: json<'getMapSpans'>(({ actor, query }) =>
    database.withUtility(actor, (tx) => readMapSpans(tx, query.bboxDeg)),
  ),
  getMapStructures: json<'getMapStructures'>(({ actor, query }) =>
    database.withUtility(actor, (tx) => readMapStructures(tx, query.bboxDeg)),
  ),
  getMapTerrain: json<'getMapTerrain'>(({ actor, query }) =>
    database.withUtility(actor, (tx) => readMapTerrain(tx, query.bboxDeg)),
  ),
});

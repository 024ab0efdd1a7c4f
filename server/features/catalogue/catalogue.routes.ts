import { writeAudit } from '#server/data/audit.ts';
import {
  findTerrainZone,
  listClimates,
  listConductorTypes,
  listDamperTypes,
  listTerrainZones,
  updateTerrainZone,
} from '#server/data/catalogue.read-model.ts';
import { markStale } from '#server/data/staleness.ts';
import { json } from '#server/http/handler.ts';
import { AppError, notFound } from '#server/platform/errors.ts';
import type { Deps } from '../deps.ts';

export const catalogueHandlers = ({ database }: Pick<Deps, 'database'>) => ({
  listConductorTypes: json<'listConductorTypes'>(({ actor, query }) =>
    database.withUtility(actor, (tx) => listConductorTypes(tx, query)),
  ),
  listDamperTypes: json<'listDamperTypes'>(({ actor, query }) =>
    database.withUtility(actor, (tx) => listDamperTypes(tx, query)),
  ),
  listClimates: json<'listClimates'>(({ actor, query }) =>
    database.withUtility(actor, (tx) => listClimates(tx, query)),
  ),
  listTerrainZones: json<'listTerrainZones'>(({ actor, query }) =>
    database.withUtility(actor, (tx) => listTerrainZones(tx, query)),
  ),
  editTerrainZone: json<'editTerrainZone'>(({ actor, params: { terrainZoneId }, body, version }) =>
    database.withUtility(actor, async (tx) => {
      const before = await findTerrainZone(tx, terrainZoneId);
      if (before === null) throw notFound('terrain zone', terrainZoneId);
      const zone = {
        id: terrainZoneId,
        versionNumber: version ?? 0,
        name: body.name ?? before.name,
        roughnessM: body.roughnessM ?? before.roughnessM,
      };
      if (!(await updateTerrainZone(tx, zone))) {
        const current = await findTerrainZone(tx, terrainZoneId);
        throw new AppError('stale-version', 'Somebody changed this terrain zone since you read it.', {
          current,
          submitted: body,
        });
      }
      const after = await findTerrainZone(tx, terrainZoneId);
      if (after === null) throw notFound('terrain zone', terrainZoneId);
      if (after.roughnessM !== before.roughnessM) {
        await markStale(tx, { kind: 'terrain-zone', terrainZoneId }, `Terrain of zone ${after.name} was changed`);
      }
      await writeAudit(tx, {
        action: 'edit',
        thingKind: 'terrain-zone',
        thingId: terrainZoneId,
        before: { name: before.name, roughnessM: before.roughnessM },
        after: { name: after.name, roughnessM: after.roughnessM },
      });
      return after;
    }),
  ),
});

import { writeAudit } from '#server/data/audit.ts';
import { findBasis, insertBasis, isClimateKnown, listBases } from '#server/data/bases.repository.ts';
import { json } from '#server/http/handler.ts';
import { invalidField, notFound } from '#server/platform/errors.ts';
import type { Deps } from '../deps.ts';

export const basisHandlers = ({ database }: Pick<Deps, 'database'>) => ({
  listBases: json<'listBases'>(({ actor, query }) => database.withUtility(actor, (tx) => listBases(tx, query))),
  createBasis: json<'createBasis'>(({ actor, body }) =>
    database.withUtility(actor, async (tx) => {
      const { climateId } = body.spec;
      if (climateId !== null && !(await isClimateKnown(tx, climateId))) {
        throw invalidField('/spec/climateId', 'is not in the catalogue of climates');
      }
      const id = await insertBasis(tx, body);
      const saved = await findBasis(tx, id);
      if (saved === null) throw notFound('basis', id);
      await writeAudit(tx, { action: 'create', thingKind: 'basis', thingId: id, after: saved });
      return saved;
    }),
  ),
});

import type { z } from 'zod';
import { climateSectorSchema } from '#shared/contract/catalogue.ts';
import { damperModelSchema } from '#shared/contract/dampers.ts';
import { insertChunks, markFrozen, type AssessmentRun } from '#server/data/assessment-run.repository.ts';
import type { UtilityTransaction } from '#server/data/database.ts';
import {
  selectClimate,
  selectConductors,
  selectDamperTypes,
  selectSpanWires,
  selectStandingPlacements,
  type SelectedItem,
} from '#server/data/freeze.repository.ts';
import type { FrozenChunk, FrozenItem } from '#server/data/frozen-input.ts';

/** Span wires in a chunk: small enough that a cancelled or killed chunk costs little, large enough for bulk writes. */
export const chunkSize = 200;
const chunksPerInsert = 20;

interface Catalogue {
  readonly conductors: FrozenChunk['conductors'];
  readonly damperTypes: FrozenChunk['damperTypes'];
  readonly climate: FrozenChunk['climate'];
}
type Placements = Map<string, FrozenItem['placements']>;

async function readPlacements(tx: UtilityTransaction, run: AssessmentRun): Promise<Placements> {
  const bySpanWire: Placements = new Map();
  for (const { spanWireId, ...placement } of await selectStandingPlacements(tx, run.selection)) {
    const list = bySpanWire.get(spanWireId) ?? [];
    list.push(placement);
    bySpanWire.set(spanWireId, list);
  }
  return bySpanWire;
}

async function readCatalogue(
  tx: UtilityTransaction,
  run: AssessmentRun,
  named: { conductorTypeIds: string[]; damperTypeIds: string[] },
): Promise<Catalogue> {
  const conductors = await selectConductors(tx, named.conductorTypeIds);
  const damperTypes = await selectDamperTypes(tx, named.damperTypeIds);
  const climateId = run.basisSpec.climateId;
  const climate = climateId === null ? null : await selectClimate(tx, climateId);
  return {
    conductors: Object.fromEntries(conductors.map(({ id, ...conductor }) => [id, conductor])),
    damperTypes: Object.fromEntries(
      damperTypes.map(({ id, model, ...type }) => [id, { ...type, model: damperModelSchema.parse(model) }]),
    ),
    climate: climate === null ? null : { ...climate, sectors: sectorsOf(climate.sectors) },
  };
}

function sectorsOf(stored: unknown): z.infer<typeof climateSectorSchema>[] {
  return climateSectorSchema.array().parse(stored);
}

function only<T>(record: Readonly<Record<string, T>>, keys: Iterable<string>): Record<string, T> {
  const wanted = new Set(keys);
  return Object.fromEntries(Object.entries(record).filter(([key]) => wanted.has(key)));
}

function chunkOf(run: AssessmentRun, catalogue: Catalogue, items: FrozenItem[]): FrozenChunk {
  return {
    basis: { name: run.basisName, versionNumber: run.basisVersionNumber, spec: run.basisSpec },
    climate: catalogue.climate,
    conductors: only(
      catalogue.conductors,
      items.map(({ conductorTypeId }) => conductorTypeId),
    ),
    damperTypes: only(
      catalogue.damperTypes,
      items.flatMap(({ placements }) => placements.map(({ damperTypeId }) => damperTypeId)),
    ),
    items,
  };
}

/** Raised to roll the freezing back when somebody asked the assessment to stop. */
export class FreezingStopped extends Error {
  override readonly name = 'FreezingStopped';
}

async function writeChunks(
  tx: UtilityTransaction,
  run: AssessmentRun,
  work: { chunks: FrozenChunk[]; signal: AbortSignal },
): Promise<void> {
  const { chunks, signal } = work;
  for (let first = 0; first < chunks.length; first += chunksPerInsert) {
    if (signal.aborted) throw new FreezingStopped();
    const batch = chunks.slice(first, first + chunksPerInsert);
    await insertChunks(
      tx,
      run.id,
      batch.map((input, offset) => ({ chunkIndex: first + offset, input })),
    );
  }
}

function itemsOf(selected: readonly SelectedItem[], placements: Placements): FrozenItem[] {
  return selected.map((item) => ({ ...item, placements: placements.get(item.spanWireId) ?? [] }));
}

/** Copies everything an assessment rests on into its chunks; returns how many chunks there are. */
export async function freezeInput(tx: UtilityTransaction, run: AssessmentRun, signal: AbortSignal): Promise<number> {
  const placements = await readPlacements(tx, run);
  const items = itemsOf(await selectSpanWires(tx, run.selection), placements);
  const catalogue = await readCatalogue(tx, run, {
    conductorTypeIds: [...new Set(items.map(({ conductorTypeId }) => conductorTypeId))],
    damperTypeIds: [...new Set([...placements.values()].flat().map(({ damperTypeId }) => damperTypeId))],
  });
  const chunks: FrozenChunk[] = [];
  for (let first = 0; first < items.length; first += chunkSize) {
    chunks.push(chunkOf(run, catalogue, items.slice(first, first + chunkSize)));
  }
  await writeChunks(tx, run, { chunks, signal });
  await markFrozen(tx, run.id, items.length);
  return chunks.length;
}

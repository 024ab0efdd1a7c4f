import { randomUUID } from 'node:crypto';
import type { BasisSpec } from '#shared/contract/bases.ts';
import type { DamperModel } from '#shared/contract/dampers.ts';
import { insertBasis } from '#server/data/bases.repository.ts';
import { insertConductorTypes, insertDamperTypes } from '#server/data/catalogue-import.ts';
import type { Actor, Database } from '#server/data/database.ts';
import type { LineRecord, StructureRecord } from '#server/data/line-import-records.ts';
import { saveLines } from '#server/data/line-import.ts';

export const systemActor = (utilityId: string): Actor => ({ utilityId, personId: null, requestId: null });

export const aBasisSpec = (more: Partial<BasisSpec> = {}): BasisSpec => ({
  windBand: { lowerMPerS: 1, upperMPerS: 7 },
  frequencyCount: 40,
  methods: {},
  limits: {
    enduranceMultiLayerPa: 8.5e6,
    enduranceSingleLayerPa: 22.5e6,
    enduranceAlloyPa: 5.7e6,
    enduranceSource: 'from memory (EPRI), for tests',
    damperedStrainRatio: 150e-6,
    damperedStrainConvention: 'peak-to-peak',
    damperedStrainSource: 'Diana and others 2003 (published)',
  },
  governs: 'limit',
  thresholds: {
    noticeFromRatio: 0.8,
    actFromRatio: 1,
    urgentFromRatio: 1.5,
    noticeBelowYears: 100,
    actBelowYears: 40,
    urgentBelowYears: 10,
  },
  climateId: null,
  airDensityKgPerM3: 1.225,
  digestFromCount: 20,
  ...more,
});

/** Half-damper parameters of the engine's worked example; the damper is invented, its mechanics are checked there. */
export const anInventedDamper: DamperModel = {
  kind: 'halves',
  clampMassKg: 0.4,
  halves: [
    { massKg: 1.5, inertiaKgM2: 0.004, armLengthM: 0.2, armStiffnessNm2: 30, offsetM: 0.05, lossRatio: 0.3 },
    { massKg: 2.5, inertiaKgM2: 0.01, armLengthM: 0.26, armStiffnessNm2: 30, offsetM: 0.05, lossRatio: 0.3 },
  ],
};

export interface Network {
  readonly lineId: string;
  readonly sectionIds: string[];
  readonly spanIds: string[];
  readonly structureIds: string[];
  readonly wireIds: string[];
  readonly conductorTypeId: string;
  readonly damperTypeId: string;
  readonly basisId: string;
}

interface NetworkOptions {
  readonly sectionCount?: number;
  readonly spansPerSectionCount?: number;
  readonly wireCount?: number;
  readonly tensionRatedRatio?: number;
  readonly roughnessM?: number;
  readonly basis?: Partial<BasisSpec>;
  readonly firstLatitudeDeg?: number;
}

const ratedStrengthN = 138_785;
const spanStepDeg = 0.004;

function structureAt(index: number, place: { perSection: number; latitudeDeg: number }): StructureRecord {
  return {
    id: randomUUID(),
    name: String(index + 1),
    kind: index % place.perSection === 0 ? 'dead-end' : 'suspension',
    structureHeightM: 24,
    groundElevationM: 10,
    longitudeDeg: -21 + index * spanStepDeg,
    latitudeDeg: place.latitudeDeg,
  };
}

function makeLine(options: Required<Omit<NetworkOptions, 'basis'>>, conductorTypeId: string): LineRecord {
  const { sectionCount, spansPerSectionCount, wireCount, tensionRatedRatio, firstLatitudeDeg } = options;
  const place = { perSection: spansPerSectionCount, latitudeDeg: firstLatitudeDeg };
  const structures = Array.from({ length: sectionCount * spansPerSectionCount + 1 }, (_, index) =>
    structureAt(index, place),
  );
  const sections = Array.from({ length: sectionCount }, (_, sectionIndex) => ({
    id: randomUUID(),
    name: `Test section ${sectionIndex + 1}`,
    orderIndex: sectionIndex,
    rulingSpanM: 350,
    sectionLengthM: 350 * spansPerSectionCount,
    spans: Array.from({ length: spansPerSectionCount }, (_, orderIndex) => {
      const first = sectionIndex * spansPerSectionCount + orderIndex;
      return {
        id: randomUUID(),
        orderIndex,
        fromStructureId: structures[first]?.id ?? '',
        toStructureId: structures[first + 1]?.id ?? '',
        spanLengthM: 350,
        bearingDeg: 90,
        meanWireHeightM: 18,
      };
    }),
    wires: Array.from({ length: wireCount }, (_, index) => ({
      id: randomUUID(),
      name: 'ABCDEFGH'[index] ?? String(index),
      kind: 'phase' as const,
      conductorTypeId,
      tensionN: ratedStrengthN * tensionRatedRatio,
    })),
  }));
  return {
    id: randomUUID(),
    name: `Test line ${randomUUID().slice(0, 8)}`,
    voltageV: 110_000,
    isAssumed: false,
    structures,
    sections,
  };
}

/** Stores a straight line with its catalogue rows and a default basis, the way the importer stores lines. */
export async function makeNetwork(
  database: Database,
  utilityId: string,
  options: NetworkOptions = {},
): Promise<Network> {
  const full = {
    sectionCount: 1,
    spansPerSectionCount: 3,
    wireCount: 3,
    tensionRatedRatio: 0.2,
    roughnessM: 0.05,
    firstLatitudeDeg: -38.5,
    ...options,
  };
  const conductorTypeId = randomUUID();
  const damperTypeId = randomUUID();
  const line = makeLine(full, conductorTypeId);
  const basisId = await database.withUtility(systemActor(utilityId), async (tx) => {
    await insertConductorTypes(tx, [
      {
        id: conductorTypeId,
        name: `795 kcmil 26/7 ${conductorTypeId.slice(0, 4)}`,
        standard: 'test',
        kind: 'ACSR',
        diameterM: 0.028143,
        massKgPerM: 1.62656,
        ratedStrengthN,
        aluminiumLayerCount: 2,
        outerStrandDiameterM: 0.0044415,
        outerStrandModulusPa: 69e9,
        bendingStiffnessMinNm2: 44.06,
        bendingStiffnessMaxNm2: 1603.9,
        modulusPa: null,
        thermalExpansionPerK: null,
        source: 'aeolian methods, the conductor of most checks',
        standing: 'closed form',
        asPublished: {},
      },
    ]);
    const damper = {
      id: damperTypeId,
      name: `Test damper ${damperTypeId.slice(0, 4)}`,
      massKg: 4.4,
      model: anInventedDamper,
    };
    await insertDamperTypes(tx, [{ ...damper, source: 'invented, for tests', standing: 'own model', costAmount: 45 }]);
    await saveLines(tx, [line], {
      importId: null,
      defaultRoughnessM: full.roughnessM,
      onProgress: () => Promise.resolve(),
    });
    return insertBasis(tx, { name: 'Test basis', spec: aBasisSpec(options.basis), isDefault: true });
  });
  const { sections } = line;
  return {
    lineId: line.id,
    sectionIds: sections.map(({ id }) => id),
    spanIds: sections.flatMap(({ spans }) => spans.map(({ id }) => id)),
    structureIds: line.structures.map(({ id }) => id),
    wireIds: sections.flatMap(({ wires }) => wires.map(({ id }) => id)),
    conductorTypeId,
    damperTypeId,
    basisId,
  };
}

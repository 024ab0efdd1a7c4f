import { randomUUID } from 'node:crypto';
import type { BasisSpec } from '#shared/contract/bases.ts';
import { insertBasis } from '#server/data/bases.repository.ts';
import {
  insertClimates,
  insertConductorTypes,
  insertDamperTypes,
  insertTerrainZones,
} from '#server/data/catalogue-import.ts';
import type { UtilityTransaction } from '#server/data/database.ts';
import { createIssueList } from '../imports/issue-list.ts';
import { readConductors } from '../imports/read-conductors.ts';
import { demoFile, readClimates, readDamperTypes, readSources, readTerrain } from './demo-data.ts';

const invented = { source: 'invented for the demo', standing: 'own model' };
/** Weibull scale over mean at shape 2: 1/Γ(1.5) = 1.1284 (closed form). */
const scaleOverMeanRatio = 2 / Math.sqrt(Math.PI);
const shapeNumber = 2;

function conductors() {
  const issues = createIssueList();
  const titles = new Map(Object.entries(readSources()).map(([key, { title }]) => [key, title]));
  const records = readConductors(demoFile('conductors.csv').toString('utf8'), titles, issues);
  if (issues.errorCount > 0) throw new Error(`conductors.csv: ${JSON.stringify(issues.errors[0])}`);
  return records;
}

function climates() {
  return readClimates().map(({ name, icingHoursPerYearCount, meanSpeedsMPerS, shares }) => ({
    id: randomUUID(),
    name,
    icingHoursPerYearCount,
    source: invented.source,
    sectors: shares.map((shareRatio, index) => ({
      directionRad: (index * 2 * Math.PI) / shares.length,
      shareRatio,
      weibullScaleMPerS: (meanSpeedsMPerS[index] ?? 0) * scaleOverMeanRatio,
      weibullShapeNumber: shapeNumber,
    })),
  }));
}

/** The basis that a utility starts with; every limit says where it comes from. */
function houseBasis(climateId: string | null): BasisSpec {
  return {
    windBand: { lowerMPerS: 1, upperMPerS: 7 },
    frequencyCount: 150,
    methods: {},
    limits: {
      enduranceMultiLayerPa: 8.5e6,
      enduranceSingleLayerPa: 22.5e6,
      enduranceAlloyPa: 5.7e6,
      enduranceSource: 'endurance limit, EPRI reference book, from memory',
      damperedStrainRatio: 150e-6,
      damperedStrainConvention: 'peak-to-peak',
      damperedStrainSource: 'Diana and others, IEEE Trans. Power Delivery 18 (2003) 1470, published',
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
    climateId,
    airDensityKgPerM3: 1.225,
    digestFromCount: 20,
  };
}

/** Catalogue, terrain and the first basis of a demo utility. */
export async function loadCatalogue(tx: UtilityTransaction, utilityCode: string): Promise<void> {
  await insertConductorTypes(tx, conductors());
  await insertDamperTypes(
    tx,
    readDamperTypes().map((type) => ({ id: randomUUID(), ...type, ...invented })),
  );
  const climateRecords = climates();
  await insertClimates(tx, climateRecords);
  await insertTerrainZones(
    tx,
    readTerrain(utilityCode).features.map(({ properties, geometry }) => ({
      id: randomUUID(),
      name: properties.name,
      roughnessM: properties.roughness_m,
      geometry: { type: geometry.type, coordinates: geometry.coordinates },
    })),
  );
  await insertBasis(tx, { name: 'House basis', spec: houseBasis(climateRecords[0]?.id ?? null), isDefault: true });
}

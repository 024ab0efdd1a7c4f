import { randomUUID } from 'node:crypto';
import { z } from 'zod';
import type { ConductorRecord } from '#server/data/catalogue-import.ts';
import { bendingStiffnessMaxNm2, bendingStiffnessMinNm2 } from './bending-stiffness.ts';
import { checkRow, numeric, text, word } from './check-row.ts';
import { conductorTypes, strandingOf } from './conductor-stranding.ts';
import type { IssueList } from './issue-list.ts';
import { readCsv } from './read-csv.ts';

const metrePerMillimetre = 1e-3;
const newtonPerKilonewton = 1e3;
const pascalPerGigapascal = 1e9;

const positive = numeric(
  z
    .number({ error: (issue) => (issue.input === undefined ? 'is required' : 'must be a finite number') })
    .positive('must be positive'),
);
const positiveOrNone = numeric(z.number({ error: 'must be a finite number' }).positive('must be positive').optional());
const count = numeric(
  z.number({ error: 'must be a whole number' }).int('must be a whole number').min(0, 'must not be negative'),
);

const conductorSchema = z.object({
  name: text(80),
  standard: text(120),
  type: word(conductorTypes),
  aluminium_strands: count,
  aluminium_strand_diameter_mm: positiveOrNone,
  core_strands: count,
  core_strand_diameter_mm: positiveOrNone,
  layers_aluminium: count,
  diameter_mm: positive,
  mass_kg_per_m: positive,
  rated_tensile_strength_kN: positive,
  modulus_GPa: positiveOrNone,
  thermal_expansion_per_C: positiveOrNone,
  source: text(400),
  standing: text(400),
});
export type ConductorRow = z.infer<typeof conductorSchema>;

/** Full titles of the keys that the `source` column joins with "+". */
export type SourceTitles = ReadonlyMap<string, string>;

function sourceText(keys: string, titles: SourceTitles): string {
  return keys
    .split('+')
    .map((key) => titles.get(key) ?? key)
    .join('; ');
}

function asPublished(values: Readonly<Record<string, unknown>>): Record<string, string> {
  return Object.fromEntries(
    Object.entries(values).map(([column, value]) => [column, typeof value === 'string' ? value : '']),
  );
}

function recordOf(row: ConductorRow, titles: SourceTitles): Omit<ConductorRecord, 'id' | 'asPublished'> {
  const { kind, outerModulusPa, outerStrandDiameterM, aluminiumLayerCount, stranding } = strandingOf(row);
  return {
    name: row.name,
    standard: row.standard,
    kind,
    diameterM: row.diameter_mm * metrePerMillimetre,
    massKgPerM: row.mass_kg_per_m,
    ratedStrengthN: row.rated_tensile_strength_kN * newtonPerKilonewton,
    aluminiumLayerCount,
    outerStrandDiameterM,
    outerStrandModulusPa: outerModulusPa,
    bendingStiffnessMinNm2: stranding === null ? null : bendingStiffnessMinNm2(stranding),
    bendingStiffnessMaxNm2: stranding === null ? null : bendingStiffnessMaxNm2(stranding),
    modulusPa: row.modulus_GPa === undefined ? null : row.modulus_GPa * pascalPerGigapascal,
    thermalExpansionPerK: row.thermal_expansion_per_C ?? null,
    source: sourceText(row.source, titles),
    standing: `${row.standing}; bending stiffness closed form, strand moduli common practice`,
  };
}

/** Conductor types of a CSV table in SI units, with what the table prints beside them; bad rows go to the issues. */
export function readConductors(table: string, titles: SourceTitles, issues: IssueList): ConductorRecord[] {
  const read = readCsv(table, issues);
  return (read?.rows ?? []).flatMap((raw) => {
    const row = checkRow(raw, { schema: conductorSchema, allowed: {} }, issues);
    return row === null ? [] : [{ id: randomUUID(), ...recordOf(row, titles), asPublished: asPublished(raw.values) }];
  });
}

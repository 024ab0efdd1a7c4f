import { importOptionsSchema, type ImportOptions } from '#shared/contract/imports.ts';

export interface VoltageClassDraft {
  upToVoltageV: number | null;
  conductor: { name: string; standard: string } | null;
  phaseWireCount: number;
  tensionRatedRatio: number | null;
  structureHeightM: number | null;
}

/** What the form holds before it is a valid import. */
export interface ImportDraft {
  kind: ImportOptions['kind'];
  format: ImportOptions['format'];
  lineNameProperty: string;
  voltageProperty: string;
  typicalSpanLengthM: number | null;
  deadEndFromTurnRad: number | null;
  minimumStretchLengthM: number | null;
  voltageClasses: VoltageClassDraft[];
}

const degreeRad = Math.PI / 180;

export function freshDraft(): ImportDraft {
  return {
    kind: 'surveyed',
    format: 'geojson',
    lineNameProperty: 'line_name',
    voltageProperty: 'voltage_kv',
    typicalSpanLengthM: 350,
    deadEndFromTurnRad: 10 * degreeRad,
    minimumStretchLengthM: 20,
    voltageClasses: [
      { upToVoltageV: 400_000, conductor: null, phaseWireCount: 3, tensionRatedRatio: 0.18, structureHeightM: 24 },
    ],
  };
}

/** Format by the name of a file; null when the name tells nothing. */
export function formatOf(fileName: string): ImportOptions['format'] | null {
  if (/\.(geo)?json$/i.test(fileName)) return 'geojson';
  return /\.csv$/i.test(fileName) ? 'csv' : null;
}

function assumptionsOf(draft: ImportDraft): object {
  return {
    typicalSpanLengthM: draft.typicalSpanLengthM,
    deadEndFromTurnDeg:
      draft.deadEndFromTurnRad === null ? null : Math.round((draft.deadEndFromTurnRad / degreeRad) * 1000) / 1000,
    minimumStretchLengthM: draft.minimumStretchLengthM,
    voltageClasses: draft.voltageClasses.map(({ conductor, ...rest }) => ({
      ...rest,
      conductorName: conductor?.name ?? '',
      ...(conductor === null ? {} : { conductorStandard: conductor.standard }),
    })),
  };
}

export type CheckedDraft =
  { readonly ok: true; readonly options: ImportOptions } | { readonly ok: false; readonly faults: readonly string[] };

/** The options of a draft by the contract, or what is wrong with it. */
export function checkDraft(draft: ImportDraft, isDryRun: boolean): CheckedDraft {
  const isCentreLine = draft.kind === 'centre-line';
  const parsed = importOptionsSchema.safeParse({
    kind: draft.kind,
    format: draft.format,
    isDryRun,
    ...(isCentreLine
      ? {
          properties: { lineName: draft.lineNameProperty, voltageKV: draft.voltageProperty },
          assumptions: assumptionsOf(draft),
        }
      : {}),
  });
  if (parsed.success) return { ok: true, options: parsed.data };
  return { ok: false, faults: parsed.error.issues.map(({ path, message }) => `${path.join(' ')}: ${message}`) };
}

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

/** Largest file that the service takes. */
const largestFileBytes = 40 * 1024 * 1024;

/** What is wrong with a file before it is sent; empty when nothing is. */
export function fileFault(file: Readonly<{ name: string; size: number }>): string {
  if (formatOf(file.name) === null) return 'Choose a file that ends in .geojson, .json or .csv.';
  if (file.size === 0) return 'The file is empty.';
  return file.size > largestFileBytes ? 'The file is larger than 40 MB. Split it by lines.' : '';
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

/** What is wrong by field, e.g. `typicalSpanLengthM` or `voltageClasses.0.conductorName`. */
export type DraftFaults = Readonly<Record<string, string>>;
export type CheckedDraft =
  { readonly ok: true; readonly options: ImportOptions } | { readonly ok: false; readonly faults: DraftFaults };

const missingWords: Readonly<Record<string, string>> = { conductorName: 'Choose a conductor from the catalogue.' };
const numberMissing = 'Enter a number.';

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
  const faults = parsed.error.issues.map(({ code, path, message }) => {
    const field = path.filter((part) => part !== 'assumptions' && part !== 'properties').join('.');
    const isMissing = code === 'invalid_type';
    return [field, missingWords[String(path.at(-1))] ?? (isMissing ? numberMissing : message)] as const;
  });
  return { ok: false, faults: Object.fromEntries(faults) };
}

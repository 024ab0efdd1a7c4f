import { extname } from 'node:path';
import { parseArgs } from 'node:util';
import { importOptionsSchema, type ImportOptions } from '#shared/contract/imports.ts';

export const importUsage = `Usage: npm run import -- FILE --utility CODE --kind surveyed|centre-line [options]

  --format geojson|csv      of the file; taken from its ending when not given
  --roughness M             roughness length where no terrain zone covers a span; else the utility's own
  --dry-run                 check and count only, store nothing

Centre lines need a wire set by voltage, from a file or one for all voltages:
  --assumptions FILE        JSON: {"voltageClasses": [{"upToVoltageV", "conductorName", "conductorStandard",
                            "phaseWireCount", "tensionRatedRatio", "structureHeightM"}], ...}
  --conductor NAME          one conductor type for every voltage, with
  --conductor-standard TEXT   its standard when the name stands under several
  --wires COUNT               phase wires a span (3)
  --tension RATIO             everyday tension over rated strength (0.2)
  --height M                  height of the wire attachment (24)
  --span M                  typical span (350)
  --turn DEG                vertices that turn more become dead-ends (10)
  --minimum-stretch M       shorter stretches are left out as stubs (20)
  --name-property NAME      property or column of the line name (line_name)
  --voltage-property NAME   property or column of the voltage in kV (voltage_kv)

Ends with 0 when done, 1 on wrong use or a fault, 2 when the file is refused.
`;

const text = { type: 'string' } as const;
const optionTypes = {
  utility: text,
  kind: text,
  format: text,
  roughness: text,
  'dry-run': { type: 'boolean' },
  assumptions: text,
  conductor: text,
  'conductor-standard': text,
  wires: text,
  tension: text,
  height: text,
  span: text,
  turn: text,
  'minimum-stretch': text,
  'name-property': text,
  'voltage-property': text,
} as const;

/** Highest voltage the contract knows: one class up to here holds every line. */
const everyVoltageV = 1_500_000;

/** Wrong use of the command; the message says what is wrong. */
export class UsageError extends Error {
  override readonly name = 'UsageError';
}

export interface ImportArguments {
  readonly path: string;
  readonly utilityCode: string;
  readonly options: ImportOptions;
}

type Given = Readonly<Record<string, string | boolean | undefined>>;

function given<T>(key: string, value: T | undefined): Record<string, T> {
  return value === undefined ? {} : { [key]: value };
}

function numberOf(values: Given, flag: string): number | undefined {
  const value = values[flag];
  if (typeof value !== 'string') return undefined;
  const parsed = value.trim() === '' ? Number.NaN : Number(value);
  if (Number.isFinite(parsed)) return parsed;
  throw new UsageError(`--${flag} ${value}: must be a number`);
}

function oneClass(values: Given): object {
  if (values['conductor'] === undefined) return {};
  const voltageClass = {
    upToVoltageV: everyVoltageV,
    conductorName: values['conductor'],
    ...given('conductorStandard', values['conductor-standard']),
    phaseWireCount: numberOf(values, 'wires') ?? 3,
    tensionRatedRatio: numberOf(values, 'tension') ?? 0.2,
    structureHeightM: numberOf(values, 'height') ?? 24,
  };
  return { voltageClasses: [voltageClass] };
}

function assumptionsOf(values: Given, fromFile: object | null): object {
  return {
    ...fromFile,
    ...oneClass(values),
    ...given('typicalSpanLengthM', numberOf(values, 'span')),
    ...given('deadEndFromTurnDeg', numberOf(values, 'turn')),
    ...given('minimumStretchLengthM', numberOf(values, 'minimum-stretch')),
  };
}

function formatOf(path: string, stated: string | undefined): string {
  if (stated !== undefined) return stated;
  const ending = extname(path).toLowerCase();
  return ending === '.csv' ? 'csv' : ending === '.geojson' || ending === '.json' ? 'geojson' : ending;
}

/** Reads the arguments of the command; `readJson` reads the file of `--assumptions`. */
export function parseImportArguments(argv: readonly string[], readJson: (path: string) => object): ImportArguments {
  let parsed;
  try {
    parsed = parseArgs({ args: [...argv], options: optionTypes, allowPositionals: true });
  } catch (error) {
    throw new UsageError(error instanceof Error ? error.message : 'the arguments cannot be read');
  }
  const { values, positionals } = parsed;
  const [path] = positionals;
  if (path === undefined || positionals.length > 1) throw new UsageError('name one file to import');
  if (values.utility === undefined) throw new UsageError('--utility: name the code of the utility');
  const fromFile = values.assumptions === undefined ? null : readJson(values.assumptions);
  const properties = {
    ...given('lineName', values['name-property']),
    ...given('voltageKV', values['voltage-property']),
  };
  const options = importOptionsSchema.safeParse({
    kind: values.kind,
    format: formatOf(path, values.format),
    isDryRun: values['dry-run'] ?? false,
    ...given('defaultRoughnessM', numberOf(values, 'roughness')),
    ...(Object.keys(properties).length > 0 ? { properties } : {}),
    ...(values.kind === 'centre-line' ? { assumptions: assumptionsOf(values, fromFile) } : {}),
  });
  if (options.success) return { path, utilityCode: values.utility, options: options.data };
  throw new UsageError(options.error.issues.map((issue) => `${issue.path.join('.')}: ${issue.message}`).join('\n'));
}

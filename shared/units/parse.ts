import { quantityInSi, quantityUnits, unitLabel, type QuantityKind, type UnitSystem } from './quantity-kinds.ts';

/** A number that was read, in SI, or why it could not be. */
export type ParsedQuantity =
  { readonly ok: true; readonly value: number } | { readonly ok: false; readonly message: string };

const numberThenUnit = /^\s*([+-]?(?:\d+(?:[.,]\d*)?|[.,]\d+)(?:e[+-]?\d+)?)\s*(.*?)\s*$/i;

/** Units that people write and mathjs calls by another name. */
const spellings: Readonly<Record<string, string>> = {
  mph: 'mile/hour',
  'km/h': 'km/hour',
  kmh: 'km/hour',
  ksi: 'kpsi',
  '"': 'in',
  "'": 'ft',
};

const groupedNumber = /^([+-]?\d{1,3}(?:,\d{3})+)(?![\d,])/;

/**
 * Text without the marks that group digits. "1,150" is 1150 to readers of US units; to others it may as well be 1.15,
 * so it is left ambiguous (null) instead of guessed.
 */
function ungrouped(text: string, system: UnitSystem): string | null {
  const joined = text.trim().replace(/(?<=\d)[\u2009\u202f\u00a0 ](?=\d{3}(?!\d))/g, '');
  const grouped = groupedNumber.exec(joined)?.[1];
  if (grouped === undefined) return joined;
  if (system !== 'us') return null;
  return grouped.replaceAll(',', '') + joined.slice(grouped.length);
}

function refuse(kind: QuantityKind, system: UnitSystem): ParsedQuantity {
  const label = unitLabel(kind, system);
  return {
    ok: false,
    message: label === '' ? 'write a number' : `write a number, with or without a unit, e.g. 1.2 ${label}`,
  };
}

/**
 * Reads what a person typed. A number alone is in the unit shown; any unit of the same quantity may follow it
 * ("700 ft", "45 mph", "8.5 MPa"). mathjs, which knows the units, is loaded at the first unit that is not the shown one.
 */
export async function parseQuantity(text: string, kind: QuantityKind, system: UnitSystem): Promise<ParsedQuantity> {
  const plainText = ungrouped(text, system);
  if (plainText === null)
    return { ok: false, message: 'the comma may mark thousands or decimals; write 1150 or 1.150' };
  const match = numberThenUnit.exec(plainText);
  if (match?.[1] === undefined) return refuse(kind, system);
  const number = Number(match[1].replace(',', '.'));
  if (!Number.isFinite(number)) return refuse(kind, system);
  const written = match[2] ?? '';
  if (written === '' || written === unitLabel(kind, system))
    return { ok: true, value: quantityInSi(number, kind, system) };
  return readUnit(number, written, { kind, system });
}

async function readUnit(
  number: number,
  written: string,
  wanted: { kind: QuantityKind; system: UnitSystem },
): Promise<ParsedQuantity> {
  const { kind, system } = wanted;
  const metric = quantityUnits[kind].metric;
  const known = [quantityUnits[kind].metric, quantityUnits[kind].us].find(({ label }) => label === written);
  if (known !== undefined) return { ok: true, value: number * known.inSi };
  if (metric.mathName === null) return refuse(kind, system);
  const { unit } = await import('mathjs');
  try {
    const shown = unit(number, spellings[written] ?? written).toNumber(metric.mathName);
    return { ok: true, value: shown * metric.inSi };
  } catch {
    return {
      ok: false,
      message: `"${written}" is not a unit of this quantity; use ${metric.label} or ${quantityUnits[kind].us.label}`,
    };
  }
}

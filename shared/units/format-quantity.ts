import { convertQuantity, unitLabel, type QuantityKind, type UnitSystem } from './quantity-kinds.ts';

const thinSpace = '\u2009';
const noValue = '–';

/** Number for people: three significant figures unless told otherwise, no exponent, never NaN or -0. */
export function formatNumber(value: number, significantCount = 3): string {
  if (!Number.isFinite(value)) return noValue;
  const rounded = Number(value.toPrecision(significantCount));
  const magnitude = rounded === 0 ? 0 : Math.floor(Math.log10(Math.abs(rounded)));
  const decimals = Math.max(0, Math.min(significantCount - 1 - magnitude, 8));
  const text = new Intl.NumberFormat('en', {
    minimumFractionDigits: rounded === 0 ? 0 : decimals,
    maximumFractionDigits: decimals,
  }).format(rounded);
  return /^-?0(?:\.0*)?$/.test(text) ? '0' : text.replaceAll(',', thinSpace);
}

/** Quantity for people, with its unit after a thin space; a dash where there is none. */
export function formatQuantity(
  value: number | null | undefined,
  kind: QuantityKind,
  options: { readonly system: UnitSystem; readonly significantCount?: number },
): string {
  if (value === null || value === undefined || !Number.isFinite(value)) return noValue;
  // The digits of a life that is nearly over say nothing.
  if (kind === 'life' && value < 1) return 'under 1 year';
  const text = formatNumber(convertQuantity(value, kind, options.system), options.significantCount);
  const label = unitLabel(kind, options.system);
  return label === '' ? text : `${text}${thinSpace}${label}`;
}

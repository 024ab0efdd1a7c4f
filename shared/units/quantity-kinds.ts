/** Whose units are shown. SI is kept inside; these are for people. */
export type UnitSystem = 'metric' | 'us';
export const unitSystems = ['metric', 'us'] as const satisfies readonly UnitSystem[];

/** A unit as people read it: what one of it is in SI, and how mathjs calls it when text is read. */
export interface DisplayUnit {
  readonly label: string;
  readonly inSi: number;
  readonly mathName: string | null;
}

const unit = (label: string, inSi: number, mathName: string | null = label): DisplayUnit => ({ label, inSi, mathName });

/*
 * Factors between units are exact by definition (published: international yard and pound agreement, 1959; NIST SP 811),
 * pound-force with standard gravity 9.80665 m/s².
 */
const footM = 0.3048;
const inchM = 0.0254;
const poundKg = 0.45359237;
const poundForceN = 4.4482216152605;
const mileM = 1609.344;

const metre = unit('m', 1);
const foot = unit('ft', footM);
const plain = unit('', 1, null);
const both = (one: DisplayUnit): Record<UnitSystem, DisplayUnit> => ({ metric: one, us: one });
const pair = (metric: DisplayUnit, us: DisplayUnit): Record<UnitSystem, DisplayUnit> => ({ metric, us });

/** The unit of every kind of quantity in both systems. */
export const quantityUnits = {
  length: pair(metre, foot),
  distance: pair(unit('km', 1000), unit('mi', mileM)),
  height: pair(metre, foot),
  'damper-distance': pair(metre, foot),
  diameter: pair(unit('mm', 0.001), unit('in', inchM)),
  amplitude: pair(unit('mm', 0.001), unit('in', inchM)),
  roughness: pair(metre, foot),
  force: pair(unit('kN', 1000), unit('lbf', poundForceN)),
  stress: pair(unit('MPa', 1e6), unit('ksi', 6_894_757.293168362, 'kpsi')),
  strain: both(unit('µε', 1e-6, null)),
  frequency: both(unit('Hz', 1)),
  'wind-speed': pair(unit('m/s', 1), unit('mph', mileM / 3600, 'mile/hour')),
  power: both(unit('W', 1)),
  mass: pair(unit('kg', 1), unit('lb', poundKg)),
  'linear-mass': pair(unit('kg/m', 1), unit('lb/ft', poundKg / footM)),
  'bending-stiffness': pair(unit('N·m²', 1, null), unit('lbf·ft²', poundForceN * footM ** 2, null)),
  impedance: both(unit('N·s/m', 1, null)),
  share: both(unit('%', 0.01, null)),
  ratio: both(plain),
  number: both(plain),
  life: both(unit('years', 1, null)),
  direction: both(unit('°', Math.PI / 180, 'deg')),
  angle: both(unit('°', Math.PI / 180, 'deg')),
  voltage: both(unit('kV', 1000)),
  density: both(unit('kg/m³', 1, null)),
} as const satisfies Record<string, Record<UnitSystem, DisplayUnit>>;

export type QuantityKind = keyof typeof quantityUnits;

/** Unit of a kind as it is shown; empty for plain numbers. */
export function unitLabel(kind: QuantityKind, system: UnitSystem): string {
  return quantityUnits[kind][system].label;
}

/** SI number in the unit that is shown. */
export function convertQuantity(value: number, kind: QuantityKind, system: UnitSystem): number {
  return value / quantityUnits[kind][system].inSi;
}

/** Number in the unit that is shown, back in SI. */
export function quantityInSi(shown: number, kind: QuantityKind, system: UnitSystem): number {
  return shown * quantityUnits[kind][system].inSi;
}

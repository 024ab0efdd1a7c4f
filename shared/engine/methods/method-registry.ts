import { EngineInputError } from '../numerics/engine-input-error.ts';
import type { MethodChoice } from './method-choice.ts';
import type { MethodNote, MethodStanding } from './method-note.ts';

/** One method that a basis can choose or that every result rests on. */
export interface MethodEntry {
  /** Kind of choice it answers, or `fixed` for what every computation uses. */
  readonly kind: keyof MethodChoice | 'fixed';
  readonly name: string;
  readonly standing: MethodStanding;
  readonly source: string;
  readonly validity: string;
  readonly isDefault: boolean;
}

const entry = (
  [kind, name, isDefault]: readonly [MethodEntry['kind'], string, boolean],
  standing: MethodStanding,
  [source, validity]: readonly [string, string],
): MethodEntry => ({ kind, name, standing, source, validity, isDefault });

const strouhal: readonly MethodEntry[] = [
  entry(['strouhal', 'strouhal-0.185', true], 'common practice', [
    'Strouhal number 0.185, the trade form 3.26·V[mph]/d[in]',
    'stranded conductors, Reynolds number about 500 to 300 000, wind normal to the span',
  ]),
  entry(['strouhal', 'strouhal-0.18', false], 'from memory', [
    'Strouhal number 0.18, EN 1991-1-4 table E.1 for a circular cylinder; the table was not read',
    'circular cylinders, Reynolds number about 500 to 300 000',
  ]),
  entry(['strouhal', 'strouhal-0.20', false], 'common practice', [
    'Strouhal number 0.20',
    'smooth cylinders, Reynolds number about 500 to 300 000',
  ]),
];

const windPower: readonly MethodEntry[] = [
  entry(['windPower', 'wind-power-diana-falco', true], 'from memory', [
    'Cubic −99.73x³ + 101.62x² + 0.1627x + 0.2256 of A/D, credited to Diana and Falco; the paper was not read. Below A/D 0.1 the power law of the same value and slope (own model)',
    'A/D 0.1 to 0.5 as fitted, below 0.1 an extension; smooth flow, single wire',
  ]),
  entry(['windPower', 'wind-power-diana-falco-cubic', false], 'from memory', [
    'The same cubic down to zero amplitude; it leaves power to a wire at rest',
    'A/D 0.1 to 0.5; below only for comparison with hand calculations',
  ]),
  entry(['windPower', 'wind-power-user-table', false], 'own model', [
    'Reduced wind power from a table given with the input, straight lines between the rows in log–log',
    'that of the table; below its first row the first slope is carried on',
  ]),
];

const turbulence: readonly MethodEntry[] = [
  entry(['turbulence', 'turbulence-lock-in-index', true], 'from memory', [
    'Reduction of wind power 1/√(1 + (I/0.09)²), family of CIGRE TB 273; the brochure was not read',
    'turbulence intensity 0 to 0.5',
  ]),
  entry(['turbulence', 'turbulence-none', false], 'common practice', [
    'Smooth flow: no reduction of wind power',
    'an upper bound; laboratory conditions',
  ]),
  entry(['turbulence', 'turbulence-time-share', false], 'own model', [
    'Share of time with the wind speed between 0.9 and 1.3 of the locked-in speed, normal distribution',
    'turbulence intensity 0 to 0.5',
  ]),
  entry(['turbulence', 'turbulence-user-table', false], 'own model', [
    'Reduction of wind power from a table given with the input, straight lines between the rows',
    'that of the table, end values held',
  ]),
];

const selfDamping: readonly MethodEntry[] = [
  entry(['selfDamping', 'self-damping-similarity', true], 'own model', [
    'Similarity scaling of recalled exponents (2.44, 5.63, 2.76); its level is calibrated so that undamped spans at the recalled safe design tensions just meet the endurance limit. The level is the largest doubt in the result: laboratories differ by a factor of two',
    'stranded conductors, ratio to critical damping below 0.02',
  ]),
  entry(['selfDamping', 'self-damping-power-noiseux', false], 'from memory', [
    'Power law k(A/D)^2.44·f^5.63/T^2.76 in mW/m with k = D/√(RTS·m), named for Noiseux; not read',
    'diameter 18 to 45 mm, tension 15 to 30 % of rated strength; refused elsewhere',
  ]),
  entry(['selfDamping', 'self-damping-user-fit', false], 'own model', [
    'Power law with coefficient and exponents given with the input, fitted to laboratory measurements',
    'conductor, tensions and frequencies of the measurements',
  ]),
];

const life: readonly MethodEntry[] = [
  entry(['life', 'life-steady', true], 'common practice', [
    'Miner’s sum over the wind climate with the steady amplitude in every hour of a wind speed: an upper bound of the damage; safe border lines of CIGRE from memory',
    'steady wind along the whole span',
  ]),
  entry(['life', 'life-rayleigh', false], 'own model', [
    'Miner’s sum with Rayleigh-distributed amplitudes whose 99th percentile is the steady one; safe border lines of CIGRE from memory',
    'long spans in natural wind',
  ]),
];

const fixed: readonly MethodEntry[] = [
  entry(['fixed', 'waves-tensioned-beam', false], 'closed form', [
    'Travelling waves on a wire under tension with bending stiffness EImin',
    'small slopes, constant tension',
  ]),
  entry(['fixed', 'end-rigid-clamp', false], 'closed form', [
    'Reflection at a rigid clamp with point dampers, superposition on the clamped wire',
    'dampers take force, no moment; strain at a damper clamp is indicative',
  ]),
  entry(['fixed', 'end-armour-rods', false], 'closed form', [
    'Wire under armour rods as a piece of its own stiffness and mass, solved piece by piece',
    'rods that hold to the wire along their length; strain from the curvature of the covered wire',
  ]),
  entry(['fixed', 'end-moving-clamp', false], 'closed form', [
    'Clamp that moves as mass, spring and damper and does not rotate',
    'spans on both sides swing alike, each taking half of the clamp',
  ]),
  entry(['fixed', 'span-travelling-wave-balance', false], 'closed form', [
    'Energy flux of travelling waves along the span, fed by wind power less self-damping, taken by both ends',
    'at least about ten loops in the span; losses small within a loop',
  ]),
  entry(['fixed', 'strain-clamp-curvature', false], 'closed form', [
    'Bending strain of the outer strand, half its diameter times the curvature at the clamp with EImin',
    'rigid clamp; strands free to slip',
  ]),
  entry(['fixed', 'strain-poffenberger-swart', false], 'from memory', [
    'Bending strain from the bending amplitude 89 mm from the last point of contact, Poffenberger and Swart (1965); formula recalled, re-derived',
    'rigid clamp; doubtful for compact conductors',
  ]),
  entry(['fixed', 'life-recorder', false], 'common practice', [
    'Miner’s sum over the cycles a recorder counted, carried on to a year; safe border lines of CIGRE from memory',
    'the time of recording stands for the year',
  ]),
  entry(['fixed', 'placement-search', false], 'own model', [
    'Search over dampers and distances, the same at both ends: a look over the grid, then steps of falling size',
    'a search, no proof that nothing better exists',
  ]),
  entry(['fixed', 'damper-halves', false], 'closed form', [
    'Damper as clamp mass and halves with two freedoms each, hysteretic loss in the messenger',
    'the amplitude at which stiffness and loss were measured',
  ]),
  entry(['fixed', 'damper-table', false], 'common practice', [
    'Measured impedance, straight lines between the rows against ln f, never extrapolated',
    'inside the table, at its clamp velocity',
  ]),
  entry(['fixed', 'damper-velocity-tables', false], 'common practice', [
    'Measured impedance at several clamp velocities, straight lines against ln v, iterated until velocity and impedance agree',
    'inside the tables; beyond their velocities the nearest table is held',
  ]),
  entry(['fixed', 'wind-climate-weibull', false], 'common practice', [
    'Hours by direction sector and Weibull wind speed; the component normal to the span excites it',
    'at least eight sectors',
  ]),
];

/** Every method of the aeolian engine with its standing, source and validity. */
export const methodRegistry: readonly MethodEntry[] = [
  ...strouhal,
  ...windPower,
  ...turbulence,
  ...selfDamping,
  ...life,
  ...fixed,
];

/**
 * Registry entry of a name, or the default of a kind.
 *
 * @param kind what the method answers
 * @param name name in the registry; left out, the default of the kind
 * @returns the entry
 * @throws EngineInputError if the kind has no such name
 * @source common practice
 */
export function methodEntry(kind: MethodEntry['kind'], name?: string): MethodEntry {
  const ofKind = methodRegistry.filter((method) => method.kind === kind);
  const found = ofKind.find((method) => (name === undefined ? method.isDefault : method.name === name));
  if (found !== undefined) return found;
  throw new EngineInputError(`methods.${kind}`, `must be one of ${ofKind.map((method) => method.name).join(', ')}`);
}

/** The part of an entry that goes with a result. */
export function methodNote({ name, standing, source }: MethodEntry): MethodNote {
  return { name, standing, source };
}

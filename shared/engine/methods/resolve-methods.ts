import { assertNumber } from '../numerics/assert-number.ts';
import { EngineInputError } from '../numerics/engine-input-error.ts';
import { powerLawSelfDamping } from '../self-damping/power-law-self-damping.ts';
import type { SelfDampingLaw, SelfDampingWire } from '../self-damping/self-damping-law.ts';
import { similaritySelfDamping } from '../self-damping/similarity-self-damping.ts';
import { userFitSelfDamping } from '../self-damping/user-fit-self-damping.ts';
import { dianaFalcoCubic, dianaFalcoCurve } from '../wind/diana-falco-curve.ts';
import { tableTurbulenceFactor } from '../wind/table-turbulence-factor.ts';
import { tableWindCurve } from '../wind/table-wind-curve.ts';
import { lockInTimeShare, turbulenceFactor } from '../wind/turbulence-factor.ts';
import type { WindPowerCurve } from '../wind/wind-power-curve.ts';
import type { MethodChoice, PartialMethodChoice } from './method-choice.ts';
import type { EngineWarning, MethodNote } from './method-note.ts';
import { methodEntry, methodNote } from './method-registry.ts';
import type { UserCurves } from './user-curves.ts';

/** What the chosen methods say for one wire in one wind. */
export interface ResolvedMethods {
  readonly strouhalNumber: number;
  readonly windCurve: WindPowerCurve;
  readonly turbulenceFactorRatio: number;
  readonly selfDamping: SelfDampingLaw;
  readonly lifeName: string;
  readonly notes: readonly MethodNote[];
  readonly warnings: readonly EngineWarning[];
}

/** What the methods are chosen for. */
export interface MethodsFor {
  readonly wire: SelfDampingWire;
  readonly turbulenceIntensityRatio: number;
  readonly curves?: UserCurves | undefined;
  /** Whether a self-damping law outside its validity is refused, or replaced by the default with a warning. */
  readonly outsideValidity: 'refuse' | 'fall-back';
}

const strouhalNumbers: Readonly<Record<string, number>> = {
  'strouhal-0.185': 0.185,
  'strouhal-0.18': 0.18,
  'strouhal-0.20': 0.2,
};

function curveOf(name: string, curves: UserCurves | undefined): WindPowerCurve {
  if (name === 'wind-power-diana-falco') return dianaFalcoCurve();
  if (name === 'wind-power-diana-falco-cubic') return dianaFalcoCubic();
  if (curves?.windPower === undefined) throw new EngineInputError('curves.windPower', `is required by ${name}`);
  return tableWindCurve(curves.windPower.rows, 'curves.windPower.rows');
}

function turbulenceOf(name: string, { turbulenceIntensityRatio, curves }: MethodsFor): number {
  if (name === 'turbulence-lock-in-index') return turbulenceFactor(turbulenceIntensityRatio);
  if (name === 'turbulence-none') return 1;
  if (name === 'turbulence-time-share') return lockInTimeShare(turbulenceIntensityRatio);
  if (curves?.turbulence === undefined) throw new EngineInputError('curves.turbulence', `is required by ${name}`);
  return tableTurbulenceFactor(curves.turbulence.rows, turbulenceIntensityRatio);
}

interface ChosenSelfDamping {
  readonly name: string;
  readonly law: SelfDampingLaw;
  readonly warnings: readonly EngineWarning[];
}

function powerLawOrDefault(name: string, { wire, outsideValidity }: MethodsFor): ChosenSelfDamping {
  const found = powerLawSelfDamping(wire);
  if (found.outcome === 'valid') return { name, law: found.law, warnings: [] };
  const { quantity, value, lower, upper } = found;
  const reason = `${name} holds for ${quantity} from ${lower} to ${upper}, it is ${value}`;
  if (outsideValidity === 'refuse') throw new EngineInputError('methods.selfDamping', `is refused here: ${reason}`);
  const fallback = methodEntry('selfDamping').name;
  const text = `The chosen self-damping law is outside its validity: ${reason}. ${fallback} was used instead.`;
  return {
    name: fallback,
    law: similaritySelfDamping(wire),
    warnings: [{ code: 'self-damping-out-of-validity', text }],
  };
}

function selfDampingOf(name: string, given: MethodsFor): ChosenSelfDamping {
  if (name === 'self-damping-similarity') return { name, law: similaritySelfDamping(given.wire), warnings: [] };
  if (name === 'self-damping-power-noiseux') return powerLawOrDefault(name, given);
  const fit = given.curves?.selfDamping;
  if (fit === undefined) throw new EngineInputError('curves.selfDamping', `is required by ${name}`);
  return { name, law: userFitSelfDamping(fit, given.wire.tensionN), warnings: [] };
}

/** The note of a choice, with the user's own source where the user gave the curve. */
function noteOf(kind: keyof MethodChoice, name: string, curves: UserCurves | undefined): MethodNote {
  const note = methodNote(methodEntry(kind, name));
  const given = { windPower: curves?.windPower, turbulence: curves?.turbulence, selfDamping: curves?.selfDamping };
  if (!name.includes('-user-') || kind === 'strouhal' || kind === 'life') return note;
  return { ...note, source: `${note.source}. Given source: ${given[kind]?.source ?? 'none'}` };
}

/**
 * Looks up the chosen methods and applies them to a wire and its wind.
 *
 * @param choice names by kind; what is left out takes its default
 * @param given  wire, turbulence intensity I ≥ 0 [ratio], user curves, and what to do outside a law's validity
 * @returns numbers and curves, with the notes and warnings that go with a result
 * @throws EngineInputError for a name that does not exist, a missing curve, or a refused law
 * @source see the registry
 * @validity see the registry
 * @accuracy see the registry
 */
export function resolveMethods(choice: PartialMethodChoice, given: MethodsFor): ResolvedMethods {
  assertNumber('air.turbulenceIntensityRatio', given.turbulenceIntensityRatio, { atLeast: 0, atMost: 1 });
  const name = (kind: keyof MethodChoice) => methodEntry(kind, choice[kind]).name;
  const selfDamping = selfDampingOf(name('selfDamping'), given);
  const names: MethodChoice = {
    strouhal: name('strouhal'),
    windPower: name('windPower'),
    turbulence: name('turbulence'),
    selfDamping: selfDamping.name,
    life: name('life'),
  };
  const notes = (['strouhal', 'windPower', 'turbulence', 'selfDamping'] as const).map((kind) =>
    noteOf(kind, names[kind], given.curves),
  );
  return {
    strouhalNumber: strouhalNumbers[names.strouhal] ?? NaN,
    windCurve: curveOf(names.windPower, given.curves),
    turbulenceFactorRatio: turbulenceOf(names.turbulence, given),
    selfDamping: selfDamping.law,
    lifeName: names.life,
    notes,
    warnings: selfDamping.warnings,
  };
}

import type { EngineWarning, MethodNote } from '../methods/method-note.ts';
import { methodEntry, methodNote } from '../methods/method-registry.ts';
import { selfDampingRatio } from '../self-damping/self-damping-law.ts';
import type { SpanSetup } from './span-setup.ts';
import { outcomeCodes, type SpanSweep } from './sweep-span.ts';

/** @source own model: below this the local standing wave is no good picture of the motion near an end */
const strongEndRatio = 0.5;
/** @source own model */
const fewLoopsCount = 10;
/** @source own model: laboratories do not report more for sound conductors */
const highDampingRatio = 0.02;

/** Methods that a span's balance rests on. */
export function spanMethodNotes(setup: SpanSetup): MethodNote[] {
  const kinds = new Set(setup.ends.flatMap((end) => end.models.map((model) => model.kind)));
  const names = [
    'waves-tensioned-beam',
    'end-rigid-clamp',
    ...(setup.ends.some((end) => end.armourRods !== null) ? ['end-armour-rods'] : []),
    ...(setup.ends.some((end) => end.support !== null) ? ['end-moving-clamp'] : []),
    ...(kinds.has('halves') ? ['damper-halves'] : []),
    ...(kinds.has('table') ? ['damper-table'] : []),
    ...(kinds.has('velocity-tables') ? ['damper-velocity-tables'] : []),
    'span-travelling-wave-balance',
    'strain-clamp-curvature',
  ];
  return [...setup.methods.notes, ...names.map((name) => methodNote(methodEntry('fixed', name)))];
}

/** First and last frequency at which a condition holds, as text, or null. */
function bandText(sweep: SpanSweep, holds: (index: number) => boolean): string | null {
  let lower = Infinity;
  let upper = -Infinity;
  sweep.frequenciesHz.forEach((f, index) => {
    if (!holds(index)) return;
    lower = Math.min(lower, f);
    upper = Math.max(upper, f);
  });
  return upper < lower ? null : `${lower.toPrecision(4)} to ${upper.toPrecision(4)} Hz`;
}

function dampingWarning(setup: SpanSetup, sweep: SpanSweep): string | null {
  const { factor, frequencyExponentNumber, amplitudeExponentNumber } = setup.methods.selfDamping;
  const { massKgPerM, diameterM } = setup.wire;
  return bandText(sweep, (index) => {
    if (sweep.outcomeCodes[index] !== outcomeCodes.steady) return false;
    const frequencyHz = sweep.frequenciesHz[index] as number;
    const amplitudeM = Math.max(sweep.endAmplitudesM[0][index] as number, sweep.endAmplitudesM[1][index] as number);
    const powerWPerM =
      factor * frequencyHz ** frequencyExponentNumber * (amplitudeM / diameterM) ** amplitudeExponentNumber;
    return selfDampingRatio(powerWPerM, { massKgPerM, frequencyHz, amplitudeM }) > highDampingRatio;
  });
}

/** What the reader of a span's balance must know. */
export function spanWarnings(setup: SpanSetup, sweep: SpanSweep): EngineWarning[] {
  const warnings: EngineWarning[] = [...setup.methods.warnings];
  const add = (code: string, band: string | null, text: (band: string) => string) => {
    if (band !== null) warnings.push({ code, text: text(band) });
  };
  const hasData = (index: number) => sweep.outcomeCodes[index] !== outcomeCodes['no-damper-data'];
  const weakest = (index: number) =>
    Math.min(sweep.responses[0].reflectionRatio[index] as number, sweep.responses[1].reflectionRatio[index] as number);
  add(
    'no-damper-data',
    bandText(sweep, (index) => !hasData(index)),
    (band) => `A damper's impedance table has no data in the range ${band}; nothing is computed there.`,
  );
  add(
    'amplitude-limit',
    bandText(sweep, (index) => sweep.outcomeCodes[index] === outcomeCodes['amplitude-limit']),
    (band) => `The amplitude reaches half a diameter in the range ${band}, where the wind power curve ends.`,
  );
  add(
    'strong-end',
    bandText(sweep, (index) => hasData(index) && weakest(index) < strongEndRatio),
    (band) =>
      `An end reflects less than half the amplitude in the range ${band}; wind power and self-damping were measured on standing waves.`,
  );
  if (sweep.isSettled === false) {
    const text = 'The clamp velocity of a damper did not settle on its impedance tables at every frequency.';
    warnings.push({ code: 'velocity-not-settled', text });
  }
  const speed = Math.sqrt(setup.tensionN / setup.wire.massKgPerM);
  add(
    'few-loops',
    bandText(sweep, (index) => (2 * setup.lengthM * (sweep.frequenciesHz[index] as number)) / speed < fewLoopsCount),
    (band) => `The span holds fewer than ${fewLoopsCount} loops in the range ${band}; the balance assumes many.`,
  );
  add(
    'high-self-damping',
    dampingWarning(setup, sweep),
    (band) => `Self-damping exceeds ${highDampingRatio} of critical in the range ${band}; the law is doubtful there.`,
  );
  return warnings;
}

import { formatQuantity } from '#shared/units/format-quantity.ts';
import type { QuantityKind, UnitSystem } from '#shared/units/quantity-kinds.ts';
import type { Reason } from './reasons.ts';

type ReasonOf<C extends Reason['code']> = Extract<Reason, { code: C }>;
type Show = (value: number, kind: QuantityKind) => string;
type Sentences = { readonly [C in Reason['code']]: (reason: ReasonOf<C>, show: Show) => string };

const placeWords = { clamp: 'the clamp', 'damper-clamp': 'a damper clamp (indicative)' } as const;
const at = (reason: { frequencyHz: number; windSpeedMPerS: number }, show: Show) =>
  `at ${show(reason.frequencyHz, 'frequency')} (wind ${show(reason.windSpeedMPerS, 'wind-speed')})`;

const sentences: Sentences = {
  'stress-against-limit': (reason, show) =>
    `Bending stress at ${placeWords[reason.place]} of structure ${reason.structureName} reaches ${show(reason.stressPa, 'stress')} ${at(reason, show)}; limit ${show(reason.limitPa, 'stress')} (${reason.limitSource}).`,
  'strain-against-limit': (reason, show) =>
    `Bending strain at ${placeWords[reason.place]} of structure ${reason.structureName} reaches ${show(reason.strainRatio, 'strain')} zero to peak ${at(reason, show)}; limit ${show(reason.limitRatio, 'strain')} zero to peak (${reason.limitSource}).`,
  'band-over-limit': (reason, show) =>
    `Over the limit from wind ${show(reason.windLowerMPerS, 'wind-speed')} to ${show(reason.windUpperMPerS, 'wind-speed')} (${show(reason.frequencyLowerHz, 'frequency')} to ${show(reason.frequencyUpperHz, 'frequency')}).`,
  life: (reason, show) =>
    reason.thresholdYears === null
      ? `Fatigue life in the wind climate: ${show(reason.lifeYears, 'life')}.`
      : `Fatigue life in the wind climate: ${show(reason.lifeYears, 'life')}, below the threshold of ${show(reason.thresholdYears, 'life')}.`,
  'no-damper': (reason, show) =>
    `No damper at structure ${reason.structureName}; everyday tension ${show(reason.tensionRatedRatio, 'share')} of rated strength, H/w ${show(reason.hOverWM, 'length')}.`,
  'weak-absorption': (reason, show) =>
    `The ${reason.dampersCount === 1 ? 'damper' : `${reason.dampersCount} dampers`} at structure ${reason.structureName} absorb only ${show(reason.absorbedRatio, 'share')} of the arriving wave power at ${show(reason.frequencyHz, 'frequency')}.`,
  'damper-off-plan': (reason, show) =>
    `Damper at structure ${reason.structureName} as-built ${show(Math.abs(reason.offsetM), 'damper-distance')} from plan: ${show(reason.distanceM, 'damper-distance')} instead of ${show(reason.plannedDistanceM, 'damper-distance')}.`,
  'amplitude-limit': (reason, show) =>
    `The amplitude reaches half a diameter ${at(reason, show)}, the end of what the wind power curve covers; the true one may be larger.`,
  'no-damper-data': (reason, show) =>
    `The damper data cover ${show(reason.frequencyLowerHz, 'frequency')} to ${show(reason.frequencyUpperHz, 'frequency')} only; outside nothing could be computed.`,
  'refused-input': ({ field, problem }) => `Not computed: ${field} ${problem}.`,
  quiet: () => 'Self-damping outweighs the wind over the whole band; the wire stays quiet.',
  'assumed-input': () => 'Rests on assumed spans, wires or tensions; check them before acting.',
};

/** One reason of a finding as a sentence, in the units of the reader. */
export function reasonSentence<C extends Reason['code']>(
  reason: ReasonOf<C> & { code: C },
  system: UnitSystem,
): string {
  const show: Show = (value, kind) => formatQuantity(value, kind, { system });
  return sentences[reason.code](reason, show);
}

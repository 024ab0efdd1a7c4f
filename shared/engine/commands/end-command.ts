import { clampedWire } from '../ends/clamped-wire.ts';
import { prepareEnd } from '../ends/prepare-end.ts';
import { respondEnd } from '../ends/respond-end.ts';
import type { EndResponse } from '../ends/end-response.ts';
import type { SpanEnd } from '../ends/span-end.ts';
import { methodEntry, methodNote } from '../methods/method-registry.ts';
import { assertNumber } from '../numerics/assert-number.ts';
import type { Complex } from '../numerics/complex.ts';
import { assertTension } from '../span/wire-properties.ts';
import { waveTable } from '../waves/wave-table.ts';
import { commandHead, type CommandHead } from './command-head.ts';
import { checkedFrequencies } from './waves-command.ts';

/** Input of `end`. */
export interface EndInput {
  readonly wire: {
    readonly massKgPerM: number;
    readonly bendingStiffnessMinNm2: number;
    readonly ratedStrengthN?: number | undefined;
  };
  readonly tensionN: number;
  readonly end: SpanEnd;
  readonly frequenciesHz: readonly number[];
}

/** Response of an end at one frequency; curvatures and motions per antinode amplitude. */
export interface EndRow {
  readonly frequencyHz: number;
  readonly outcome: 'steady' | 'no-damper-data';
  readonly reflection: Complex | null;
  readonly absorbedRatio: number | null;
  readonly iswRatio: number | null;
  readonly clampCurvaturePerM2: number | null;
  readonly damperCurvaturePerM2: (number | null)[];
  readonly damperMotionRatio: (number | null)[];
}

const massLimits = { above: 0, atMost: 50 } as const;
const stiffnessLimits = { atLeast: 1e-4, atMost: 1e6 } as const;
/** No span is longer than this. @source common practice */
const reachM = 10_000;

function endRow(frequencyHz: number, response: EndResponse, index: number): EndRow {
  if (response.hasData[index] === 0) {
    const none = response.damperCurvaturePerM2.map(() => null);
    const nothing = { reflection: null, absorbedRatio: null, iswRatio: null, clampCurvaturePerM2: null };
    return { frequencyHz, outcome: 'no-damper-data', ...nothing, damperCurvaturePerM2: none, damperMotionRatio: none };
  }
  const ratio = response.reflectionRatio[index] as number;
  return {
    frequencyHz,
    outcome: 'steady',
    reflection: { re: response.reflectionRe[index] as number, im: response.reflectionIm[index] as number },
    absorbedRatio: (1 - ratio) * (1 + ratio),
    iswRatio: (1 - ratio) / (1 + ratio),
    clampCurvaturePerM2: response.clampCurvaturePerM2[index] as number,
    damperCurvaturePerM2: response.damperCurvaturePerM2.map((series) => series[index] as number),
    damperMotionRatio: response.damperMotionRatio.map((series) => series[index] as number),
  };
}

/**
 * Reflection, absorbed share and curvatures of one end of a span.
 *
 * @param input wire, tension, end with dampers, frequencies [n]
 * @returns rows [n] in the order of the frequencies, dampers in the order of the input
 * @throws EngineInputError naming the field
 * @source closed form, see clampResponse
 * @validity see clampResponse; velocity tables at the middle of their velocities; strain at a damper clamp is indicative
 * @accuracy rounding
 */
export function endCommand(input: EndInput): CommandHead & { rows: EndRow[] } {
  const { massKgPerM, bendingStiffnessMinNm2, ratedStrengthN } = input.wire;
  assertNumber('wire.massKgPerM', massKgPerM, massLimits);
  assertNumber('wire.bendingStiffnessMinNm2', bendingStiffnessMinNm2, stiffnessLimits);
  assertTension(input.tensionN, { path: 'tensionN', ratedStrengthN: ratedStrengthN ?? Infinity });
  const end = prepareEnd(input.end, { path: 'end', lengthM: reachM });
  const wire = { massKgPerM, tensionN: input.tensionN, bendingStiffnessNm2: bendingStiffnessMinNm2 };
  const waves = waveTable(wire, checkedFrequencies(input.frequenciesHz));
  const response = respondEnd(clampedWire(waves), end, { wire, impedances: new Map() });
  const kinds = new Set(end.models.map((model) => model.kind));
  const names = [
    'waves-tensioned-beam',
    'end-rigid-clamp',
    ...(end.armourRods === null ? [] : ['end-armour-rods']),
    ...(end.support === null ? [] : ['end-moving-clamp']),
    ...(kinds.has('halves') ? ['damper-halves'] : []),
    ...(kinds.has('table') ? ['damper-table'] : []),
    ...(kinds.has('velocity-tables') ? ['damper-velocity-tables'] : []),
  ];
  return {
    ...commandHead(names.map((name) => methodNote(methodEntry('fixed', name)))),
    rows: Array.from(waves.frequenciesHz, (frequencyHz, index) => endRow(frequencyHz, response, index)),
  };
}

import { clampedWire, type ClampedWire } from '../ends/clamped-wire.ts';
import type { PreparedEnd } from '../ends/prepare-end.ts';
import { respondEnd, type ImpedanceStore } from '../ends/respond-end.ts';
import { spanSetup, type SpanSetup } from '../span/span-setup.ts';
import { hasVelocityTables, solveSweep } from '../span/solve-sweep.ts';
import { sweepSpan, type EndResponses, type SpanSweep, type SweepVisitor } from '../span/sweep-span.ts';
import { waveTable, type WaveTable } from '../waves/wave-table.ts';
import { windGridFrequencies } from '../wind/wind-grid.ts';
import { assertBasis } from './assert-basis.ts';
import type { EndResponseCache } from './end-response-cache.ts';
import type { SpanWireCase, VibrationBasis } from './span-wire-assessment.ts';

/** Checks a case and a basis and applies the basis's methods. */
export function caseSetup(input: SpanWireCase, basis: VibrationBasis): SpanSetup {
  assertBasis(input, basis);
  return spanSetup(input, { methods: basis.methods, curves: basis.curves, outsideValidity: 'fall-back' });
}

/** Balance of a span at given frequencies. */
export function sweepAt(setup: SpanSetup, frequenciesHz: Float64Array, visit?: SweepVisitor): SpanSweep {
  return solveSweep(setup, frequenciesHz, visit);
}

/** Everything that the response of an end depends on. */
function endKey(end: PreparedEnd, wireKey: string): string {
  const order = end.inputIndexes.map((input, place) => [input, end.distancesM[place], end.models[place]]);
  return `${wireKey}|${end.clampReflectionRatio}|${JSON.stringify([order, end.armourRods, end.support])}`;
}

function cachedResponses(setup: SpanSetup, waves: WaveTable, reuse: EndResponseCache): EndResponses {
  const { massKgPerM, bendingStiffnessMinNm2 } = setup.wire;
  const grid = [waves.frequenciesHz[0], waves.frequenciesHz.at(-1), waves.frequenciesHz.length];
  const wireKey = [massKgPerM, bendingStiffnessMinNm2, setup.tensionN, ...grid].join();
  const impedances: ImpedanceStore = new Map();
  let kept: ClampedWire | null = null;
  const clamped = () => (kept ??= clampedWire(waves));
  const wire = { massKgPerM, tensionN: setup.tensionN, bendingStiffnessNm2: bendingStiffnessMinNm2 };
  const respond = (end: PreparedEnd) =>
    reuse.obtain(endKey(end, wireKey), () => respondEnd(clamped(), end, { wire, impedances }));
  return [respond(setup.ends[0]), respond(setup.ends[1])];
}

/** Balance of a span over the wind band of a basis, with end responses from a cache if there is one. */
export function windSweep(setup: SpanSetup, basis: VibrationBasis, reuse?: EndResponseCache): SpanSweep {
  const { diameterM, massKgPerM, bendingStiffnessMinNm2 } = setup.wire;
  const frequenciesHz = windGridFrequencies(basis, { diameterM, strouhalNumber: setup.methods.strouhalNumber });
  // Where impedance depends on the motion, an end's response belongs to its span alone.
  if (reuse === undefined || hasVelocityTables(setup)) return sweepAt(setup, frequenciesHz);
  const wire = { massKgPerM, tensionN: setup.tensionN, bendingStiffnessNm2: bendingStiffnessMinNm2 };
  const waves = waveTable(wire, frequenciesHz);
  return sweepSpan(setup, { waves, responses: cachedResponses(setup, waves, reuse) });
}

import { endLimit } from '../assessment/stress-places.ts';
import { caseSetup } from '../assessment/wind-sweep.ts';
import { damperImpedance } from '../dampers/damper-impedance.ts';
import { clampedWire, type ClampedWire } from '../ends/clamped-wire.ts';
import { clampResponse, type ImpedanceSeries } from '../ends/clamp-response.ts';
import type { EndResponse } from '../ends/end-response.ts';
import { waveTable } from '../waves/wave-table.ts';
import { windGridFrequencies } from '../wind/wind-grid.ts';
import { symmetricAmplitude, symmetricAmplitudes, type SymmetricAmplitudes } from './symmetric-amplitudes.ts';
import type { PlacementTask } from './placement-types.ts';

/** One damper of a trial. */
export interface TrialDamper {
  readonly catalogueIndex: number;
  readonly distanceM: number;
}

/** The span at one tension, ready for trials. */
interface TrialTension {
  readonly tensionN: number;
  readonly wire: ClampedWire;
  readonly impedances: readonly ImpedanceSeries[];
  readonly amplitudes: SymmetricAmplitudes;
}

/** Everything that trials share. */
export interface PlacementTrials {
  readonly task: PlacementTask;
  readonly tensions: readonly TrialTension[];
  trialCount: number;
}

/** Frequencies of a trial: enough to rank, the choices are assessed in full. @source own model */
const trialFrequencyCount = 48;
/** A trial that leaves a frequency without damper data is worse than any that does not. */
const noDataUtilisation = 1e6;

/** Prepares wave tables, impedances and amplitudes at each tension. */
export function placementTrials(task: PlacementTask): PlacementTrials {
  const ends = [{ dampers: [] }, { dampers: [] }] as const;
  const tensions = task.tensionsN.map((tensionN): TrialTension => {
    const setup = caseSetup({ ...task.input, ends, span: { ...task.input.span, tensionN } }, task.basis);
    const { massKgPerM, bendingStiffnessMinNm2, diameterM } = setup.wire;
    const grid = { windBand: task.basis.windBand, frequencyCount: trialFrequencyCount };
    const frequenciesHz = windGridFrequencies(grid, { diameterM, strouhalNumber: setup.methods.strouhalNumber });
    const waves = waveTable({ massKgPerM, tensionN, bendingStiffnessNm2: bendingStiffnessMinNm2 }, frequenciesHz);
    return {
      tensionN,
      wire: clampedWire(waves),
      impedances: task.catalogue.map(({ model }) => damperImpedance(model, waves)),
      amplitudes: symmetricAmplitudes(setup, waves),
    };
  });
  return { task, tensions, trialCount: 0 };
}

/** Response of an end with a trial's dampers, nearest first. */
function respond(trials: PlacementTrials, tension: TrialTension, dampers: readonly TrialDamper[]): EndResponse {
  const sorted = [...dampers].sort((a, b) => a.distanceM - b.distanceM);
  return clampResponse(clampedWire(tension.wire.waves), {
    clampReflectionRatio: 1,
    bendingStiffnessNm2: trials.task.input.wire.bendingStiffnessMinNm2,
    distancesM: Float64Array.from(sorted, ({ distanceM }) => distanceM),
    impedances: sorted.map(
      ({ catalogueIndex }) =>
        tension.impedances[catalogueIndex] ?? { re: new Float64Array(0), im: new Float64Array(0) },
    ),
  });
}

/** Use of the limit at each frequency of a trial. */
function utilisations(trials: PlacementTrials, tension: TrialTension, response: EndResponse): Float64Array {
  const { wire } = trials.task.input;
  const damperCount = response.damperCurvaturePerM2.length;
  const limit = endLimit(trials.task.basis, { damperCount, modulusPa: wire.outerStrandModulusPa });
  const factor = (wire.outerStrandModulusPa * wire.outerStrandDiameterM) / 2 / limit.stressPa;
  return response.reflectionRatio.map((ratio, index) => {
    if (response.hasData[index] === 0) return noDataUtilisation;
    let curvature = response.clampCurvaturePerM2[index] as number;
    for (const series of response.damperCurvaturePerM2) curvature = Math.max(curvature, series[index] as number);
    return factor * curvature * symmetricAmplitude(tension.amplitudes, index, ratio);
  });
}

/** Worst use of the limit of a trial as planned, over frequencies and tensions. */
export function trialUtilisation(trials: PlacementTrials, dampers: readonly TrialDamper[]): number {
  trials.trialCount += 1;
  return trials.tensions.reduce(
    (worst, tension) => Math.max(worst, ...utilisations(trials, tension, respond(trials, tension, dampers))),
    0,
  );
}

/** Distances as planned and at the corners of the fitting tolerance. */
export function fittedVariants(dampers: readonly TrialDamper[], toleranceM: number): TrialDamper[][] {
  if (toleranceM === 0) return [[...dampers]];
  const corners = dampers.reduce<TrialDamper[][]>(
    (variants, damper) =>
      variants.flatMap((variant) =>
        [-toleranceM, toleranceM].map((shift) => [...variant, { ...damper, distanceM: damper.distanceM + shift }]),
      ),
    [[]],
  );
  return [[...dampers], ...(dampers.length === 0 ? [] : corners)];
}

/** The same, worst over the fitting tolerance. */
export function robustUtilisation(trials: PlacementTrials, dampers: readonly TrialDamper[]): number {
  const variants = fittedVariants(dampers, trials.task.toleranceM);
  return variants.reduce((worst, variant) => Math.max(worst, trialUtilisation(trials, variant)), 0);
}

/** Absorption and use of the limit against frequency, tension by tension. */
export function trialRows(trials: PlacementTrials, dampers: readonly TrialDamper[]) {
  return trials.tensions.map((tension) => {
    const response = respond(trials, tension, dampers);
    const used = utilisations(trials, tension, response);
    const rows = Array.from(tension.wire.waves.frequenciesHz, (frequencyHz, index) => ({
      frequencyHz,
      absorbedRatio: response.hasData[index] === 0 ? 0 : 1 - (response.reflectionRatio[index] as number) ** 2,
      utilisationRatio: used[index] as number,
    }));
    return { tensionN: tension.tensionN, rows };
  });
}

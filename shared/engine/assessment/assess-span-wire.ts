import { methodEntry, methodNote } from '../methods/method-registry.ts';
import type { EngineWarning, MethodNote } from '../methods/method-note.ts';
import { spanMethodNotes, spanWarnings } from '../span/span-notes.ts';
import { spanEnergy, type SpanEnergy } from '../span/span-place.ts';
import type { SpanSetup } from '../span/span-setup.ts';
import { outcomeOf, type SpanSweep } from '../span/sweep-span.ts';
import type { EndResponseCache } from './end-response-cache.ts';
import { exceedanceBand } from './exceedance-band.ts';
import { fatigueLife } from './fatigue-life.ts';
import { searchWorst, type WorstSearch } from './search-worst.ts';
import type { SpanWireAssessment, SpanWireCase, VibrationBasis, WorstPlace } from './span-wire-assessment.ts';
import { stressEnvelope, stressPerCurvature, stressPlaces, type StressPlace } from './stress-places.ts';
import { caseSetup, sweepAt, windSweep } from './wind-sweep.ts';

/** @source own model: fewer sectors stand badly for the directions between them */
const coarseSectorCount = 8;

type ClampWorst = { readonly stressPa: number; readonly frequencyHz: number };

/** Worst stress at the clamp of an end: over the points of the sweep, or the search's own where it is that clamp. */
function endWorst(
  setup: SpanSetup,
  { sweep, worst, end }: { readonly sweep: SpanSweep; readonly worst: WorstPlace | null; readonly end: 0 | 1 },
): ClampWorst | null {
  const factor = stressPerCurvature(setup);
  const curvatures = sweep.responses[end].clampCurvaturePerM2;
  const isFound = worst !== null && worst.endIndex === end && worst.place === 'clamp';
  let most: ClampWorst | null = isFound ? { stressPa: worst.stressPa, frequencyHz: worst.frequencyHz } : null;
  for (let index = 0; index < sweep.frequenciesHz.length; index += 1) {
    const stressPa = factor * (curvatures[index] as number) * (sweep.endAmplitudesM[end][index] as number);
    if (stressPa > (most?.stressPa ?? 0)) most = { stressPa, frequencyHz: sweep.frequenciesHz[index] as number };
  }
  return most;
}

/** The balance once more at the worst frequency, with its energies. */
function detailAt(setup: SpanSetup, basis: VibrationBasis, frequencyHz: number) {
  const kept: { energy: SpanEnergy | null } = { energy: null };
  const sweep = sweepAt(setup, Float64Array.of(frequencyHz), (_, solver, outcome) => {
    kept.energy = outcome === 'steady' ? spanEnergy(solver) : null;
  });
  const places = stressPlaces(setup, basis, sweep);
  const { placeIndexes, utilisations } = stressEnvelope(setup, places, sweep);
  const place = places[placeIndexes[0] ?? 0];
  return { sweep, place, utilisationRatio: utilisations[0] ?? 0, energy: kept.energy };
}

type Detail = ReturnType<typeof detailAt>;

function worstPlace(setup: SpanSetup, detail: Detail, place: StressPlace): WorstPlace {
  const { limit, endIndex, damperIndex } = place;
  const stressPa = detail.utilisationRatio * limit.stressPa;
  return {
    utilisationRatio: detail.utilisationRatio,
    stressPa,
    strainRatio: stressPa / setup.wire.outerStrandModulusPa,
    limitStressPa: limit.stressPa,
    limitKind: limit.kind,
    limitSource: limit.source,
    frequencyHz: detail.sweep.frequenciesHz[0] ?? 0,
    windSpeedMPerS: detail.sweep.windSpeedsMPerS[0] ?? 0,
    endIndex,
    place: damperIndex === null ? 'clamp' : 'damper-clamp',
    damperIndex,
    amplitudeM: place.amplitudesM[0] ?? 0,
  };
}

function energyOf(energy: SpanEnergy | null): SpanWireAssessment['energyAtWorst'] {
  if (energy === null) return null;
  const { windW, selfDampingW, leftW, rightW, closureRatio } = energy;
  return { windPowerW: windW, selfDampingPowerW: selfDampingW, endPowerW: [leftW, rightW], closureRatio };
}

function exceedanceOf(setup: SpanSetup, search: WorstSearch): SpanWireAssessment['exceedance'] {
  const band = exceedanceBand(search);
  if (band === null) return null;
  const windOf = (f: number) => (f * setup.wire.diameterM) / setup.methods.strouhalNumber;
  return {
    frequencyLowerHz: band.lowerHz,
    frequencyUpperHz: band.upperHz,
    windLowerMPerS: windOf(band.lowerHz),
    windUpperMPerS: windOf(band.upperHz),
  };
}

function notesOf(setup: SpanSetup, basis: VibrationBasis): MethodNote[] {
  const notes = spanMethodNotes(setup);
  if (basis.climate === null) return notes;
  const climate = methodNote(methodEntry('fixed', 'wind-climate-weibull'));
  return [...notes, methodNote(methodEntry('life', setup.methods.lifeName)), climate];
}

function warningsOf(setup: SpanSetup, basis: VibrationBasis, at: { sweep: SpanSweep; worst: WorstPlace | null }) {
  const warnings: EngineWarning[] = spanWarnings(setup, at.sweep);
  if (at.worst?.place === 'damper-clamp') {
    const text =
      'The worst strain is at a damper clamp; a damper clamp is free to rotate, so strain there is indicative.';
    warnings.push({ code: 'damper-clamp-indicative', text });
  }
  if (basis.climate !== null && basis.climate.sectors.length < coarseSectorCount) {
    const text = `The wind climate has fewer than ${coarseSectorCount} direction sectors; hours normal to the span are rough.`;
    warnings.push({ code: 'coarse-climate', text });
  }
  return warnings;
}

/**
 * Worst stress, its place, energies and the fatigue life of one span wire over the wind band of a basis.
 *
 * @param input case of one span wire, SI units, see SpanWireCase
 * @param basis wind band, methods, limits and climate
 * @param reuse responses of ends kept from other span wires with the same wire, tension and dampers
 * @returns outcome of the worst frequency, place and limit, band over the limit, energies, life, methods and warnings
 * @throws EngineInputError naming the field for input that cannot be
 * @source closed form on the chosen methods; each with its standing in `methods`
 * @validity see `warnings`; a self-damping law outside its validity is replaced by the default with a warning
 * @accuracy of the computation about 1e-5 of the worst stress, see `search`; the methods' own doubt is far larger
 */
export function assessSpanWire(
  input: SpanWireCase,
  basis: VibrationBasis,
  reuse?: EndResponseCache,
): SpanWireAssessment {
  const setup = caseSetup(input, basis);
  const sweep = windSweep(setup, basis, reuse);
  const places = stressPlaces(setup, basis, sweep);
  const points = {
    frequenciesHz: Array.from(sweep.frequenciesHz),
    utilisations: Array.from(stressEnvelope(setup, places, sweep).utilisations),
  };
  const search = searchWorst(setup, points, (frequenciesHz) => {
    const more = sweepAt(setup, frequenciesHz);
    return stressEnvelope(setup, stressPlaces(setup, basis, more), more).utilisations;
  });
  const detail = search.worstFrequencyHz === null ? null : detailAt(setup, basis, search.worstFrequencyHz);
  const place = detail?.place;
  const hasWorst = detail !== null && place !== undefined && detail.utilisationRatio > 0;
  const worst = hasWorst ? worstPlace(setup, detail, place) : null;
  const outcome = detail === null ? 'no-damper-data' : outcomeOf(detail.sweep.outcomeCodes[0] ?? 0);
  const absorbed = (end: 0 | 1) => 1 - (detail?.sweep.responses[end].reflectionRatio[0] ?? 1) ** 2;
  return {
    outcome,
    worst,
    endWorst: [endWorst(setup, { sweep, worst, end: 0 }), endWorst(setup, { sweep, worst, end: 1 })],
    exceedance: exceedanceOf(setup, search),
    endAbsorbedRatioAtWorst: [absorbed(0), absorbed(1)],
    energyAtWorst: energyOf(detail?.energy ?? null),
    life: fatigueLife(setup, { sweep, places }, { basis, bearingRad: input.span.bearingRad }),
    search: { frequencyCount: search.frequenciesHz.length, worstErrorRatio: search.worstErrorRatio },
    methods: notesOf(setup, basis),
    warnings: warningsOf(setup, basis, { sweep, worst }),
  };
}

import {
  complexSeries,
  pairCompliance,
  wirePlace,
  type ClampedWire,
  type ComplexSeries,
  type WirePlace,
} from './clamped-wire.ts';
import { damperMotions } from './damper-motions.ts';
import { emptyEndResponse, type EndResponse } from './end-response.ts';

/** Driving-point impedance of a damper at each frequency of a table; not a number where the damper has no data. */
export type ImpedanceSeries = ComplexSeries;

/** A rigid clamp with dampers at rising distances. */
export interface ClampWithDampers {
  readonly clampReflectionRatio: number;
  readonly bendingStiffnessNm2: number;
  readonly distancesM: Float64Array;
  readonly impedances: readonly ImpedanceSeries[];
}

const at = (values: Float64Array, index: number): number => values[index] as number; // index is always inside

/** jωZ of each damper. */
function driveSeries({ waves, pool }: ClampedWire, impedance: ImpedanceSeries): ComplexSeries {
  const drive = complexSeries(pool);
  for (let index = 0; index < drive.re.length; index += 1) {
    const w = at(waves.angularFrequenciesRadPerS, index);
    drive.re[index] = -w * at(impedance.im, index);
    drive.im[index] = w * at(impedance.re, index);
  }
  return drive;
}

/** The force −jωZ·y that a damper puts on the wire, in place of its jωZ. */
function forceSeries(drive: ComplexSeries, motion: ComplexSeries): ComplexSeries {
  const { re, im } = drive;
  for (let index = 0; index < re.length; index += 1) {
    const zr = at(re, index);
    const zi = at(im, index);
    const yr = at(motion.re, index);
    const yi = at(motion.im, index);
    re[index] = zi * yi - zr * yr;
    im[index] = -(zr * yi + zi * yr);
  }
  return drive;
}

/** Γ = −ρ + C₁ΣF·y₀(s), with the loss of the clamp; frequencies without data stay 0. */
function storeReflection(wire: ClampedWire, loads: readonly DamperLoad[], out: Store): void {
  const { response, clampReflectionRatio } = out;
  for (let index = 0; index < response.reflectionRatio.length; index += 1) {
    let sumRe = 0;
    let sumIm = 0;
    for (const { place, force } of loads) {
      const yr = at(place.motionRe, index);
      const yi = at(place.motionIm, index);
      const fr = at(force.re, index);
      const fi = at(force.im, index);
      sumRe += fr * yr - fi * yi;
      sumIm += fr * yi + fi * yr;
    }
    const c1 = at(wire.waveMPerN, index);
    const re = c1 * sumIm - at(wire.rhoRe, index);
    const im = -c1 * sumRe - at(wire.rhoIm, index);
    const size = loads.length === 0 ? 1 : Math.sqrt(re * re + im * im);
    if (Number.isNaN(size)) continue;
    response.hasData[index] = 1;
    // A passive end cannot reflect more than it gets; rounding can say otherwise by a few units in the last place.
    const scale = clampReflectionRatio * (size > 1 ? 1 / size : 1);
    response.reflectionRe[index] = re * scale;
    response.reflectionIm[index] = im * scale;
    response.reflectionRatio[index] = Math.min(size, 1) * clampReflectionRatio;
  }
}

/** y″(0) = [2jk(k² + κ²) + ΣF(e^{−jks} − e^{−κs})/EI]/(κ − jk), over the antinode amplitude 1 + |Γ|. */
function storeClampCurvature({ waves }: ClampedWire, loads: readonly DamperLoad[], out: Store): void {
  const { response, bendingStiffnessNm2: EI } = out;
  for (let index = 0; index < response.reflectionRatio.length; index += 1) {
    if (response.hasData[index] === 0) continue;
    const k = at(waves.waveNumbersRadPerM, index);
    const squares = at(waves.stiffTensionsN, index) / EI;
    let re = 0;
    let im = 2 * k * squares;
    for (const { place, force } of loads) {
      const a = (at(place.cos, index) - at(place.decay, index)) / EI;
      const b = -at(place.sin, index) / EI;
      const fr = at(force.re, index);
      const fi = at(force.im, index);
      re += fr * a - fi * b;
      im += fr * b + fi * a;
    }
    const antinodeRatio = 1 + at(response.reflectionRatio, index);
    response.clampCurvaturePerM2[index] = Math.sqrt((re * re + im * im) / squares) / antinodeRatio;
  }
}

/** Undisturbed curvature at a damper, −k²(y₀ − (ρ − 1)e^{−κx}) + κ²(ρ − 1)e^{−κx}. */
function undisturbedBend({ waves, pool, rhoRe, rhoIm }: ClampedWire, place: WirePlace): ComplexSeries {
  const bend = complexSeries(pool);
  for (let index = 0; index < rhoRe.length; index += 1) {
    const k = at(waves.waveNumbersRadPerM, index);
    const kappa = at(waves.decayNumbersPerM, index);
    const squares = k * k + kappa * kappa;
    const d = at(place.decay, index);
    bend.re[index] = squares * (at(rhoRe, index) - 1) * d - k * k * at(place.motionRe, index);
    bend.im[index] = squares * at(rhoIm, index) * d - k * k * at(place.motionIm, index);
  }
  return bend;
}

function addProduct(sum: ComplexSeries, a: ComplexSeries, b: ComplexSeries): void {
  for (let index = 0; index < sum.re.length; index += 1) {
    const ar = at(a.re, index);
    const ai = at(a.im, index);
    const br = at(b.re, index);
    const bi = at(b.im, index);
    sum.re[index] = at(sum.re, index) + ar * br - ai * bi;
    sum.im[index] = at(sum.im, index) + ar * bi + ai * br;
  }
}

/** Keeps the size of a complex series over the antinode amplitude; 0 where there is no data. */
function storeSize(series: ComplexSeries, response: EndResponse, out: Float64Array): void {
  for (let index = 0; index < out.length; index += 1) {
    if (response.hasData[index] === 0) continue;
    const re = at(series.re, index);
    const im = at(series.im, index);
    out[index] = Math.sqrt(re * re + im * im) / (1 + at(response.reflectionRatio, index));
  }
}

interface DamperLoad {
  readonly place: WirePlace;
  readonly force: ComplexSeries;
}

interface Store {
  readonly response: EndResponse;
  readonly clampReflectionRatio: number;
  readonly bendingStiffnessNm2: number;
}

/**
 * Reflection, clamp curvature and damper-clamp curvatures of a rigid clamp with any number of dampers on a tensioned
 * beam, at each frequency of a wave table.
 *
 * @param wire clamped wire at the frequencies [n]
 * @param end   clamp with dampers at rising distances; the response keeps that order
 * @returns arrays [n]
 * @source closed form: superposition of the clamped wire's response to unit forces, see clamped-wire
 * @validity small motion, dampers as point impedances that take no moment, EI > 0; the span beyond counts as endless
 * @accuracy rounding; no growing exponential
 */
export function clampResponse(wire: ClampedWire, end: ClampWithDampers): EndResponse {
  const response = emptyEndResponse(wire.rhoRe.length, end.distancesM.length);
  const places = Array.from(end.distancesM, (distanceM) => wirePlace(wire, distanceM));
  const pairs = places.map((far, index) => places.slice(0, index + 1).map((near) => pairCompliance(wire, near, far)));
  const drives = end.impedances.map((impedance) => driveSeries(wire, impedance));
  const undisturbed = places.map(({ motionRe, motionIm }) => ({ re: motionRe, im: motionIm }));
  const motions = damperMotions({ drives, undisturbed, pairs, pool: wire.pool });
  const loads = places.map((place, index): DamperLoad => {
    const [drive, motion] = [drives[index], motions[index]];
    if (drive === undefined || motion === undefined) throw new RangeError('every damper has an impedance');
    return { place, force: forceSeries(drive, motion) };
  });
  const out = { response, ...end };
  storeReflection(wire, loads, out);
  storeClampCurvature(wire, loads, out);
  loads.forEach(({ place }, index) => {
    const bend = undisturbedBend(wire, place);
    loads.forEach(({ force }, source) => {
      const pair = pairs[Math.max(index, source)]?.[Math.min(index, source)];
      if (pair !== undefined) addProduct(bend, source > index ? pair.nearBend : pair.farBend, force);
    });
    storeSize(bend, response, response.damperCurvaturePerM2[index] ?? new Float64Array(0));
    storeSize(motions[index] ?? bend, response, response.damperMotionRatio[index] ?? new Float64Array(0));
  });
  return response;
}

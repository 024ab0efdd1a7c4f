import { complexSystem, solveComplex, type ComplexSystem } from '../numerics/solve-complex.ts';
import type { WaveTable } from '../waves/wave-table.ts';
import { clampedWire, slot, tuneClampedWire, type ClampedWire } from './clamped-wire.ts';
import { emptyEndResponse, type EndResponse } from './end-response.ts';

/** Driving-point impedance of a damper at each frequency of a table; not a number where the damper has no data. */
export interface ImpedanceSeries {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/** A rigid clamp with dampers at rising distances. */
export interface ClampWithDampers {
  readonly clampReflectionRatio: number;
  readonly bendingStiffnessNm2: number;
  readonly distancesM: Float64Array;
  readonly impedances: readonly ImpedanceSeries[];
}

const at = (values: Float64Array, index: number): number => values[index] as number; // index is always inside

/** Adds one entry pair G(x_i, x_j)·jωZ_j for dampers near ≤ far, to both triangles. */
function coupleDampers(wire: ClampedWire, system: ComplexSystem, pair: { near: number; far: number }): void {
  const { places, distancesM, waveComplianceMPerN: c1, decayComplianceMPerN: c2, decayNumberPerM: kappa } = wire;
  const near = pair.near * slot.stride;
  const far = pair.far * slot.stride;
  const c = at(places, far + slot.wave);
  const s = at(places, far + slot.wave + 1);
  const d = at(places, far + slot.decay);
  const yr = at(places, near + slot.motion);
  const yi = at(places, near + slot.motion + 1);
  const gap = pair.near === pair.far ? 1 : Math.exp(-kappa * (at(distancesM, pair.far) - at(distancesM, pair.near)));
  // −j·c1·y₀(s)·(c − js)
  const gr = c1 * (yi * c - yr * s) - c2 * gap + at(places, near + slot.beta) * d;
  const gi = -c1 * (yr * c + yi * s) + at(places, near + slot.beta + 1) * d;
  const n = system.sizeCount;
  system.matrixRe[pair.far * n + pair.near] = gr;
  system.matrixIm[pair.far * n + pair.near] = gi;
  system.matrixRe[pair.near * n + pair.far] = gr;
  system.matrixIm[pair.near * n + pair.far] = gi;
}

/** Turns the compliances in the matrix into I + jω·G·Z, column by column, and sets the undisturbed motion as side. */
function loadDampers(wire: ClampedWire, system: ComplexSystem, drive: { re: Float64Array; im: Float64Array }): void {
  const n = system.sizeCount;
  for (let near = 0; near < n; near += 1) {
    for (let far = near; far < n; far += 1) coupleDampers(wire, system, { near, far });
  }
  for (let column = 0; column < n; column += 1) {
    const zr = at(drive.re, column);
    const zi = at(drive.im, column);
    for (let row = 0; row < n; row += 1) {
      const entry = row * n + column;
      const gr = at(system.matrixRe, entry);
      const gi = at(system.matrixIm, entry);
      system.matrixRe[entry] = gr * zr - gi * zi + (row === column ? 1 : 0);
      system.matrixIm[entry] = gr * zi + gi * zr;
    }
    system.sideRe[column] = at(wire.places, column * slot.stride + slot.motion);
    system.sideIm[column] = at(wire.places, column * slot.stride + slot.motion + 1);
  }
}

/** Γ = −ρ + C₁ΣF·y₀(s), with F the forces of the dampers on the wire. */
function storeReflection(wire: ClampedWire, forces: { re: Float64Array; im: Float64Array }, out: Store): void {
  let sumRe = 0;
  let sumIm = 0;
  for (let damper = 0; damper < wire.distancesM.length; damper += 1) {
    const yr = at(wire.places, damper * slot.stride + slot.motion);
    const yi = at(wire.places, damper * slot.stride + slot.motion + 1);
    sumRe += at(forces.re, damper) * yr - at(forces.im, damper) * yi;
    sumIm += at(forces.re, damper) * yi + at(forces.im, damper) * yr;
  }
  const re = wire.waveComplianceMPerN * sumIm - wire.rhoRe;
  const im = -wire.waveComplianceMPerN * sumRe - wire.rhoIm;
  const size = wire.distancesM.length === 0 ? 1 : Math.sqrt(re * re + im * im);
  // A passive end cannot reflect more than it gets; rounding can say otherwise by a few units in the last place.
  const scale = out.clampReflectionRatio * (size > 1 ? 1 / size : 1);
  out.response.reflectionRe[out.index] = re * scale;
  out.response.reflectionIm[out.index] = im * scale;
  out.response.reflectionRatio[out.index] = Math.min(size, 1) * out.clampReflectionRatio;
}

/** y″(0) = [2jk(k² + κ²) + ΣF(e^{−jks} − e^{−κs})/EI]/(κ − jk). */
function storeClampCurvature(wire: ClampedWire, forces: { re: Float64Array; im: Float64Array }, out: Store): void {
  const { waveNumberRadPerM: k, decayNumberPerM: kappa, places } = wire;
  let re = 0;
  let im = 0;
  for (let damper = 0; damper < wire.distancesM.length; damper += 1) {
    const here = damper * slot.stride;
    const a = at(places, here + slot.wave) - at(places, here + slot.decay);
    const b = -at(places, here + slot.wave + 1);
    re += at(forces.re, damper) * a - at(forces.im, damper) * b;
    im += at(forces.re, damper) * b + at(forces.im, damper) * a;
  }
  const squares = k * k + kappa * kappa;
  const sumRe = re / out.bendingStiffnessNm2;
  const sumIm = im / out.bendingStiffnessNm2 + 2 * k * squares;
  const antinodeRatio = 1 + at(out.response.reflectionRatio, out.index);
  out.response.clampCurvaturePerM2[out.index] = Math.sqrt((sumRe * sumRe + sumIm * sumIm) / squares) / antinodeRatio;
}

/** y″ at one damper: undisturbed part and the part of every force. */
function storeDamper(
  wire: ClampedWire,
  forces: { re: Float64Array; im: Float64Array },
  out: Store & { damper: number },
) {
  const { waveNumberRadPerM: k, decayNumberPerM: kappa, waveComplianceMPerN: c1, decayComplianceMPerN: c2 } = wire;
  const { places, distancesM } = wire;
  const here = out.damper * slot.stride;
  let re = at(places, here + slot.motionBend);
  let im = at(places, here + slot.motionBend + 1);
  for (let source = 0; source < distancesM.length; source += 1) {
    const there = source * slot.stride;
    const isBeyond = source > out.damper;
    const far = isBeyond ? there : here;
    const near = isBeyond ? here : there;
    const motion = near + (isBeyond ? slot.motionBend : slot.motion);
    const beta = near + (isBeyond ? slot.betaBend : slot.beta);
    const waveFactor = isBeyond ? c1 : -k * k * c1;
    const betaFactor = (isBeyond ? 1 : kappa * kappa) * at(places, far + slot.decay);
    const gap = Math.exp(-kappa * Math.abs(at(distancesM, source) - at(distancesM, out.damper)));
    const c = at(places, far + slot.wave);
    const s = at(places, far + slot.wave + 1);
    const yr = at(places, motion);
    const yi = at(places, motion + 1);
    const gr = waveFactor * (yi * c - yr * s) - kappa * kappa * c2 * gap + betaFactor * at(places, beta);
    const gi = -waveFactor * (yr * c + yi * s) + betaFactor * at(places, beta + 1);
    re += gr * at(forces.re, source) - gi * at(forces.im, source);
    im += gr * at(forces.im, source) + gi * at(forces.re, source);
  }
  const antinodeRatio = 1 + at(out.response.reflectionRatio, out.index);
  const curvatures = out.response.damperCurvaturePerM2[out.damper];
  if (curvatures !== undefined) curvatures[out.index] = Math.sqrt(re * re + im * im) / antinodeRatio;
}

interface Store {
  readonly response: EndResponse;
  readonly clampReflectionRatio: number;
  readonly bendingStiffnessNm2: number;
  index: number;
}

/**
 * Reflection, clamp curvature and damper-clamp curvatures of a rigid clamp with any number of dampers on a tensioned
 * beam, at each frequency of a wave table.
 *
 * @param table wave numbers of the wire [n]
 * @param end   clamp with dampers at rising distances; the response keeps that order
 * @returns arrays [n]
 * @source closed form: superposition of the clamped wire's response to unit forces, see clamped-wire
 * @validity small motion, dampers as point impedances that take no moment, EI > 0; the span beyond counts as endless
 * @accuracy rounding; no growing exponential
 */
export function clampResponse(table: WaveTable, end: ClampWithDampers): EndResponse {
  const frequencyCount = table.frequenciesHz.length;
  const damperCount = end.distancesM.length;
  const response = emptyEndResponse(frequencyCount, damperCount);
  const wire = clampedWire(end.distancesM);
  const system = complexSystem(damperCount);
  const drive = { re: new Float64Array(damperCount), im: new Float64Array(damperCount) };
  const out = { response, index: 0, damper: 0, ...end };
  for (let index = 0; index < frequencyCount; index += 1) {
    if (!setDrive(end.impedances, drive, { index, w: at(table.angularFrequenciesRadPerS, index) })) continue;
    response.hasData[index] = 1;
    tuneClampedWire(wire, table, index);
    loadDampers(wire, system, drive);
    solveComplex(system);
    out.index = index;
    storeMotions(system, drive, out);
    storeReflection(wire, drive, out);
    storeClampCurvature(wire, drive, out);
    for (let damper = 0; damper < damperCount; damper += 1) {
      out.damper = damper;
      const motions = response.damperMotionRatio[damper];
      if (motions !== undefined) motions[index] = at(motions, index) / (1 + at(response.reflectionRatio, index));
      storeDamper(wire, drive, out);
    }
  }
  return response;
}

/** Sets jωZ of each damper; false where one has no data. */
function setDrive(
  impedances: readonly ImpedanceSeries[],
  drive: { re: Float64Array; im: Float64Array },
  { index, w }: { index: number; w: number },
): boolean {
  for (let damper = 0; damper < impedances.length; damper += 1) {
    const zr = impedances[damper]?.re[index] ?? NaN;
    if (Number.isNaN(zr)) return false;
    drive.re[damper] = -w * (impedances[damper]?.im[index] ?? NaN);
    drive.im[damper] = w * zr;
  }
  return true;
}

/** Keeps the motion of each damper clamp and turns jωZ into the force −jωZ·y that the damper puts on the wire. */
function storeMotions(system: ComplexSystem, drive: { re: Float64Array; im: Float64Array }, out: Store): void {
  for (let damper = 0; damper < system.sizeCount; damper += 1) {
    const yr = at(system.sideRe, damper);
    const yi = at(system.sideIm, damper);
    const zr = at(drive.re, damper);
    const zi = at(drive.im, damper);
    drive.re[damper] = zi * yi - zr * yr;
    drive.im[damper] = -(zr * yi + zi * yr);
    const motions = out.response.damperMotionRatio[damper];
    if (motions !== undefined) motions[out.index] = Math.sqrt(yr * yr + yi * yi);
  }
}

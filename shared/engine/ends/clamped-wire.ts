import type { WaveTable } from '../waves/wave-table.ts';

/*
 * A half-infinite tensioned beam clamped at x = 0 (y = y′ = 0), time factor exp(+jωt), x growing into the span.
 * With ρ = (κ + jk)/(κ − jk), C₁ = −j/(2Rk), C₂ = −1/(2Rκ), R = EI(k² + κ²):
 *   undisturbed motion under a unit incoming wave   y₀(x) = e^{jkx} − ρe^{−jkx} + (ρ − 1)e^{−κx}
 *   its amplitudes under a unit force at s ≤ x       G(x, s) = C₁y₀(s)e^{−jkx} + C₂e^{−κ(x−s)} + β(s)e^{−κx}
 *   β(s) = (ρ − 1)C₁e^{−jks} + ρC₂e^{−κs}, and G(x, s) = G(s, x).
 * Every exponential decays, so nothing overflows however far out a damper sits.
 */

/** Complex numbers by their offset in a work array: real part at the offset, imaginary part one further. */
export const slot = { wave: 0, decay: 2, motion: 3, motionBend: 5, beta: 7, betaBend: 9, stride: 11 } as const;

/** State of the clamped wire at one frequency: numbers, and per damper the functions above at its place. */
export interface ClampedWire {
  readonly distancesM: Float64Array;
  /** `slot.stride` numbers per damper. */
  readonly places: Float64Array;
  waveNumberRadPerM: number;
  decayNumberPerM: number;
  rhoRe: number;
  rhoIm: number;
  /** C₁ = −j·waveCompliance. */
  waveComplianceMPerN: number;
  /** C₂ = −decayCompliance. */
  decayComplianceMPerN: number;
}

/** Storage for a clamped wire with dampers at rising distances. */
export function clampedWire(distancesM: Float64Array): ClampedWire {
  return {
    distancesM,
    places: new Float64Array(distancesM.length * slot.stride),
    waveNumberRadPerM: 0,
    decayNumberPerM: 0,
    rhoRe: 0,
    rhoIm: 0,
    waveComplianceMPerN: 0,
    decayComplianceMPerN: 0,
  };
}

/** Sets the wire to one frequency of the table and evaluates y₀, y₀″, β and β″ at each damper. */
export function tuneClampedWire(wire: ClampedWire, table: WaveTable, index: number): void {
  const k = table.waveNumbersRadPerM[index] as number;
  const kappa = table.decayNumbersPerM[index] as number;
  const half = 0.5 / (table.stiffTensionsN[index] as number);
  const squares = 1 / (kappa * kappa + k * k);
  const pr = (kappa * kappa - k * k) * squares;
  const pi = 2 * kappa * k * squares;
  const c1 = half / k;
  const c2 = half / kappa;
  wire.waveNumberRadPerM = k;
  wire.decayNumberPerM = kappa;
  wire.rhoRe = pr;
  wire.rhoIm = pi;
  wire.waveComplianceMPerN = c1;
  wire.decayComplianceMPerN = c2;
  const { places, distancesM } = wire;
  for (let damper = 0; damper < distancesM.length; damper += 1) {
    const x = distancesM[damper] as number;
    const c = Math.cos(k * x);
    const s = Math.sin(k * x);
    const d = Math.exp(-kappa * x);
    const waveRe = c - (pr * c + pi * s);
    const waveIm = s - (pi * c - pr * s);
    const decayRe = (pr - 1) * d;
    const decayIm = pi * d;
    // (ρ − 1)e^{−jkx}·C₁ with C₁ = −j·c1: −j(a + jb) = b − ja
    const betaWaveRe = c1 * (pi * c - (pr - 1) * s);
    const betaWaveIm = -c1 * ((pr - 1) * c + pi * s);
    const betaDecayRe = -c2 * pr * d;
    const betaDecayIm = -c2 * pi * d;
    const at = damper * slot.stride;
    places[at + slot.wave] = c;
    places[at + slot.wave + 1] = s;
    places[at + slot.decay] = d;
    places[at + slot.motion] = waveRe + decayRe;
    places[at + slot.motion + 1] = waveIm + decayIm;
    places[at + slot.motionBend] = kappa * kappa * decayRe - k * k * waveRe;
    places[at + slot.motionBend + 1] = kappa * kappa * decayIm - k * k * waveIm;
    places[at + slot.beta] = betaWaveRe + betaDecayRe;
    places[at + slot.beta + 1] = betaWaveIm + betaDecayIm;
    places[at + slot.betaBend] = kappa * kappa * betaDecayRe - k * k * betaWaveRe;
    places[at + slot.betaBend + 1] = kappa * kappa * betaDecayIm - k * k * betaWaveIm;
  }
}

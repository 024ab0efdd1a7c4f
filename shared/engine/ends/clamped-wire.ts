import { seriesPool, type SeriesPool } from '../numerics/series-pool.ts';
import type { WaveTable } from '../waves/wave-table.ts';

/*
 * A half-infinite tensioned beam clamped at x = 0 (y = y′ = 0), time factor exp(+jωt), x growing into the span.
 * With ρ = (κ + jk)/(κ − jk), C₁ = −j/(2Rk), C₂ = −1/(2Rκ), R = EI(k² + κ²):
 *   undisturbed motion under a unit incoming wave   y₀(x) = e^{jkx} − ρe^{−jkx} + (ρ − 1)e^{−κx}
 *   motion at x under a unit force at s ≤ x          G(x, s) = C₁y₀(s)e^{−jkx} + C₂e^{−κ(x−s)} + β(s)e^{−κx}
 *   β(s) = (ρ − 1)C₁e^{−jks} + ρC₂e^{−κs}, and G(x, s) = G(s, x).
 * Every exponential decays, so nothing overflows however far out a damper sits.
 * All loops run over the frequencies of one damper or one pair, on plain arrays: this is the inner loop of the engine.
 */

/** What the clamped wire is at each frequency, [n]: ρ and the compliances C₁ = −j·waveMPerN, C₂ = −decayMPerN. */
export interface ClampedWire {
  readonly waves: WaveTable;
  /** Storage for the series of this wire. */
  readonly pool: SeriesPool;
  readonly rhoRe: Float64Array;
  readonly rhoIm: Float64Array;
  readonly waveMPerN: Float64Array;
  readonly decayMPerN: Float64Array;
}

/** The functions above at one damper's place, [n]. */
export interface WirePlace {
  readonly distanceM: number;
  readonly cos: Float64Array;
  readonly sin: Float64Array;
  readonly decay: Float64Array;
  readonly motionRe: Float64Array;
  readonly motionIm: Float64Array;
}

const at = (values: Float64Array, index: number): number => values[index] as number; // index is always inside

/** The clamped wire at the frequencies of a table. */
export function clampedWire(waves: WaveTable): ClampedWire {
  const count = waves.frequenciesHz.length;
  const pool = seriesPool(count);
  const wire: ClampedWire = { waves, pool, rhoRe: pool(), rhoIm: pool(), waveMPerN: pool(), decayMPerN: pool() };
  for (let index = 0; index < count; index += 1) {
    const k = at(waves.waveNumbersRadPerM, index);
    const kappa = at(waves.decayNumbersPerM, index);
    const half = 0.5 / at(waves.stiffTensionsN, index);
    const squares = 1 / (kappa * kappa + k * k);
    wire.rhoRe[index] = (kappa * kappa - k * k) * squares;
    wire.rhoIm[index] = 2 * kappa * k * squares;
    wire.waveMPerN[index] = half / k;
    wire.decayMPerN[index] = half / kappa;
  }
  return wire;
}

/** y₀ and the exponentials at one damper. */
export function wirePlace(wire: ClampedWire, distanceM: number): WirePlace {
  const { waveNumbersRadPerM, decayNumbersPerM } = wire.waves;
  const count = waveNumbersRadPerM.length;
  const cos = wire.pool();
  const sin = wire.pool();
  const decay = wire.pool();
  const motionRe = wire.pool();
  const motionIm = wire.pool();
  for (let index = 0; index < count; index += 1) {
    const kx = at(waveNumbersRadPerM, index) * distanceM;
    const c = Math.cos(kx);
    const s = Math.sin(kx);
    const d = Math.exp(-at(decayNumbersPerM, index) * distanceM);
    const pr = at(wire.rhoRe, index);
    const pi = at(wire.rhoIm, index);
    cos[index] = c;
    sin[index] = s;
    decay[index] = d;
    motionRe[index] = c - (pr * c + pi * s) + (pr - 1) * d;
    motionIm[index] = s - (pi * c - pr * s) + pi * d;
  }
  return { distanceM, cos, sin, decay, motionRe, motionIm };
}

/** Complex series [n]. */
export interface ComplexSeries {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/** Motion and curvature at one damper under a unit force at another, [n]. */
export interface PairCompliance {
  /** G, the same both ways. */
  readonly motion: ComplexSeries;
  /** y″ at the far damper under a force at the near one. */
  readonly farBend: ComplexSeries;
  /** y″ at the near damper under a force at the far one. */
  readonly nearBend: ComplexSeries;
}

/** A zeroed complex series. */
export const complexSeries = (pool: SeriesPool): ComplexSeries => ({ re: pool(), im: pool() });

const noSeries: ComplexSeries = { re: new Float64Array(0), im: new Float64Array(0) };

/**
 * G between two dampers and the curvatures that go with it; for near = far both curvatures are the same.
 *
 * y″ at the far one: −k²·C₁y₀(s)e^{−jkx} + κ²(C₂e^{−κ(x−s)} + β(s)e^{−κx}); at the near one y₀ and β are derived instead.
 */
export function pairCompliance(wire: ClampedWire, near: WirePlace, far: WirePlace): PairCompliance {
  const { waveNumbersRadPerM, decayNumbersPerM } = wire.waves;
  const count = waveNumbersRadPerM.length;
  const isSame = near === far;
  const pair: PairCompliance = {
    motion: complexSeries(wire.pool),
    farBend: complexSeries(wire.pool),
    nearBend: isSame ? noSeries : complexSeries(wire.pool),
  };
  const gapM = far.distanceM - near.distanceM;
  for (let index = 0; index < count; index += 1) {
    const k2 = at(waveNumbersRadPerM, index) ** 2;
    const kappa = at(decayNumbersPerM, index);
    const kappa2 = kappa * kappa;
    const c1 = at(wire.waveMPerN, index);
    const c2 = at(wire.decayMPerN, index);
    const pr = at(wire.rhoRe, index);
    const pi = at(wire.rhoIm, index);
    const c = at(far.cos, index);
    const s = at(far.sin, index);
    const fade = at(far.decay, index);
    const yr = at(near.motionRe, index);
    const yi = at(near.motionIm, index);
    const direct = c2 * (isSame ? 1 : Math.exp(-kappa * gapM));
    // β(s) in its wave and decaying parts; −j(a + jb) = b − ja.
    const nc = at(near.cos, index);
    const ns = at(near.sin, index);
    const nd = at(near.decay, index);
    const betaWaveRe = c1 * (pi * nc - (pr - 1) * ns);
    const betaWaveIm = -c1 * ((pr - 1) * nc + pi * ns);
    const betaDecayRe = -c2 * pr * nd;
    const betaDecayIm = -c2 * pi * nd;
    const waveRe = c1 * (yi * c - yr * s);
    const waveIm = -c1 * (yr * c + yi * s);
    const restRe = (betaWaveRe + betaDecayRe) * fade - direct;
    const restIm = (betaWaveIm + betaDecayIm) * fade;
    pair.motion.re[index] = waveRe + restRe;
    pair.motion.im[index] = waveIm + restIm;
    pair.farBend.re[index] = kappa2 * restRe - k2 * waveRe;
    pair.farBend.im[index] = kappa2 * restIm - k2 * waveIm;
    if (isSame) continue;
    const decayRe = (pr - 1) * nd;
    const decayIm = pi * nd;
    const bendRe = kappa2 * decayRe - k2 * (yr - decayRe);
    const bendIm = kappa2 * decayIm - k2 * (yi - decayIm);
    const betaBendRe = kappa2 * betaDecayRe - k2 * betaWaveRe;
    const betaBendIm = kappa2 * betaDecayIm - k2 * betaWaveIm;
    pair.nearBend.re[index] = c1 * (bendIm * c - bendRe * s) + betaBendRe * fade - kappa2 * direct;
    pair.nearBend.im[index] = -c1 * (bendRe * c + bendIm * s) + betaBendIm * fade;
  }
  return pair;
}

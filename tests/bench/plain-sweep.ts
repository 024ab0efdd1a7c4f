import type { DamperHalf, SpanEnd, SpanWireCase } from '#shared/engine/index.ts';
import { absolute, exponential, over, plain, plainSolve, plus, times, type PlainComplex } from './plain-complex.ts';

/** Amplitudes and clamp strains of one frequency, by the plain path. */
export interface PlainRow {
  readonly frequencyHz: number;
  readonly endAmplitudeM: readonly [number, number];
  readonly clampStrainRatio: readonly [number, number];
}

interface Beam {
  readonly T: number;
  readonly m: number;
  readonly EI: number;
  readonly w: number;
  readonly k: number;
  readonly kappa: number;
}

function halfImpedance(half: DamperHalf, w: number): PlainComplex {
  const { massKg: M, inertiaKgM2: J, armLengthM: l, armStiffnessNm2: EI, offsetM: e, lossRatio } = half;
  const loss = plain(1, lossRatio);
  const stiffness = [(12 * EI) / l ** 3, (-6 * EI) / l ** 2, (4 * EI) / l].map((value) => times(plain(value), loss));
  const [k11, k12, k22] = stiffness as [PlainComplex, PlainComplex, PlainComplex];
  const off = plus(k12, plain(-w * w * M * e));
  const matrix = [
    [plus(k11, plain(-w * w * M)), off],
    [off, plus(k22, plain(-w * w * (J + M * e * e)))],
  ];
  const [q0, q1] = plainSolve(matrix, [k11, k12]) as [PlainComplex, PlainComplex];
  return over(times(plain(-w * w * M), plus(q0, times(plain(e), q1))), plain(0, w));
}

function damperImpedance(damper: SpanEnd['dampers'][number], w: number): PlainComplex {
  if (damper.model.kind !== 'halves') throw new Error('the plain path knows halves only');
  return damper.model.halves.reduce(
    (sum, half) => plus(sum, halfImpedance(half, w)),
    plain(0, w * damper.model.clampMassKg),
  );
}

/** Derivative of a wave e^{λ(x − from)} at x. */
function waveAt(lambda: PlainComplex, reach: number, order: number): PlainComplex {
  let value = exponential(times(lambda, plain(reach)));
  for (let n = 0; n < order; n += 1) value = times(value, lambda);
  return value;
}

/** |Γ| and clamp curvature per antinode from the dense system of all bays. */
function plainEnd(beam: Beam, end: SpanEnd): { gamma: number; curvature: number } {
  const dampers = [...end.dampers].sort((a, b) => a.distanceM - b.distanceM);
  if (dampers.length === 0) return { gamma: 1, curvature: beam.k * Math.hypot(beam.k, beam.kappa) };
  const edges = [0, ...dampers.map((damper) => damper.distanceM)];
  const lambdas = [plain(0, beam.k), plain(0, -beam.k), plain(-beam.kappa), plain(beam.kappa)];
  const size = 4 * dampers.length + 2;
  const matrix = Array.from({ length: size }, () => Array.from({ length: size }, () => plain(0)));
  const side = Array.from({ length: size }, () => plain(0));
  const part = (wave: number, bay: number, [x, order]: readonly [number, number]) => {
    const from = wave === 2 ? (edges[bay] ?? 0) : wave === 3 ? (edges[bay + 1] ?? 0) : 0;
    return waveAt(lambdas[wave] ?? plain(NaN), x - from, order);
  };
  const add = (row: number, column: number, value: PlainComplex) => {
    const line = matrix[row];
    if (line !== undefined) line[column] = plus(line[column] ?? plain(NaN), value);
  };
  for (let wave = 0; wave < 4; wave += 1) [0, 1].forEach((order) => add(order, wave, part(wave, 0, [0, order])));
  dampers.forEach((damper, index) => {
    const x = damper.distanceM;
    const load = times(plain(0, beam.w), damperImpedance(damper, beam.w));
    const isLast = index === dampers.length - 1;
    for (let order = 0; order < 4; order += 1) {
      const row = 2 + 4 * index + order;
      const scale = plain(order === 3 ? -beam.EI : 1);
      for (let wave = 0; wave < 4; wave += 1) {
        add(row, 4 * index + wave, times(times(plain(-1), scale), part(wave, index, [x, order])));
        if (order === 3) add(row, 4 * index + wave, times(times(plain(-1), load), part(wave, index, [x, 0])));
      }
      (isLast ? [1, 2] : [0, 1, 2, 3]).forEach((wave, place) =>
        add(row, 4 * (index + 1) + place, times(scale, part(wave, index + 1, [x, order]))),
      );
      if (isLast) side[row] = times(times(plain(-1), scale), part(0, index + 1, [x, order]));
    }
  });
  const solution = plainSolve(matrix, side);
  const gamma = Math.min(absolute(solution[4 * dampers.length] ?? plain(NaN)), 1);
  const bend = [0, 1, 2, 3].reduce(
    (sum, wave) => plus(sum, times(solution[wave] ?? plain(NaN), part(wave, 0, [0, 2]))),
    plain(0),
  );
  return { gamma, curvature: absolute(bend) / (1 + gamma) };
}

const sliceCount = 120;
const bisectionCount = 45;

/** B by halving; the length integral by Simpson's rule in v with u clustered at the larger ends, u = u_end(1 − v³). */
function plainBalance(
  net: (A: number) => number,
  at: { flux: number; ends: readonly number[]; lengthM: number; top: number },
) {
  const largest = Math.max(...at.ends.map((u) => Math.cosh(u)));
  const lengthOf = (B: number) =>
    at.ends.reduce((sum, uEnd) => {
      let side = 0;
      for (let slice = 0; slice <= sliceCount; slice += 1) {
        const v = slice / sliceCount;
        const u = uEnd * (1 - v ** 3);
        const weight = slice === 0 || slice === sliceCount ? 1 : slice % 2 === 1 ? 4 : 2;
        side += (weight * 3 * v * v * uEnd * at.flux * B * B * Math.cosh(2 * u)) / net(2 * B * Math.cosh(u));
      }
      return sum + side / (3 * sliceCount);
    }, 0);
  let lower = 0;
  let upper = at.top / (2 * largest);
  for (let step = 0; step < bisectionCount; step += 1) {
    const middle = (lower + upper) / 2;
    if (lengthOf(middle) < at.lengthM) lower = middle;
    else upper = middle;
  }
  return lower;
}

/** Wind power less self-damping, written out with the default methods' constants. */
function netPower(input: SpanWireCase, f: number): (A: number) => number {
  const { diameterM: D, massKgPerM: m } = input.wire;
  const cubic = (x: number) => -99.73 * x ** 3 + 101.62 * x ** 2 + 0.1627 * x + 0.2256;
  const slope = (0.1 * (-299.19 * 0.01 + 203.24 * 0.1 + 0.1627)) / cubic(0.1);
  const reduction = 1 / Math.sqrt(1 + (input.air.turbulenceIntensityRatio / 0.09) ** 2);
  const speed = Math.sqrt(input.span.tensionN / m);
  return (A) => {
    const x = A / D;
    const fnc = x >= 0.1 ? cubic(x) : cubic(0.1) * (x / 0.1) ** slope;
    const zeta = 6.5e-4 * (x / 0.1) ** 0.44 * ((f * D) / 0.6) ** 2.63 * (speed / 130) ** -5.52;
    const wind = (input.air.densityKgPerM3 / 1.225) * f ** 3 * D ** 4 * fnc * reduction;
    return wind - 0.5 * m * (2 * Math.PI * f) ** 3 * A * A * zeta;
  };
}

function topAmplitude(net: (A: number) => number, limitM: number): number {
  if (net(limitM) > 0) return limitM;
  let lower = 1e-9 * limitM;
  let upper = limitM;
  for (let step = 0; step < bisectionCount * 2; step += 1) {
    const middle = Math.sqrt(lower * upper);
    if (net(middle) > 0) lower = middle;
    else upper = middle;
  }
  return lower;
}

/**
 * The sweep done the plain way: an object per number, a dense system per end and frequency, quadrature by Simpson's
 * rule and roots by halving. For spans with dampers at both ends that take something at every frequency.
 */
export function plainSweep(input: SpanWireCase, frequenciesHz: readonly number[]): PlainRow[] {
  const { massKgPerM: m, bendingStiffnessMinNm2: EI, outerStrandDiameterM, diameterM } = input.wire;
  const T = input.span.tensionN;
  return frequenciesHz.map((f) => {
    const w = 2 * Math.PI * f;
    const R = Math.sqrt(T * T + 4 * EI * m * w * w);
    const k = w * Math.sqrt((2 * m) / (T + R));
    const beam = { T, m, EI, w, k, kappa: Math.sqrt((T + R) / (2 * EI)) };
    const ends = input.ends.map((end) => plainEnd(beam, end));
    const us = ends.map(({ gamma }) => -0.5 * Math.log(gamma));
    const flux = (2 * (T * k + 2 * EI * k ** 3) * w * w) / w;
    const net = netPower(input, f);
    const top = topAmplitude(net, 0.5 * diameterM);
    const B = plainBalance(net, { flux, ends: us, lengthM: input.span.lengthM, top });
    const amplitudes = us.map((u) => 2 * B * Math.cosh(u)) as [number, number];
    const strain = (end: 0 | 1) => (outerStrandDiameterM / 2) * (ends[end]?.curvature ?? NaN) * amplitudes[end];
    return { frequencyHz: f, endAmplitudeM: amplitudes, clampStrainRatio: [strain(0), strain(1)] };
  });
}

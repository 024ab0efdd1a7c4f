import { complex, lusolve, matrix, type Complex } from 'mathjs';
import { describe, expect, it } from 'vitest';
import { damperCommand, endCommand, spanCommand, spanWireProfile } from '#shared/engine/index.ts';
import { aBasis, aSpanWire, endWith, referenceDamper, referenceTensionN, referenceWire } from './engine-cases.ts';
import { rootOf } from './root-of.ts';

const { massKgPerM: m, diameterM: D } = referenceWire;
const T = referenceTensionN;

interface Beam {
  readonly EI: number;
  readonly f: number;
  readonly distancesM: readonly number[];
}

const c = (re: number, im = 0) => complex(re, im);
const times = (a: Complex, b: Complex) => c(a.re * b.re - a.im * b.im, a.re * b.im + a.im * b.re);

function numbersOf({ EI, f }: Beam) {
  const w = 2 * Math.PI * f;
  const R = Math.sqrt(T * T + 4 * EI * m * w * w);
  return { w, k: Math.sqrt((R - T) / (2 * EI)), kappa: Math.sqrt((R + T) / (2 * EI)) };
}

/**
 * Dense system of the end: in each bay between clamp and dampers four waves, scaled so that none exceeds 1, beyond the
 * last damper one outgoing and one decaying wave. Written from the equation of motion, not from the engine.
 */
function denseEnd(beam: Beam) {
  const { EI, f, distancesM } = beam;
  const { w, k, kappa } = numbersOf(beam);
  const lambdas = [c(0, k), c(0, -k), c(-kappa), c(kappa)] as const;
  const edges = [0, ...distancesM];
  const bayCount = distancesM.length;
  const sizeCount = 4 * bayCount + 2;
  const rows = Array.from({ length: sizeCount }, () => Array.from({ length: sizeCount }, () => c(0)));
  const side = Array.from({ length: sizeCount }, () => c(0));
  const wave = (index: number, bay: number) => ({
    lambda: lambdas[index] ?? c(0),
    from: edges[index === 3 ? bay + 1 : bay] ?? 0,
  });
  const derivative = (index: number, { bay, x, order }: { bay: number; x: number; order: number }) => {
    const { lambda, from } = wave(index, bay);
    const reach = x - (index === 2 || index === 3 ? from : 0);
    let value = times(c(Math.exp(lambda.re * reach)), c(Math.cos(lambda.im * reach), Math.sin(lambda.im * reach)));
    for (let n = 0; n < order; n += 1) value = times(value, lambda);
    return value;
  };
  const add = (row: number, column: number, value: Complex) => {
    const line = rows[row];
    const here = line?.[column];
    if (line === undefined || here === undefined) throw new Error('outside the matrix');
    line[column] = c(here.re + value.re, here.im + value.im);
  };
  [0, 1].forEach((order) => {
    for (let index = 0; index < 4; index += 1) add(order, index, derivative(index, { bay: 0, x: 0, order }));
  });
  const outer = [1, 2] as const;
  distancesM.forEach((x, damper) => {
    const Z = damperCommand({ model: referenceDamper, frequenciesHz: [f] }).rows[0]?.impedance ?? { re: NaN, im: NaN };
    const load = times(c(0, w), c(Z.re, Z.im));
    const isLast = damper === bayCount - 1;
    for (let order = 0; order < 4; order += 1) {
      const row = 2 + 4 * damper + order;
      const scale = order === 3 ? -EI : 1;
      for (let index = 0; index < 4; index += 1) {
        const value = derivative(index, { bay: damper, x, order });
        add(row, 4 * damper + index, c(-scale * value.re, -scale * value.im));
        if (order === 3) {
          const force = times(load, derivative(index, { bay: damper, x, order: 0 }));
          add(row, 4 * damper + index, c(-force.re, -force.im));
        }
      }
      (isLast ? outer : ([0, 1, 2, 3] as const)).forEach((index, place) => {
        const value = derivative(index, { bay: damper + 1, x, order });
        add(row, 4 * (damper + 1) + place, c(scale * value.re, scale * value.im));
      });
      if (isLast) {
        const value = derivative(0, { bay: damper + 1, x, order });
        side[row] = c(-scale * value.re, -scale * value.im);
      }
    }
  });
  const solution = lusolve(matrix(rows), matrix(side));
  const at = (index: number): Complex => complex(String(solution.get([index, 0])));
  const gamma = at(4 * bayCount);
  const antinode = 1 + Math.hypot(gamma.re, gamma.im);
  const bend = (bay: number, x: number) => {
    let sum = c(0);
    for (let index = 0; index < 4; index += 1) {
      const part = times(at(4 * bay + index), derivative(index, { bay, x, order: 2 }));
      sum = c(sum.re + part.re, sum.im + part.im);
    }
    return Math.hypot(sum.re, sum.im) / antinode;
  };
  return { gamma, clampCurvature: bend(0, 0), damperCurvatures: distancesM.map((x, damper) => bend(damper, x)) };
}

describe('the end solver against a dense solve', () => {
  it.each([
    { EI: 44.06, f: 30, distancesM: [1] },
    { EI: 44.06, f: 8, distancesM: [0.9, 2.4] },
    { EI: 400, f: 46, distancesM: [0.4, 0.9, 1.7] },
    { EI: 1900, f: 90, distancesM: [0.3, 0.8] },
    { EI: 44.06, f: 60, distancesM: [1.2, 14] },
  ])('EI $EI at $f Hz with dampers at $distancesM', (beam) => {
    const dense = denseEnd(beam);
    const row = endCommand({
      wire: { massKgPerM: m, bendingStiffnessMinNm2: beam.EI },
      tensionN: T,
      end: endWith(...beam.distancesM),
      frequenciesHz: [beam.f],
    }).rows[0];
    // Rounding of a dense solve with condition about 1e5.
    expect(Math.abs((row?.reflection?.re ?? NaN) - dense.gamma.re)).toBeLessThan(1e-9);
    expect(Math.abs((row?.reflection?.im ?? NaN) - dense.gamma.im)).toBeLessThan(1e-9);
    expect((row?.clampCurvaturePerM2 ?? NaN) / dense.clampCurvature).toBeCloseTo(1, 8);
    dense.damperCurvatures.forEach((curvature, damper) => {
      expect((row?.damperCurvaturePerM2[damper] ?? NaN) / curvature).toBeCloseTo(1, 8);
    });
  });
});

/** Net power per metre, written out anew from the published forms and constants. */
function netPower(A: number, f: number, turbulence: number): number {
  const x = A / D;
  const cubic = (at: number) => -99.73 * at ** 3 + 101.62 * at ** 2 + 0.1627 * at + 0.2256;
  const slope = (0.1 * (-299.19 * 0.01 + 203.24 * 0.1 + 0.1627)) / cubic(0.1);
  const fnc = x >= 0.1 ? cubic(x) : cubic(0.1) * (x / 0.1) ** slope;
  const wind = (f ** 3 * D ** 4 * fnc) / Math.sqrt(1 + (turbulence / 0.09) ** 2);
  const w = 2 * Math.PI * f;
  const zeta = 6.5e-4 * (x / 0.1) ** 0.44 * ((f * D) / 0.6) ** 2.63 * (Math.sqrt(T / m) / 130) ** -5.52;
  return wind - 0.5 * m * w ** 3 * A ** 2 * zeta;
}

/** Integrates du/dx = p(2B·cosh u)/(2Zω²B²·cosh 2u) with fourth-order Runge–Kutta from the left end. */
function integrate(at: { f: number; B: number; uL: number; L: number; Z: number; steps: number }): number[] {
  const { f, B, uL, L, Z, steps } = at;
  const w = 2 * Math.PI * f;
  const rate = (u: number) => netPower(2 * B * Math.cosh(u), f, 0.18) / (2 * Z * w * w * B * B * Math.cosh(2 * u));
  const h = L / steps;
  const us = [uL];
  for (let step = 0; step < steps; step += 1) {
    const u = us[step] ?? NaN;
    const k1 = rate(u);
    const k2 = rate(u + (h / 2) * k1);
    const k3 = rate(u + (h / 2) * k2);
    const k4 = rate(u + h * k3);
    us.push(u + (h / 6) * (k1 + 2 * k2 + 2 * k3 + k4));
  }
  return us;
}

describe('the span balance against integration of its equation along the wire', () => {
  it.each([
    { f: 10, left: [1], right: [], L: 350 },
    { f: 25, left: [1, 2.2], right: [1.1], L: 350 },
    { f: 40, left: [0.8], right: [1.2], L: 120 },
    { f: 7, left: [], right: [0.35], L: 700 },
  ])('$f Hz, dampers $left and $right, $L m', ({ f, left, right, L }) => {
    const ends: [ReturnType<typeof endWith>, ReturnType<typeof endWith>] = [endWith(...left), endWith(...right)];
    const input = aSpanWire({ ends, span: { lengthM: L, tensionN: T, bearingRad: 0 } });
    const row = spanCommand({ ...input, span: { lengthM: L, tensionN: T }, frequenciesHz: [f] }).rows[0];
    if (row === undefined || row.outcome !== 'steady') throw new Error(`the row is ${row?.outcome}`);
    const [gammaL, gammaR] = row.endReflectionRatio.map((ratio) => ratio ?? NaN) as [number, number];
    const uL = 0.5 * Math.log(gammaL);
    const uR = -0.5 * Math.log(gammaR);
    const { k } = numbersOf({ EI: 44.06, f, distancesM: [] });
    const Z = (T * k + 2 * 44.06 * k ** 3) / (2 * Math.PI * f);
    const steps = 4000;
    const Btop = (row.endAmplitudeM[0] ?? NaN) / (2 * Math.cosh(uL));
    const B = rootOf((at) => (integrate({ f, B: at, uL, L, Z, steps }).at(-1) ?? NaN) - uR, {
      lower: 0.8 * Btop,
      upper: 1.2 * Btop,
    });
    // RK4 with 4000 steps is good to 1e-9; the engine states 1e-9.
    expect((row.endAmplitudeM[0] ?? NaN) / (2 * B * Math.cosh(uL))).toBeCloseTo(1, 7);
    expect((row.endAmplitudeM[1] ?? NaN) / (2 * B * Math.cosh(uR))).toBeCloseTo(1, 7);
    const us = integrate({ f, B, uL, L, Z, steps });
    expect((row.midAmplitudeM ?? NaN) / (2 * B * Math.cosh(us[steps / 2] ?? NaN))).toBeCloseTo(1, 7);
    const profile = spanWireProfile(input, aBasis(), { frequencyHz: f, pointCount: 5 });
    profile.amplitudesM.forEach((amplitudeM, index) => {
      const u = us[(index * steps) / 4] ?? NaN;
      expect(amplitudeM / (2 * B * Math.cosh(u))).toBeCloseTo(1, 7);
      const flux = Z * (2 * Math.PI * f * B) ** 2 * Math.sinh(2 * u);
      expect((profile.fluxesW[index] ?? NaN) - flux).toBeCloseTo(0, 9);
    });
  });
});

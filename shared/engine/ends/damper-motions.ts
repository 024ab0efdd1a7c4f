import { complexSystem, solveComplex } from '../numerics/solve-complex.ts';
import type { SeriesPool } from '../numerics/series-pool.ts';
import { complexSeries, type ComplexSeries, type PairCompliance } from './clamped-wire.ts';

/** Dampers on a clamped wire: jωZ of each, y₀ at each, and G between each two (row ≥ column), all [n] over frequency. */
export interface DamperNetwork {
  readonly drives: readonly ComplexSeries[];
  readonly undisturbed: readonly ComplexSeries[];
  /** `pairs[far][near]` with near ≤ far. */
  readonly pairs: readonly (readonly PairCompliance[])[];
  readonly pool: SeriesPool;
}

const at = (values: Float64Array, index: number): number => values[index] as number; // index is always inside

/** y = y₀/(1 + G·jωZ). */
function motionOfOne(network: DamperNetwork, [own]: readonly PairCompliance[]): ComplexSeries {
  const [drive, undisturbed] = [network.drives[0], network.undisturbed[0]];
  if (own === undefined || drive === undefined || undisturbed === undefined)
    throw new RangeError('there is one damper');
  const G = own.motion;
  const y = complexSeries(network.pool);
  for (let index = 0; index < drive.re.length; index += 1) {
    const gr = at(G.re, index);
    const gi = at(G.im, index);
    const zr = at(drive.re, index);
    const zi = at(drive.im, index);
    const mr = 1 + gr * zr - gi * zi;
    const mi = gr * zi + gi * zr;
    const scale = 1 / (mr * mr + mi * mi);
    const yr = at(undisturbed.re, index);
    const yi = at(undisturbed.im, index);
    y.re[index] = (yr * mr + yi * mi) * scale;
    y.im[index] = (yi * mr - yr * mi) * scale;
  }
  return y;
}

/** The same for two dampers by Cramer's rule: (I + G·diag(jωZ))·y = y₀. */
function motionsOfTwo(network: DamperNetwork): ComplexSeries[] {
  const [driveA, driveB] = network.drives as readonly [ComplexSeries, ComplexSeries];
  const [startA, startB] = network.undisturbed as readonly [ComplexSeries, ComplexSeries];
  const [[aa], [ab, bb]] = network.pairs as readonly [
    readonly [PairCompliance],
    readonly [PairCompliance, PairCompliance],
  ];
  const count = driveA.re.length;
  const first = complexSeries(network.pool);
  const second = complexSeries(network.pool);
  for (let index = 0; index < count; index += 1) {
    const ar = at(driveA.re, index);
    const ai = at(driveA.im, index);
    const br = at(driveB.re, index);
    const bi = at(driveB.im, index);
    const gr = at(ab.motion.re, index);
    const gi = at(ab.motion.im, index);
    const aaRe = at(aa.motion.re, index);
    const aaIm = at(aa.motion.im, index);
    const bbRe = at(bb.motion.re, index);
    const bbIm = at(bb.motion.im, index);
    const m11Re = 1 + aaRe * ar - aaIm * ai;
    const m11Im = aaRe * ai + aaIm * ar;
    const m22Re = 1 + bbRe * br - bbIm * bi;
    const m22Im = bbRe * bi + bbIm * br;
    const m12Re = gr * br - gi * bi;
    const m12Im = gr * bi + gi * br;
    const m21Re = gr * ar - gi * ai;
    const m21Im = gr * ai + gi * ar;
    const detRe = m11Re * m22Re - m11Im * m22Im - (m12Re * m21Re - m12Im * m21Im);
    const detIm = m11Re * m22Im + m11Im * m22Re - (m12Re * m21Im + m12Im * m21Re);
    const scale = 1 / (detRe * detRe + detIm * detIm);
    const y1r = at(startA.re, index);
    const y1i = at(startA.im, index);
    const y2r = at(startB.re, index);
    const y2i = at(startB.im, index);
    const n1Re = m22Re * y1r - m22Im * y1i - (m12Re * y2r - m12Im * y2i);
    const n1Im = m22Re * y1i + m22Im * y1r - (m12Re * y2i + m12Im * y2r);
    const n2Re = m11Re * y2r - m11Im * y2i - (m21Re * y1r - m21Im * y1i);
    const n2Im = m11Re * y2i + m11Im * y2r - (m21Re * y1i + m21Im * y1r);
    first.re[index] = (n1Re * detRe + n1Im * detIm) * scale;
    first.im[index] = (n1Im * detRe - n1Re * detIm) * scale;
    second.re[index] = (n2Re * detRe + n2Im * detIm) * scale;
    second.im[index] = (n2Im * detRe - n2Re * detIm) * scale;
  }
  return [first, second];
}

/** Any number of dampers by elimination, one frequency after the other. */
function motionsOfMany({ drives, undisturbed, pairs, pool }: DamperNetwork): ComplexSeries[] {
  const size = drives.length;
  const count = drives[0]?.re.length ?? 0;
  const motions = drives.map(() => complexSeries(pool));
  const system = complexSystem(size);
  const { matrixRe, matrixIm, sideRe, sideIm } = system;
  for (let index = 0; index < count; index += 1) {
    drives.forEach((drive, column) => {
      const zr = at(drive.re, index);
      const zi = at(drive.im, index);
      for (let row = 0; row < size; row += 1) {
        const G = pairs[Math.max(row, column)]?.[Math.min(row, column)]?.motion;
        const gr = G?.re[index] ?? NaN;
        const gi = G?.im[index] ?? NaN;
        matrixRe[row * size + column] = gr * zr - gi * zi + (row === column ? 1 : 0);
        matrixIm[row * size + column] = gr * zi + gi * zr;
      }
      sideRe[column] = undisturbed[column]?.re[index] ?? NaN;
      sideIm[column] = undisturbed[column]?.im[index] ?? NaN;
    });
    solveComplex(system);
    motions.forEach((motion, damper) => {
      motion.re[index] = at(sideRe, damper);
      motion.im[index] = at(sideIm, damper);
    });
  }
  return motions;
}

/**
 * Motion of each damper clamp under a unit incoming wave.
 *
 * @param network dampers on a clamped wire
 * @returns complex motions, one series [n] per damper; not a number where a damper has no data
 * @source closed form: (I + G·diag(jωZ))·y = y₀
 * @validity passive dampers
 * @accuracy rounding
 */
export function damperMotions(network: DamperNetwork): ComplexSeries[] {
  if (network.drives.length === 2) return motionsOfTwo(network);
  if (network.drives.length === 1) return [motionOfOne(network, network.pairs[0] ?? [])];
  return motionsOfMany(network);
}

import type { ImpedanceSeries } from '../ends/clamp-response.ts';
import type { DamperHalf, HalvesDamperModel } from './damper-model.ts';

/** Stiffnesses of the messenger at its tip, for displacement and rotation, without loss. */
export interface TipStiffness {
  readonly displacementNPerM: number;
  readonly couplingN: number;
  readonly rotationNm: number;
}

/**
 * Stiffness of a half-damper's messenger at its tip, the inverse of [[l³/3EI, l²/2EI], [l²/2EI, l/EI]].
 *
 * @param half.armLengthM       l, scalar [m], > 0
 * @param half.armStiffnessNm2  EI of the messenger, scalar [N·m²], > 0
 * @returns 12EI/l³, −6EI/l², 4EI/l
 * @source closed form: massless cantilever
 * @validity messenger mass small against the weight
 * @accuracy exact
 */
export function tipStiffness(half: Pick<DamperHalf, 'armLengthM' | 'armStiffnessNm2'>): TipStiffness {
  const { armLengthM: l, armStiffnessNm2: EI } = half;
  return { displacementNPerM: (12 * EI) / l ** 3, couplingN: (-6 * EI) / l ** 2, rotationNm: (4 * EI) / l };
}

/** Adds the impedance of one half to a series; (K − ω²𝐌)q = K·[1, 0]ᵀ, Z = −ω²M(q₀ + e·q₁)/(jω). */
function addHalf(half: DamperHalf, angularFrequenciesRadPerS: Float64Array, sum: ImpedanceSeries): void {
  const { massKg: M, inertiaKgM2: J, offsetM: e, lossRatio: eta } = half;
  const stiffness = tipStiffness(half);
  const { displacementNPerM: k11, couplingN: k12, rotationNm: k22 } = stiffness;
  const inertia22 = J + M * e * e;
  for (let index = 0; index < angularFrequenciesRadPerS.length; index += 1) {
    const w = angularFrequenciesRadPerS[index] as number;
    const w2 = w * w;
    const ar = k11 - w2 * M;
    const ai = k11 * eta;
    const br = k12 - w2 * M * e;
    const bi = k12 * eta;
    const dr = k22 - w2 * inertia22;
    const di = k22 * eta;
    // determinant and the two cofactor products of the 2×2 complex solve
    const detRe = ar * dr - ai * di - (br * br - bi * bi);
    const detIm = ar * di + ai * dr - 2 * br * bi;
    // right side K·[1, 0]ᵀ = (1 + jη)(k11, k12)
    const q0Re = dr * k11 - di * ai - (br * k12 - bi * bi);
    const q0Im = dr * ai + di * k11 - (br * bi + bi * k12);
    const q1Re = ar * k12 - ai * bi - (br * k11 - bi * ai);
    const q1Im = ar * bi + ai * k12 - (br * ai + bi * k11);
    const sRe = q0Re + e * q1Re;
    const sIm = q0Im + e * q1Im;
    const scale = (w * M) / (detRe * detRe + detIm * detIm);
    // −ω²M·s/(jω·det) = jωM·s/det
    const ratioRe = sRe * detRe + sIm * detIm;
    const ratioIm = sIm * detRe - sRe * detIm;
    sum.re[index] = (sum.re[index] as number) - scale * ratioIm;
    sum.im[index] = (sum.im[index] as number) + scale * ratioRe;
  }
}

/**
 * Driving-point impedance of a damper made of a clamp and one or two halves.
 *
 * @param model clamp mass ≥ 0 [kg] and halves, each with mass, inertia, messenger and loss
 * @param angularFrequenciesRadPerS ω, [n] [rad/s], each > 0
 * @returns real and imaginary parts [n] [N·s/m]
 * @source closed form: two freedoms per half, hysteretic loss in the messenger
 * @validity amplitude at which stiffness and loss were measured; a messenger's loss falls as its amplitude grows
 * @accuracy rounding
 */
export function halfDamperImpedance(
  model: HalvesDamperModel,
  angularFrequenciesRadPerS: Float64Array,
): ImpedanceSeries {
  const sum = {
    re: new Float64Array(angularFrequenciesRadPerS.length),
    im: Float64Array.from(angularFrequenciesRadPerS, (w) => w * model.clampMassKg),
  };
  for (const half of model.halves) addHalf(half, angularFrequenciesRadPerS, sum);
  return sum;
}

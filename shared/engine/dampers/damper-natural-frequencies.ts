import type { DamperHalf } from './damper-model.ts';
import { tipStiffness } from './half-damper-impedance.ts';

/**
 * The two natural frequencies of a half-damper with its clamp held still and no loss.
 *
 * @param half weight, messenger and offset, see DamperHalf
 * @returns lower and upper frequency [2] [Hz]; the upper one is absent for a weight without inertia about the tip
 * @source closed form: det(K − ω²𝐌) = 0, a quadratic in ω²
 * @validity massless messenger, small loss
 * @accuracy rounding; the lower root comes from the product of both, which does not cancel
 */
export function damperNaturalFrequencies(half: DamperHalf): number[] {
  const { massKg: M, inertiaKgM2: J, offsetM: e } = half;
  const { displacementNPerM: k11, couplingN: k12, rotationNm: k22 } = tipStiffness(half);
  const a = M * J;
  const b = k11 * (J + M * e * e) + k22 * M - 2 * k12 * M * e;
  const c = k11 * k22 - k12 * k12;
  const root = Math.sqrt(Math.max(b * b - 4 * a * c, 0));
  const lower = (2 * c) / (b + root);
  const squares = a > 0 ? [lower, (b + root) / (2 * a)] : [lower];
  return squares.map((square) => Math.sqrt(square) / (2 * Math.PI));
}

import { spanDensity, spanSums, type SpanSums } from './span-integral.ts';
import type { BalanceSolver } from './span-balance.ts';

/** Where the wire of a solved span lies: plateau, left side, right side, plateau. */
export interface SpanLayout {
  leftPlateauM: number;
  leftM: number;
  rightM: number;
  rightPlateauM: number;
}

/** A place along a solved span: the side of u = 0 it lies on and z = √2·sinh(|u|/2) there. */
export interface SpanPlace {
  sideIndex: 0 | 1;
  z: number;
}

const stepLimitCount = 60;
const lastStepRatio = 1e-7;

/** Energies and lengths of a solved, steady span. */
export interface SpanEnergy {
  windW: number;
  selfDampingW: number;
  leftW: number;
  rightW: number;
  closureRatio: number;
  layout: SpanLayout;
}

function endPower({ state, solution }: BalanceSolver, side: 0 | 1): number {
  const { top, maxSquare, fluxScaleW, endZ } = state;
  const z = endZ[side] as number;
  const baseRatio = top.xRatio / ((1 + maxSquare) * (1 + solution.excessRatio));
  return fluxScaleW * baseRatio * baseRatio * z * Math.sqrt(2 + z * z) * (1 + z * z);
}

/** The part of the span at the top amplitude lies at the end or ends with the larger |u|. */
function plateaus({ state, solution }: BalanceSolver): { left: number; right: number } {
  const left = state.endZ[0] as number;
  const right = state.endZ[1] as number;
  const length = solution.plateauLengthM;
  if (left === right) return { left: length / 2, right: length / 2 };
  return left > right ? { left: length, right: 0 } : { left: 0, right: length };
}

/**
 * Powers of a solved, steady span: wind in, self-damping, flux into each end, and how well they close.
 *
 * @param solver with a steady solution
 * @returns powers [W] and lengths [m]; closure |W − S − P_L − P_R|/W with W and S each integrated on its own
 * @source closed form: power densities integrated along the wire; flux at an end Zω²B²·sinh 2|u|
 * @validity steady solutions
 * @accuracy closure about 1e-12
 */
export function spanEnergy(solver: BalanceSolver): SpanEnergy {
  const { state, solution } = solver;
  const sides: [SpanSums, SpanSums] = [
    { lengthM: 0, windW: 0, dampingW: 0 },
    { lengthM: 0, windW: 0, dampingW: 0 },
  ];
  sides.forEach((sums, side) => {
    const limitZ = state.endZ[side] as number;
    if (limitZ > 0) spanSums(state, solution.excessRatio, { limitZ, sums });
  });
  const plateau = plateaus(solver);
  const extra = solution.plateauLengthM * state.top.windWPerM;
  const windW = sides[0].windW + sides[1].windW + extra;
  const selfDampingW = sides[0].dampingW + sides[1].dampingW + extra;
  const leftW = endPower(solver, 0);
  const rightW = endPower(solver, 1);
  return {
    windW,
    selfDampingW,
    leftW,
    rightW,
    closureRatio: Math.abs(windW - selfDampingW - leftW - rightW) / windW,
    layout: {
      leftPlateauM: plateau.left,
      leftM: sides[0].lengthM,
      rightM: sides[1].lengthM,
      rightPlateauM: plateau.right,
    },
  };
}

/** z at which one side holds a given length of wire, by Newton's iteration held in its bracket. */
function zAtLength(solver: BalanceSolver, side: 0 | 1, at: { lengthM: number; sideM: number }): number {
  const { state, solution, sums } = solver;
  let lower = 0;
  let upper = state.endZ[side] as number;
  let z = upper * Math.min(at.lengthM / at.sideM, 1);
  for (let step = 0; step < stepLimitCount; step += 1) {
    spanSums(state, solution.excessRatio, { limitZ: z, sums });
    const error = sums.lengthM - at.lengthM;
    if (error < 0) lower = z;
    else upper = z;
    let next = z - error / spanDensity(state, solution.excessRatio, z);
    const isInside = next > lower && next < upper;
    // Newton's step squares the error, so this one lands within 1e-12.
    if (Math.abs(error) <= lastStepRatio * at.sideM && (isInside || error === 0)) return next;
    if (!isInside) next = (lower + upper) / 2;
    if (next === z) return z;
    z = next;
  }
  return z;
}

/**
 * Finds a place along a solved, steady span.
 *
 * @param solver    with a steady solution
 * @param layout    from `spanEnergy`
 * @param positionM distance from the left end, scalar [m], 0 to the span's length
 * @returns side and z
 * @source closed form: the length integral inverted
 * @validity steady solutions
 * @accuracy 1e-12 of the side's length
 */
export function spanPlace(solver: BalanceSolver, layout: SpanLayout, positionM: number): SpanPlace {
  const fromLowestM = positionM - layout.leftPlateauM - layout.leftM;
  const sideIndex = fromLowestM < 0 ? 0 : 1;
  const sideM = sideIndex === 0 ? layout.leftM : layout.rightM;
  const lengthM = Math.abs(fromLowestM);
  const end = solver.state.endZ[sideIndex] as number;
  if (lengthM >= sideM || end === 0) return { sideIndex, z: end };
  return { sideIndex, z: lengthM === 0 ? 0 : zAtLength(solver, sideIndex, { lengthM, sideM }) };
}

/** Antinode amplitude over diameter at a place. */
export function amplitudeRatioAt({ state, solution }: BalanceSolver, place: SpanPlace): number {
  return (state.top.xRatio * (1 + place.z * place.z)) / ((1 + state.maxSquare) * (1 + solution.excessRatio));
}

/** Net flux towards the right end at a place [W]. */
export function fluxAt({ state, solution }: BalanceSolver, place: SpanPlace): number {
  const z2 = place.z * place.z;
  const baseRatio = state.top.xRatio / ((1 + state.maxSquare) * (1 + solution.excessRatio));
  const size = state.fluxScaleW * baseRatio * baseRatio * place.z * Math.sqrt(2 + z2) * (1 + z2);
  return place.sideIndex === 0 && size > 0 ? -size : size;
}

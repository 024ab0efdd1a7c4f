import { gaussLegendre, type QuadratureRule } from '../numerics/gauss-legendre.ts';
import { windPiece, windPieceIndex, windPieceValue, type WindPowerPiece } from '../wind/wind-power-curve.ts';
import type { SpanState } from './span-state.ts';

/** Six nodes keep the integrals to 1e-9 on any panel of `nextEdge`; a short first panel needs fewer, see the tests. */
const fullRule = gaussLegendre(6);
const shortRules = [
  { limitZ: 0.25, rule: gaussLegendre(4) },
  { limitZ: 0.45, rule: gaussLegendre(5) },
] as const;

/** Largest number of nodes on one panel. */
export const panelNodeLimitCount = fullRule.nodes.length;

/** Rule for a panel: the nearest singularities, z = ±j, are the further away the shorter a panel from 0 is. */
export function panelRule(from: number, to: number): QuadratureRule {
  if (from > 0 || to > shortRules[1].limitZ) return fullRule;
  return to > shortRules[0].limitZ ? shortRules[1].rule : shortRules[0].rule;
}

/** First panel edge and growth of the panels in z; the integrand's nearest singularities are z = ±j. */
export const firstPanelZ = 0.7;
export const panelGrowthRatio = 2;

/** A pole that lies further out than this needs no subtraction. */
const farPoleRatio = 0.5;

/** Length of wire, wind power and self-damping power between u = 0 and a place on one side. */
export interface SpanSums {
  lengthM: number;
  windW: number;
  dampingW: number;
}

/** The nearest zero of the net power, subtracted from the integrands and added in closed form. */
interface Pole {
  /** z_p² − z²_max. */
  gap: number;
  strengthM: number;
}

/** Net, wind and damping power per metre at one node. */
interface NodePower {
  netWPerM: number;
  windWPerM: number;
  dampingWPerM: number;
}

/** Beyond this the factor below is nothing, and the pole's strength would overflow. */
const vanishedPoleRatio = 1e6;

/** Takes a pole out of the subtraction, smoothly, when it lies far beyond the end: then it needs none. */
export function nearPole(gapRatio: number): number {
  if (gapRatio > vanishedPoleRatio) return 0;
  const square = gapRatio * gapRatio;
  return 1 / (1 + square * square);
}

/** 2(2c² − 1)/√(1 + c) at the pole's c = cosh u, held where it can no longer matter. */
export function poleShape(c: number): number {
  const held = Math.min(c, vanishedPoleRatio ** 2);
  return (2 * (2 * held * held - 1)) / Math.sqrt(1 + held);
}

/**
 * 1/p has a pole where the net power falls through zero, at the top amplitude or (with no root below the limit) just
 * beyond it. Near it 2Zω²B²·cosh 2u·du/p = strength/(z_p² − z²)·dz.
 */
function findPole({ top, fluxScaleW, maxSquare }: SpanState, excessRatio: number): Pole {
  const beyondRatio = top.netWPerM / top.fallWPerM;
  const cm = 1 + maxSquare;
  const gap = cm * (excessRatio + beyondRatio + excessRatio * beyondRatio);
  if (!(top.fallWPerM > 0) || beyondRatio > farPoleRatio) return { gap: cm, strengthM: 0 };
  const cp = cm + gap;
  const baseRatio = top.xRatio / (cm * (1 + excessRatio));
  const shape = poleShape(cp) * nearPole(gap / cm);
  return { gap, strengthM: (fluxScaleW * baseRatio * top.xRatio * shape) / top.fallWPerM };
}

/** Powers at x = top·e^−y. Near the top all come from the change since the top, so that their difference keeps its digits. */
function setNodePower(
  state: SpanState,
  piece: WindPowerPiece,
  at: { y: number; isTop: boolean; out: NodePower },
): void {
  const { top, power } = state;
  const { y, out } = at;
  const l = power.dampingExponentNumber;
  const fallen = Math.exp(-l * y);
  out.dampingWPerM = (top.windWPerM - top.netWPerM) * fallen;
  if (!at.isTop) {
    out.windWPerM = power.windScaleWPerM * windPieceValue(piece, top.xRatio * Math.exp(-y));
    out.netWPerM = out.windWPerM - out.dampingWPerM;
    return;
  }
  if (piece.kind === 'power') {
    const a = piece.exponentNumber;
    out.windWPerM = top.windWPerM * Math.exp(-a * y);
    out.netWPerM = -out.windWPerM * Math.expm1(-(l - a) * y) + top.netWPerM * fallen;
    return;
  }
  const xt = top.xRatio;
  const change = xt * Math.expm1(-y);
  const x = xt + change;
  const [, c1, c2, c3] = piece.coefs;
  const rise = power.windScaleWPerM * change * (c1 + c2 * (x + xt) + c3 * (x * x + x * xt + xt * xt));
  out.windWPerM = top.windWPerM + rise;
  out.netWPerM = rise - top.windWPerM * Math.expm1(-l * y) + top.netWPerM * fallen;
}

/** End of the panel that starts at z: growth, the limit, or the next joint of the wind curve. */
function nextEdge(state: SpanState, from: number, range: { limitZ: number; baseRatio: number }): number {
  let edge = Math.min(range.limitZ, Math.max(firstPanelZ, panelGrowthRatio * from));
  const { curve } = state.power;
  for (let index = 0; index < curve.length - 1; index += 1) {
    const square = windPiece(curve, index).upperRatio / range.baseRatio - 1;
    if (square <= 0) continue;
    const joint = Math.sqrt(square);
    if (joint > from * (1 + 1e-12) && joint < edge) edge = joint;
  }
  return edge;
}

/**
 * Adds up wire length, wind power and self-damping power from u = 0 to a place on one side.
 *
 * @param state       span at one frequency
 * @param excessRatio B_top/B − 1, scalar [ratio], ≥ 0
 * @param range.limitZ place, z = √2·sinh(|u|/2), scalar, ≥ 0, at most the z of that end
 * @param range.sums   overwritten
 * @source closed form: dx = 2Zω²B²·cosh 2u/p·du; Gauss–Legendre panels with the pole of 1/p taken out analytically
 * @validity net power positive below the top amplitude
 * @accuracy about 1e-9 relative
 */
export function spanSums(state: SpanState, excessRatio: number, range: { limitZ: number; sums: SpanSums }): void {
  const { top, maxSquare } = state;
  const { limitZ, sums } = range;
  const cm = 1 + maxSquare;
  const pole = findPole(state, excessRatio);
  const baseRatio = top.xRatio / (cm * (1 + excessRatio));
  const flux = 2 * state.fluxScaleW * baseRatio * baseRatio;
  const logExcess = Math.log1p(excessRatio);
  const dampingTop = top.windWPerM - top.netWPerM;
  const node = { y: 0, isTop: false, out: { netWPerM: 0, windWPerM: 0, dampingWPerM: 0 } };
  let length = 0;
  let wind = 0;
  let damping = 0;
  for (let from = 0; from < limitZ;) {
    const to = nextEdge(state, from, { limitZ, baseRatio });
    const width = to - from;
    const pieceIndex = windPieceIndex(state.power.curve, baseRatio * (1 + ((from + to) / 2) ** 2));
    const piece = windPiece(state.power.curve, pieceIndex);
    node.isTop = pieceIndex === top.pieceIndex;
    const { nodes, weights } = panelRule(from, to);
    for (let index = 0; index < nodes.length; index += 1) {
      const z = from + width * (nodes[index] as number);
      const weight = width * (weights[index] as number);
      const square = z * z;
      const c = 1 + square;
      node.y = logExcess - Math.log1p((square - maxSquare) / cm);
      setNodePower(state, piece, node);
      const density = (flux * (2 * c * c - 1)) / (Math.sqrt(2 + square) * node.out.netWPerM);
      const taken = pole.strengthM / (maxSquare - square + pole.gap);
      length += weight * (density - taken);
      wind += weight * (density * node.out.windWPerM - taken * top.windWPerM);
      damping += weight * (density * node.out.dampingWPerM - taken * dampingTop);
    }
    from = to;
  }
  const given = pole.strengthM === 0 ? 0 : pole.strengthM * poleIntegral(limitZ, { maxSquare, gap: pole.gap });
  sums.lengthM = length + given;
  sums.windW = wind + given * top.windWPerM;
  sums.dampingW = damping + given * dampingTop;
}

/** ∫₀^z dz/(z_p² − z²) = ½ln((z_p + z)/(z_p − z))/z_p, with z_p − z from the squares. */
export function poleIntegral(z: number, at: { maxSquare: number; gap: number }): number {
  const zp = Math.sqrt(at.maxSquare + at.gap);
  const difference = at.maxSquare - z * z + at.gap;
  return (0.5 / zp) * Math.log(((zp + z) * (zp + z)) / difference);
}

/**
 * Wire per step of z at one place, dx/dz.
 *
 * @param state       span at one frequency
 * @param excessRatio B_top/B − 1, scalar [ratio], > 0
 * @param z           place on one side, scalar, ≥ 0
 * @returns dx/dz, scalar [m]
 * @source closed form: the integrand of `spanSums`
 * @validity see spanSums
 * @accuracy rounding
 */
export function spanDensity(state: SpanState, excessRatio: number, z: number): number {
  const { top, maxSquare, power } = state;
  const cm = 1 + maxSquare;
  const square = z * z;
  const c = 1 + square;
  const baseRatio = top.xRatio / (cm * (1 + excessRatio));
  const pieceIndex = windPieceIndex(power.curve, baseRatio * c);
  const out = { netWPerM: 0, windWPerM: 0, dampingWPerM: 0 };
  const y = Math.log1p(excessRatio) - Math.log1p((square - maxSquare) / cm);
  setNodePower(state, windPiece(power.curve, pieceIndex), { y, isTop: pieceIndex === top.pieceIndex, out });
  return (2 * state.fluxScaleW * baseRatio * baseRatio * (2 * c * c - 1)) / (Math.sqrt(2 + square) * out.netWPerM);
}

import { windPiece } from '../wind/wind-power-curve.ts';
import {
  firstPanelZ,
  nearPole,
  panelGrowthRatio,
  panelNodeLimitCount,
  panelRule,
  poleIntegral,
  poleShape,
} from './span-integral.ts';
import type { SpanState } from './span-state.ts';

const at = (values: Float64Array, index: number): number => values[index] as number; // index is always inside

/** |Γ| is floored at 1e−6, so z ≤ 22.4 and a side has at most 6 panels. */
const nodeLimitCount = 2 * 8 * panelNodeLimitCount;

/**
 * The span's length as a function of the excess when wind and damping are both plain powers of the amplitude over the
 * whole range, which is the common case. Everything that costs an exponential depends on the node only, so a trial of
 * another excess costs two divisions a node.
 */
export interface PowerLawNodes {
  /** w·2(2c² − 1)/√(2 + z²)·(c/c_max)^−a */
  readonly shapes: Float64Array;
  /** 1 − (c/c_max)^(l−a) */
  readonly falls: Float64Array;
  readonly weights: Float64Array;
  /** z²_max − z² */
  readonly gaps: Float64Array;
  count: number;
  lengthScaleM: number;
  windExponentNumber: number;
  exponentGapNumber: number;
}

/** Storage for the nodes. */
export function powerLawNodes(): PowerLawNodes {
  return {
    shapes: new Float64Array(nodeLimitCount),
    falls: new Float64Array(nodeLimitCount),
    weights: new Float64Array(nodeLimitCount),
    gaps: new Float64Array(nodeLimitCount),
    count: 0,
    lengthScaleM: 0,
    windExponentNumber: 0,
    exponentGapNumber: 0,
  };
}

function addPanel(nodes: PowerLawNodes, panel: { from: number; to: number }, maxSquare: number): void {
  const { windExponentNumber: a, exponentGapNumber: gap } = nodes;
  const scale = 1 / (1 + maxSquare);
  const width = panel.to - panel.from;
  const rule = panelRule(panel.from, panel.to);
  for (let index = 0; index < rule.nodes.length; index += 1) {
    const z = panel.from + width * at(rule.nodes, index);
    const weight = width * at(rule.weights, index);
    const square = z * z;
    const c = 1 + square;
    const logRatio = Math.log1p((square - maxSquare) * scale);
    const slot = nodes.count;
    nodes.shapes[slot] = ((weight * 2 * (2 * c * c - 1)) / Math.sqrt(2 + square)) * Math.exp(-a * logRatio);
    nodes.falls[slot] = -Math.expm1(gap * logRatio);
    nodes.weights[slot] = weight;
    nodes.gaps[slot] = maxSquare - square;
    nodes.count = slot + 1;
  }
}

/** Sets the nodes for both sides of the span. */
export function setPowerLawNodes(nodes: PowerLawNodes, state: SpanState): void {
  const { top, power, maxSquare, endZ } = state;
  const piece = windPiece(power.curve, 0);
  nodes.windExponentNumber = piece.kind === 'power' ? piece.exponentNumber : 0;
  nodes.exponentGapNumber = power.dampingExponentNumber - nodes.windExponentNumber;
  nodes.lengthScaleM = (state.fluxScaleW * (top.xRatio / (1 + maxSquare)) ** 2) / top.windWPerM;
  nodes.count = 0;
  for (let side = 0; side < 2; side += 1) {
    const limit = at(endZ, side);
    for (let from = 0; from < limit;) {
      const to = Math.min(limit, Math.max(firstPanelZ, panelGrowthRatio * from));
      addPanel(nodes, { from, to }, maxSquare);
      from = to;
    }
  }
}

/**
 * Length of wire over which the wind feeds both ends, against the excess.
 *
 * @param nodes       as set for this span
 * @param state       span at one frequency
 * @param excessRatio B_top/B − 1, scalar [ratio], ≥ 0
 * @returns length, scalar [m]
 * @source closed form: the same integral as `spanSums`, for wind ∝ x^a and damping ∝ x^l
 * @validity the top comes from `findPowerLawTop` and every amplitude lies within the first piece
 * @accuracy about 1e-9 relative
 */
export function powerLawLength(nodes: PowerLawNodes, state: SpanState, excessRatio: number): number {
  const { shapes, falls, weights, gaps, count, exponentGapNumber } = nodes;
  const { maxSquare, endZ } = state;
  const cm = 1 + maxSquare;
  const logShrink = -Math.log1p(excessRatio);
  const shrink = 1 / (1 + excessRatio);
  const fall = -Math.expm1(exponentGapNumber * logShrink);
  const amplitudeFactor = Math.exp((2 - nodes.windExponentNumber) * logShrink);
  const gap = cm * excessRatio;
  const cp = cm + gap;
  const strength = nearPole(excessRatio) * poleShape(cp) * shrink * shrink * (cp / exponentGapNumber);
  let sum = 0;
  let taken = 0;
  for (let index = 0; index < count; index += 1) {
    const e = at(falls, index);
    sum += at(shapes, index) / (e + (1 - e) * fall);
    taken += at(weights, index) / (at(gaps, index) + gap);
  }
  const pole = { maxSquare, gap };
  const left = at(endZ, 0) > 0 ? poleIntegral(at(endZ, 0), pole) : 0;
  const right = at(endZ, 1) > 0 ? poleIntegral(at(endZ, 1), pole) : 0;
  return nodes.lengthScaleM * (amplitudeFactor * sum + strength * (left + right - taken));
}

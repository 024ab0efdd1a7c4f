import type { LocalPower, TopAmplitude } from './local-power.ts';

/*
 * Coordinates of the balance. With the right- and left-going amplitudes Be^u and Be^−u the local antinode amplitude is
 * 2B·cosh u. Along the span u runs from ½ln|Γ_L| through 0 to −½ln|Γ_R|. Each side of u = 0 is integrated in
 * z = √2·sinh(|u|/2), because cosh u = 1 + z² then costs no exponential and every integrand is even in z.
 * B is told by excess = B_top/B − 1 ≥ 0, B_top being the value at which the larger end would reach the top amplitude:
 * 2B·cosh u = top/(1 + excess)·(1 + z²)/(1 + z²_max).
 */

/** Span at one frequency as the integrals need it; one object, overwritten from frequency to frequency. */
export interface SpanState {
  readonly power: LocalPower;
  readonly top: TopAmplitude;
  /** K = Zω²D²/2, so that Zω²B² = ½K·(2B/D)². */
  fluxScaleW: number;
  /** z at the left and at the right end. */
  readonly endZ: Float64Array;
  /** The larger of them squared. */
  maxSquare: number;
}

/** A state to be overwritten. */
export function spanState(power: LocalPower): SpanState {
  return {
    power,
    top: { xRatio: 0, isRoot: true, pieceIndex: 0, windWPerM: 0, netWPerM: 0, fallWPerM: 0 },
    fluxScaleW: 0,
    endZ: new Float64Array(2),
    maxSquare: 0,
  };
}

/** Sets the ends of the span from the moduli of their reflections, each above 0 and at most 1. */
export function setSpanEnds(state: SpanState, leftRatio: number, rightRatio: number): void {
  const { endZ } = state;
  endZ[0] = endPosition(leftRatio);
  endZ[1] = endPosition(rightRatio);
  const larger = Math.max(endZ[0], endZ[1]);
  state.maxSquare = larger * larger;
}

/** z = √2·sinh(u/2) at u = −½ln|Γ|, as (1 − g)/(√2·g^¼·(1 + √g)): no logarithm, and no digits lost as g = |Γ| → 1. */
function endPosition(reflectionRatio: number): number {
  const root = Math.sqrt(reflectionRatio);
  return (1 - reflectionRatio) / (Math.SQRT2 * Math.sqrt(root) * (1 + root));
}

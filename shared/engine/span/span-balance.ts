import { amplitudeLimitRatio, windPiece, type WindPowerCurve } from '../wind/wind-power-curve.ts';
import { excessRange, findExcess, type ExcessTrial, type LengthOf } from './find-excess.ts';
import { findPowerLawTop, findTopAmplitude } from './local-power.ts';
import { powerLawLength, powerLawNodes, setPowerLawNodes, type PowerLawNodes } from './power-law-integral.ts';
import { spanSums, type SpanSums } from './span-integral.ts';
import type { SpanOutcome } from './span-row.ts';
import { setSpanEnds, spanState, type SpanState } from './span-state.ts';

/** |Γ| is floored here in the balance only: below it an end takes all but 1e−12 of what arrives. */
export const reflectionFloorRatio = 1e-6;
/** Below this amplitude over diameter a wire is called quiet. */
export const quietRatio = 1e-6;
/** Both |u| below this: the ends take nothing and the amplitude is that of the wire alone. */
const undampedU = 1e-9;
/** The excess of neighbouring frequencies is carried straight on over steps of s up to this. */
const guessStepLimit = 1;

/** One span at one frequency. */
export interface BalanceInput {
  diameterM: number;
  spanLengthM: number;
  /** Wave impedance Z. */
  impedanceNsPerM: number;
  angularFrequencyRadPerS: number;
  windScaleWPerM: number;
  dampingScaleWPerM: number;
  dampingExponentNumber: number;
  leftReflectionRatio: number;
  rightReflectionRatio: number;
}

/** Steady state of one span at one frequency; amplitudes over diameter, zero to peak, at the antinodes of the ends. */
export interface BalanceSolution {
  outcome: SpanOutcome;
  leftAmplitudeRatio: number;
  rightAmplitudeRatio: number;
  /** B_top/B − 1; see span-state. */
  excessRatio: number;
  /** Wire at the top amplitude beyond what the larger end needs, where wind and self-damping are equal. */
  plateauLengthM: number;
}

/** What the balance keeps between frequencies: storage, and the last solution as a first guess. */
export interface BalanceSolver {
  readonly state: SpanState;
  readonly nodes: PowerLawNodes;
  readonly sums: SpanSums;
  readonly solution: BalanceSolution;
  /** Wire between both ends for an excess. */
  readonly lengthAt: LengthOf;
  /** First guess for the next frequency. */
  readonly trial: ExcessTrial;
  lastS: number;
}

/** A solver for one wind power curve. */
export function balanceSolver(curve: WindPowerCurve): BalanceSolver {
  const solver: BalanceSolver = {
    state: spanState({ windScaleWPerM: 0, dampingScaleWPerM: 0, dampingExponentNumber: 0, curve }),
    nodes: powerLawNodes(),
    sums: { lengthM: 0, windW: 0, dampingW: 0 },
    solution: { outcome: 'quiet', leftAmplitudeRatio: 0, rightAmplitudeRatio: 0, excessRatio: 0, plateauLengthM: 0 },
    lengthAt: (excessRatio) => spanLengthAt(solver, excessRatio),
    trial: { s: 0, slope: 0 },
    lastS: 0,
  };
  return solver;
}

/** Wire between both ends for an excess. */
function spanLengthAt(solver: BalanceSolver, excessRatio: number): number {
  const { state, nodes, sums } = solver;
  if (nodes.count > 0) return powerLawLength(nodes, state, excessRatio);
  spanSums(state, excessRatio, { limitZ: state.endZ[0] as number, sums });
  const left = sums.lengthM;
  spanSums(state, excessRatio, { limitZ: state.endZ[1] as number, sums });
  return left + sums.lengthM;
}

function setBalance({ state }: BalanceSolver, input: BalanceInput): void {
  const { power } = state;
  power.windScaleWPerM = input.windScaleWPerM;
  power.dampingScaleWPerM = input.dampingScaleWPerM;
  power.dampingExponentNumber = input.dampingExponentNumber;
  const speed = input.angularFrequencyRadPerS * input.diameterM;
  state.fluxScaleW = 0.5 * input.impedanceNsPerM * speed * speed;
  const left = Math.max(input.leftReflectionRatio, reflectionFloorRatio);
  setSpanEnds(state, left, Math.max(input.rightReflectionRatio, reflectionFloorRatio));
}

function store(solution: BalanceSolution, outcome: SpanOutcome, amplitudeRatio: number): void {
  solution.outcome = outcome;
  solution.leftAmplitudeRatio = amplitudeRatio;
  solution.rightAmplitudeRatio = amplitudeRatio;
  solution.excessRatio = 0;
  solution.plateauLengthM = 0;
}

/** Solves for the excess below the top amplitude of the state and keeps the amplitudes. */
function solveBelowTop(solver: BalanceSolver, spanLengthM: number): void {
  const { state, solution } = solver;
  const s = findExcess(solver.lengthAt, spanLengthM, solver.trial);
  if (s === Infinity && !state.top.isRoot) {
    store(solution, 'amplitude-limit', amplitudeLimitRatio);
    return;
  }
  const excess = Math.exp(-Math.min(s, excessRange.upperS));
  const base = state.top.xRatio / ((1 + state.maxSquare) * (1 + excess));
  solution.outcome = 'steady';
  solution.excessRatio = excess;
  solution.leftAmplitudeRatio = base * (1 + (state.endZ[0] as number) ** 2);
  solution.rightAmplitudeRatio = base * (1 + (state.endZ[1] as number) ** 2);
  solution.plateauLengthM = s === Infinity ? Math.max(spanLengthM - spanLengthAt(solver, excess), 0) : 0;
  // A first guess for the next frequency: straight on, but no further than a short step.
  const last = s === Infinity ? 0 : s;
  const step = last - solver.lastS;
  solver.trial.s = last + (Math.abs(step) < guessStepLimit ? step : 0);
  solver.lastS = last;
}

/** Neither end takes anything: the whole wire swings at the top amplitude. */
function storeUndamped({ state, solution }: BalanceSolver, spanLengthM: number): void {
  state.endZ.fill(0);
  state.maxSquare = 0;
  store(solution, state.top.isRoot ? 'steady' : 'amplitude-limit', state.top.xRatio);
  solution.plateauLengthM = spanLengthM;
}

/**
 * Steady vibration of a span between two ends of known reflection: along the span the wind feeds the travelling
 * waves by what the wire does not damp itself, and the fluxes at the ends are what the ends take.
 *
 * @param solver storage; holds the result in `solution`, and the state that energies and profiles start from
 * @param input  span at one frequency, every number finite, reflections 0 to 1
 * @returns the solver's solution, overwritten by the next call
 * @source closed form on the chosen wind power and self-damping: du/dx = p(2B·cosh u)/(2Zω²B²·cosh 2u)
 * @validity losses small within a loop, so that the local standing wave follows the two amplitudes; single frequency
 * @accuracy 1e-9 in the amplitude for the stated equation
 */
export function solveSpanBalance(solver: BalanceSolver, input: BalanceInput): BalanceSolution {
  const { state, solution, nodes } = solver;
  const { power, top } = state;
  setBalance(solver, input);
  const isUndamped = state.maxSquare < 0.5 * undampedU * undampedU;
  nodes.count = 0;
  if (!isUndamped && findPowerLawTop(power, top) && top.xRatio > quietRatio) {
    setPowerLawNodes(nodes, state);
    solveBelowTop(solver, input.spanLengthM);
    const largest = Math.max(solution.leftAmplitudeRatio, solution.rightAmplitudeRatio);
    if (largest <= windPiece(power.curve, 0).upperRatio) return solution;
    nodes.count = 0;
  }
  findTopAmplitude(power, top);
  if (top.xRatio <= quietRatio) store(solution, 'quiet', 0);
  else if (isUndamped) storeUndamped(solver, input.spanLengthM);
  else solveBelowTop(solver, input.spanLengthM);
  return solution;
}

import { assertNumber } from '../numerics/assert-number.ts';
import { EngineInputError } from '../numerics/engine-input-error.ts';
import { bendingAmplitudeDistanceM, strainOfBendingAmplitude, type ClampWire } from '../strain/poffenberger-swart.ts';
import { fatigueCycles, type FatigueCurve } from './fatigue-curve.ts';

/** One cell of a recorder's matrix: cycles counted at a frequency and bending amplitude. */
export interface RecorderCell {
  readonly frequencyHz: number;
  readonly bendingAmplitudePkPkM: number;
  readonly cycleCount: number;
}

/** What a vibration recorder counted at a clamp. */
export interface RecorderMatrix {
  readonly cells: readonly RecorderCell[];
  /** Time over which the cycles were counted, whether the wire vibrated or not. */
  readonly durationS: number;
  /** Distance of the measuring point from the last point of contact; 0.089 m when left out. */
  readonly distanceM?: number | undefined;
}

/** Damage of one cell, in its share of a year. */
export interface RecorderDamage {
  readonly frequencyHz: number;
  readonly stressPa: number;
  readonly cyclesPerYearCount: number;
  readonly damagePerYearRatio: number;
}

/** Life from a recorder's matrix. */
export interface RecorderLife {
  readonly damagePerYearRatio: number;
  readonly maxStressPa: number;
  readonly cells: readonly RecorderDamage[];
}

const secondsPerYear = 8766 * 3600;
const cellLimitCount = 20_000;
const amplitudeLimits = { atLeast: 0, atMost: 0.02 } as const;
const frequencyLimits = { above: 0, atMost: 1000 } as const;
const countLimits = { atLeast: 0, atMost: 1e12 } as const;
const durationLimits = { atLeast: 1, atMost: 3.2e9 } as const;

/**
 * Yearly damage at a clamp from the cycles that a vibration recorder counted.
 *
 * @param matrix cells with frequency [Hz], bending amplitude peak to peak [m] and cycles; duration [s]
 * @param clamp  wire at the clamp (T, EI, d) and E of the outer strand [Pa]
 * @param curve  fatigue line
 * @returns damage per year, largest stress [Pa] zero to peak, and each cell's part
 * @throws EngineInputError naming the cell
 * @source closed form on recalled parts: Poffenberger and Swart's formula and the safe border line (from memory), Miner's sum
 * @validity the time of recording stands for the year; rigid clamp
 * @accuracy that of the season recorded; a factor of several
 */
export function recorderLife(
  matrix: RecorderMatrix,
  clamp: { readonly wire: ClampWire; readonly modulusPa: number },
  curve: FatigueCurve,
): RecorderLife {
  assertNumber('recorder.durationS', matrix.durationS, durationLimits);
  if (matrix.cells.length < 1 || matrix.cells.length > cellLimitCount) {
    throw new EngineInputError('recorder.cells', `must be 1 to ${cellLimitCount} cells`);
  }
  const perYear = secondsPerYear / matrix.durationS;
  const cells = matrix.cells.map((cell, index): RecorderDamage => {
    const path = `recorder.cells[${index}]`;
    assertNumber(`${path}.frequencyHz`, cell.frequencyHz, frequencyLimits);
    assertNumber(`${path}.bendingAmplitudePkPkM`, cell.bendingAmplitudePkPkM, amplitudeLimits);
    assertNumber(`${path}.cycleCount`, cell.cycleCount, countLimits);
    const distanceM = matrix.distanceM ?? bendingAmplitudeDistanceM;
    const stressPa = clamp.modulusPa * strainOfBendingAmplitude(clamp.wire, cell.bendingAmplitudePkPkM, distanceM);
    const cyclesPerYearCount = cell.cycleCount * perYear;
    const damagePerYearRatio = stressPa > 0 ? cyclesPerYearCount / fatigueCycles(curve, stressPa) : 0;
    return { frequencyHz: cell.frequencyHz, stressPa, cyclesPerYearCount, damagePerYearRatio };
  });
  return {
    cells,
    damagePerYearRatio: cells.reduce((sum, cell) => sum + cell.damagePerYearRatio, 0),
    maxStressPa: cells.reduce((most, cell) => Math.max(most, cell.stressPa), 0),
  };
}

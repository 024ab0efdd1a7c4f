import {
  amplitudeLimitRatio,
  windPiece,
  windPieceSlope,
  windPieceValue,
  type WindPowerCurve,
  type WindPowerPiece,
} from '../wind/wind-power-curve.ts';

/**
 * Power per metre into and out of a wire at one frequency, against x = A/D:
 * p(x) = windScale·fnc(x) − dampingScale·x^dampingExponent.
 */
export interface LocalPower {
  windScaleWPerM: number;
  dampingScaleWPerM: number;
  dampingExponentNumber: number;
  readonly curve: WindPowerCurve;
}

/** Largest amplitude of the balance and what the net power does there. */
export interface TopAmplitude {
  /** x at which p = 0, or the amplitude limit if there is none below it. */
  xRatio: number;
  isRoot: boolean;
  pieceIndex: number;
  /** Wind power at that amplitude. */
  windWPerM: number;
  /** Net power there; 0 at a root. */
  netWPerM: number;
  /** −x·dp/dx there. */
  fallWPerM: number;
}

const bisectionLimitCount = 200;
const rootTolerance = 1e-15;

/** Root of p within a cubic piece by Newton's iteration on ln(wind/damping), held in its bracket. */
function rootInCubic(power: LocalPower, piece: WindPowerPiece, bracket: { lower: number; upper: number }): number {
  let { lower, upper } = bracket;
  let x = upper;
  for (let step = 0; step < bisectionLimitCount; step += 1) {
    const wind = power.windScaleWPerM * windPieceValue(piece, x);
    const damping = power.dampingScaleWPerM * Math.pow(x, power.dampingExponentNumber);
    if (wind > damping) lower = x;
    else upper = x;
    const slope = windPieceSlope(piece, x) - power.dampingExponentNumber;
    let next = x * Math.exp(-Math.log(wind / damping) / slope);
    if (!(next > lower && next < upper)) next = (lower + upper) / 2;
    if (Math.abs(next - x) <= rootTolerance * x) return next;
    x = next;
  }
  return x;
}

/** Root of p in one piece, or not a number if p is positive up to its end. */
function rootInPiece(power: LocalPower, piece: WindPowerPiece, lower: number): number {
  const upper = Math.min(piece.upperRatio, amplitudeLimitRatio);
  if (piece.kind === 'cubic') {
    const wind = power.windScaleWPerM * windPieceValue(piece, upper);
    const isPositive = wind > power.dampingScaleWPerM * Math.pow(upper, power.dampingExponentNumber);
    return isPositive ? NaN : rootInCubic(power, piece, { lower, upper });
  }
  const ratio = (power.windScaleWPerM * piece.levelNumber) / power.dampingScaleWPerM;
  const root = Math.pow(ratio, 1 / (power.dampingExponentNumber - piece.exponentNumber));
  return root <= upper ? root : NaN;
}

/**
 * Finds the amplitude at which the first piece of the wind curve, carried on beyond its end, would balance the damping.
 * A balance that stays within the first piece depends on that amplitude only, wherever the true top lies.
 *
 * @param power net power per metre
 * @param top   result, overwritten; the true top too wherever it lies within the first piece
 * @returns false if the first piece is no power law
 * @source closed form on the chosen wind power and self-damping
 * @validity amplitudes within the first piece
 * @accuracy rounding
 */
export function findPowerLawTop(power: LocalPower, top: TopAmplitude): boolean {
  const piece = windPiece(power.curve, 0);
  if (piece.kind !== 'power') return false;
  const exponentGap = power.dampingExponentNumber - piece.exponentNumber;
  const ratio = (power.windScaleWPerM * piece.levelNumber) / power.dampingScaleWPerM;
  // One logarithm and two exponentials cost less than two powers.
  const logX = Math.log(ratio) / exponentGap;
  top.xRatio = Math.exp(logX);
  top.isRoot = true;
  top.pieceIndex = 0;
  top.windWPerM = power.dampingScaleWPerM * Math.exp(logX * power.dampingExponentNumber);
  top.netWPerM = 0;
  top.fallWPerM = exponentGap * top.windWPerM;
  return true;
}

/**
 * Finds the amplitude at which the wind puts in what the wire takes out itself, at most half a diameter.
 *
 * @param power net power per metre, falling through zero once (its ratio to x² falls)
 * @param top   result, overwritten: no object is made per frequency
 * @source closed form on the chosen wind power and self-damping
 * @validity log-slope of the wind curve below 2, damping exponent at least 2
 * @accuracy 1e-15 relative
 */
export function findTopAmplitude(power: LocalPower, top: TopAmplitude): void {
  const { curve } = power;
  let index = 0;
  let lower = 0;
  let x = NaN;
  // From below: a power piece tells its root in one step, and there is only one root.
  for (; index < curve.length; index += 1) {
    x = rootInPiece(power, windPiece(curve, index), lower);
    if (!Number.isNaN(x)) break;
    lower = windPiece(curve, index).upperRatio;
  }
  top.isRoot = index < curve.length;
  if (!top.isRoot) {
    index = curve.length - 1;
    x = amplitudeLimitRatio;
  }
  const piece = windPiece(curve, index);
  const wind = power.windScaleWPerM * windPieceValue(piece, x);
  const damping = top.isRoot ? wind : power.dampingScaleWPerM * Math.pow(x, power.dampingExponentNumber);
  top.xRatio = x;
  top.pieceIndex = index;
  top.windWPerM = wind;
  top.netWPerM = top.isRoot ? 0 : wind - damping;
  top.fallWPerM = power.dampingExponentNumber * damping - windPieceSlope(piece, x) * wind;
}

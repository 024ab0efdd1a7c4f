import { amplitudeLimitRatio, windPieceSlope, windPieceValue, type WindPowerCurve } from './wind-power-curve.ts';

/** fnc = −99.73x³ + 101.62x² + 0.1627x + 0.2256. @source from memory: credited to Diana and Falco, not read in a paper */
const cubic = {
  kind: 'cubic',
  upperRatio: amplitudeLimitRatio,
  coefs: [0.2256, 0.1627, 101.62, -99.73],
} as const;

/** Below this amplitude the constant term of the cubic would give still wires free power. @source own model */
const joinRatio = 0.1;

/**
 * Reduced wind power of the cubic fit from A/D 0.1 to 0.5, with the power law of the same value and log-slope below.
 *
 * @returns pieces of the curve; value 1.15834 and log-slope 1.510334 at 0.1
 * @source from memory: cubic credited to Diana and Falco; below 0.1 own model
 * @validity smooth flow, single wire, A/D 0.1 to 0.5; below 0.1 an extension
 * @accuracy the fit's own scatter is not known to us
 */
export function dianaFalcoCurve(): WindPowerCurve {
  const exponentNumber = windPieceSlope(cubic, joinRatio);
  const levelNumber = windPieceValue(cubic, joinRatio) / Math.pow(joinRatio, exponentNumber);
  return [{ kind: 'power', upperRatio: joinRatio, levelNumber, exponentNumber }, cubic];
}

/**
 * The same cubic down to zero amplitude, where it leaves 0.2256 of power to a wire at rest.
 *
 * @returns one piece
 * @source from memory: cubic credited to Diana and Falco
 * @validity A/D 0.1 to 0.5; below, for comparison with hand calculations only
 * @accuracy the fit's own scatter is not known to us
 */
export function dianaFalcoCubic(): WindPowerCurve {
  return [cubic];
}

/**
 * Piece of a reduced wind power curve fnc(x), x = A/D: a power law `level·x^exponent`, or a cubic with the constant
 * term first. Pieces meet without a step and together cover 0 to the amplitude limit.
 */
export type WindPowerPiece =
  | {
      readonly kind: 'power';
      readonly upperRatio: number;
      readonly levelNumber: number;
      readonly exponentNumber: number;
    }
  | { readonly kind: 'cubic'; readonly upperRatio: number; readonly coefs: readonly [number, number, number, number] };

/** Reduced wind power curve by pieces in rising order of amplitude; each piece starts where the one before it ends. */
export type WindPowerCurve = readonly WindPowerPiece[];

/** Amplitude over diameter above which no wind power curve is evaluated. @source common practice: curves end there */
export const amplitudeLimitRatio = 0.5;

/** Value of one piece at x. */
export function windPieceValue(piece: WindPowerPiece, x: number): number {
  if (piece.kind === 'power') return piece.levelNumber * Math.pow(x, piece.exponentNumber);
  const [c0, c1, c2, c3] = piece.coefs;
  return c0 + x * (c1 + x * (c2 + x * c3));
}

/** Logarithmic slope x·fnc′/fnc of one piece at x > 0. */
export function windPieceSlope(piece: WindPowerPiece, x: number): number {
  if (piece.kind === 'power') return piece.exponentNumber;
  const [, c1, c2, c3] = piece.coefs;
  return (x * (c1 + x * (2 * c2 + x * 3 * c3))) / windPieceValue(piece, x);
}

/** Index of the piece that holds x; the last one beyond the end. */
export function windPieceIndex(curve: WindPowerCurve, x: number): number {
  let index = 0;
  while (index < curve.length - 1 && x > (curve[index]?.upperRatio ?? 0)) index += 1;
  return index;
}

/** Piece of a curve by index, held inside the curve. */
export function windPiece(curve: WindPowerCurve, index: number): WindPowerPiece {
  const piece = curve[Math.min(index, curve.length - 1)];
  if (piece === undefined) throw new RangeError('a wind power curve has at least one piece');
  return piece;
}

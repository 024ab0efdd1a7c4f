import { EngineInputError } from '../numerics/engine-input-error.ts';
import { assertNumber } from '../numerics/assert-number.ts';

/**
 * Ruling span of a section, √(ΣS³/ΣS).
 *
 * @param lengthsM S, [n] [m], > 0, n ≥ 1
 * @returns ruling span, scalar [m]
 * @throws EngineInputError if there is no span or a length is not above 0
 * @source closed form: equal tension in all spans of the section, parabolic sag
 * @validity level or nearly level spans, suspension strings free to swing
 * @accuracy rounding
 */
export function rulingSpan(lengthsM: readonly number[]): number {
  if (lengthsM.length === 0) throw new EngineInputError('lengthsM', 'must hold at least one span');
  lengthsM.forEach((lengthM, index) => assertNumber(`lengthsM[${index}]`, lengthM, { above: 0 }));
  const sum = lengthsM.reduce((total, lengthM) => total + lengthM, 0);
  const cubes = lengthsM.reduce((total, lengthM) => total + lengthM ** 3, 0);
  return Math.sqrt(cubes / sum);
}

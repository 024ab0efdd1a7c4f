import { assertNumber } from '../numerics/assert-number.ts';

/** Outline of a galloping wire: full axes, and the rest point above the lower end of the major axis. */
export interface GallopingEllipse {
  readonly majorAxisM: number;
  readonly minorAxisM: number;
  readonly restPointM: number;
}

/** The foot of the published constants. @source published: international foot */
const footM = 0.3048;

/**
 * Outline of a wire galloping in one loop: M = 1.25S + 0.3048, B = 0.25S, D = 0.4M, in metres.
 *
 * @param sagM S, final sag iced without wind at 0 °C, scalar [m], > 0
 * @returns full axes and rest point [m]
 * @throws EngineInputError if the input is outside its bounds
 * @source from memory: RUS Bulletin 1724E-200 (2005), the one-loop formulas were not read
 * @validity short spans; check both outlines and keep the worse
 * @accuracy an envelope of field observations
 */
export function oneLoopEllipse(sagM: number): GallopingEllipse {
  assertNumber('sagM', sagM, { above: 0 });
  const majorAxisM = 1.25 * sagM + footM;
  return { majorAxisM, minorAxisM: 0.4 * majorAxisM, restPointM: 0.25 * sagM };
}

/**
 * Outline of a wire galloping in two loops: a = √((L/2)² + S²), M = 0.3048 + √(3a(L + 8S²/3L − 2a)/8),
 * B = 0.2M, D = 2√0.3048·√(M − 0.3048), in metres.
 *
 * @param lengthM L, span length, scalar [m], > 0
 * @param sagM    S, final sag iced without wind at 0 °C, scalar [m], > 0 and at most L/4
 * @returns full axes and rest point [m]
 * @throws EngineInputError if an input is outside its bounds
 * @source from memory: RUS Bulletin 1724E-200 (2005), the two-loop formulas were not read
 * @validity long spans; check both outlines and keep the worse
 * @accuracy an envelope of field observations
 */
export function twoLoopEllipse(lengthM: number, sagM: number): GallopingEllipse {
  assertNumber('lengthM', lengthM, { above: 0 });
  assertNumber('sagM', sagM, { above: 0, atMost: lengthM / 4 });
  const chordM = Math.hypot(lengthM / 2, sagM);
  // 2a − L as a quotient: the plain difference would lose digits in flat spans.
  const slackM = (8 * sagM ** 2) / (3 * lengthM) - sagM ** 2 / (chordM / 2 + lengthM / 4);
  const loopM = Math.sqrt((3 * chordM * slackM) / 8);
  const majorAxisM = footM + loopM;
  return { majorAxisM, minorAxisM: 2 * Math.sqrt(footM * loopM), restPointM: 0.2 * majorAxisM };
}

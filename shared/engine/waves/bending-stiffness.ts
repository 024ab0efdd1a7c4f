import { assertNumber } from '../numerics/assert-number.ts';

/** A ring of equal strands: radius of the circle through their centres, 0 for the core strand. */
export interface StrandRing {
  readonly strandCount: number;
  readonly strandDiameterM: number;
  readonly modulusPa: number;
  readonly ringRadiusM: number;
}

/** Second moment of a circle over its fourth power of diameter, π/64. */
const circleNumber = Math.PI / 64;

function assertRings(rings: readonly StrandRing[]): void {
  rings.forEach((ring, index) => {
    assertNumber(`rings[${index}].strandCount`, ring.strandCount, { atLeast: 1 });
    assertNumber(`rings[${index}].strandDiameterM`, ring.strandDiameterM, { above: 0 });
    assertNumber(`rings[${index}].modulusPa`, ring.modulusPa, { above: 0 });
    assertNumber(`rings[${index}].ringRadiusM`, ring.ringRadiusM, { atLeast: 0 });
  });
}

/**
 * Bending stiffness of a wire whose strands slide freely, Σ n·E·πd⁴/64.
 *
 * @param rings strands by ring: count, diameter [m], modulus [Pa]
 * @returns EImin, scalar [N·m²]
 * @throws EngineInputError naming the ring
 * @source closed form: each strand bends about its own axis
 * @validity lay angle ignored
 * @accuracy a lower bound
 */
export function bendingStiffnessMin(rings: readonly StrandRing[]): number {
  assertRings(rings);
  return rings.reduce(
    (sum, { strandCount, strandDiameterM, modulusPa }) =>
      sum + strandCount * modulusPa * circleNumber * strandDiameterM ** 4,
    0,
  );
}

/**
 * Bending stiffness of a wire whose strands do not slide, EImin + Σ n·E·(πd²/4)·r²/2.
 *
 * @param rings strands by ring: count, diameter [m], modulus [Pa], radius of the circle through the centres [m]
 * @returns EImax, scalar [N·m²]
 * @throws EngineInputError naming the ring
 * @source closed form: plane sections, strands spread evenly round their ring
 * @validity lay angle ignored
 * @accuracy an upper bound
 */
export function bendingStiffnessMax(rings: readonly StrandRing[]): number {
  const own = bendingStiffnessMin(rings);
  return rings.reduce((sum, { strandCount, strandDiameterM, modulusPa, ringRadiusM }) => {
    const areaM2 = (Math.PI * strandDiameterM ** 2) / 4;
    return sum + (strandCount * modulusPa * areaM2 * ringRadiusM ** 2) / 2;
  }, own);
}

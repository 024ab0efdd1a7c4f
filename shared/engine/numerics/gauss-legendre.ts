/** Nodes and weights of a quadrature rule on 0 to 1. */
export interface QuadratureRule {
  readonly nodes: Float64Array;
  readonly weights: Float64Array;
}

const iterationLimitCount = 50;

/** Value and slope of the Legendre polynomial of a degree. */
function legendre(degreeCount: number, at: number): { value: number; slope: number } {
  let before = 1;
  let value = at;
  for (let degree = 2; degree <= degreeCount; degree += 1) {
    const next = ((2 * degree - 1) * at * value - (degree - 1) * before) / degree;
    before = value;
    value = next;
  }
  return { value, slope: (degreeCount * (at * value - before)) / (at * at - 1) };
}

/**
 * Gauss–Legendre rule on 0 to 1: exact for polynomials up to degree 2n − 1.
 *
 * @param nodeCount n, whole number, 2 to 128
 * @returns nodes [n] in rising order and weights [n], which add up to 1
 * @source closed form: roots of the Legendre polynomial by Newton's iteration, weights 2/((1 − x²)P′²)
 * @validity any integrand without a singularity inside the interval
 * @accuracy nodes and weights to about 1e-15
 */
export function gaussLegendre(nodeCount: number): QuadratureRule {
  const nodes = new Float64Array(nodeCount);
  const weights = new Float64Array(nodeCount);
  for (let index = 0; index < nodeCount; index += 1) {
    let root = Math.cos((Math.PI * (index + 0.75)) / (nodeCount + 0.5));
    let slope = 1;
    for (let step = 0; step < iterationLimitCount; step += 1) {
      const at = legendre(nodeCount, root);
      slope = at.slope;
      const change = at.value / at.slope;
      root -= change;
      if (Math.abs(change) < Number.EPSILON) break;
    }
    nodes[index] = (1 - root) / 2;
    weights[index] = 1 / ((1 - root * root) * slope * slope);
  }
  return { nodes, weights };
}

/** A small dense complex system in split storage: matrix [n×n] by rows, right side [n], overwritten by the solution. */
export interface ComplexSystem {
  readonly sizeCount: number;
  readonly matrixRe: Float64Array;
  readonly matrixIm: Float64Array;
  readonly sideRe: Float64Array;
  readonly sideIm: Float64Array;
}

/** Zeroed storage for a system. */
export function complexSystem(sizeCount: number): ComplexSystem {
  return {
    sizeCount,
    matrixRe: new Float64Array(sizeCount * sizeCount),
    matrixIm: new Float64Array(sizeCount * sizeCount),
    sideRe: new Float64Array(sizeCount),
    sideIm: new Float64Array(sizeCount),
  };
}

const at = (values: Float64Array, index: number): number => values[index] as number; // index is always inside

function swapRows({ sizeCount: n, matrixRe, matrixIm, sideRe, sideIm }: ComplexSystem, a: number, b: number): void {
  if (a === b) return;
  for (const [values, width] of [
    [matrixRe, n],
    [matrixIm, n],
    [sideRe, 1],
    [sideIm, 1],
  ] as const) {
    for (let column = 0; column < width; column += 1) {
      const kept = at(values, a * width + column);
      values[a * width + column] = at(values, b * width + column);
      values[b * width + column] = kept;
    }
  }
}

function pivotRow({ sizeCount: n, matrixRe, matrixIm }: ComplexSystem, column: number): number {
  let best = column;
  let bestSize = -1;
  for (let row = column; row < n; row += 1) {
    const size = Math.abs(at(matrixRe, row * n + column)) + Math.abs(at(matrixIm, row * n + column));
    if (size > bestSize) {
      bestSize = size;
      best = row;
    }
  }
  return best;
}

function eliminate(system: ComplexSystem, pivot: number, row: number): void {
  const { sizeCount: n, matrixRe, matrixIm, sideRe, sideIm } = system;
  const pr = at(matrixRe, pivot * n + pivot);
  const pi = at(matrixIm, pivot * n + pivot);
  const scale = 1 / (pr * pr + pi * pi);
  const er = at(matrixRe, row * n + pivot);
  const ei = at(matrixIm, row * n + pivot);
  const fr = (er * pr + ei * pi) * scale;
  const fi = (ei * pr - er * pi) * scale;
  for (let column = pivot + 1; column < n; column += 1) {
    const ar = at(matrixRe, pivot * n + column);
    const ai = at(matrixIm, pivot * n + column);
    matrixRe[row * n + column] = at(matrixRe, row * n + column) - (fr * ar - fi * ai);
    matrixIm[row * n + column] = at(matrixIm, row * n + column) - (fr * ai + fi * ar);
  }
  const br = at(sideRe, pivot);
  const bi = at(sideIm, pivot);
  sideRe[row] = at(sideRe, row) - (fr * br - fi * bi);
  sideIm[row] = at(sideIm, row) - (fr * bi + fi * br);
}

function substituteBack({ sizeCount: n, matrixRe, matrixIm, sideRe, sideIm }: ComplexSystem): void {
  for (let row = n - 1; row >= 0; row -= 1) {
    let br = at(sideRe, row);
    let bi = at(sideIm, row);
    for (let column = row + 1; column < n; column += 1) {
      const ar = at(matrixRe, row * n + column);
      const ai = at(matrixIm, row * n + column);
      br -= ar * at(sideRe, column) - ai * at(sideIm, column);
      bi -= ar * at(sideIm, column) + ai * at(sideRe, column);
    }
    const pr = at(matrixRe, row * n + row);
    const pi = at(matrixIm, row * n + row);
    const scale = 1 / (pr * pr + pi * pi);
    sideRe[row] = (br * pr + bi * pi) * scale;
    sideIm[row] = (bi * pr - br * pi) * scale;
  }
}

/**
 * Solves a small dense complex system in place by elimination with row exchange.
 *
 * @param system matrix and right side; the matrix is destroyed, the right side becomes the solution
 * @source closed form
 * @validity well-conditioned systems of a few unknowns
 * @accuracy backward stable
 */
export function solveComplex(system: ComplexSystem): void {
  const n = system.sizeCount;
  for (let pivot = 0; pivot < n; pivot += 1) {
    swapRows(system, pivot, pivotRow(system, pivot));
    for (let row = pivot + 1; row < n; row += 1) eliminate(system, pivot, row);
  }
  substituteBack(system);
}

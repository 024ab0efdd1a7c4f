/** Complex arithmetic with an object per number: the plain path that the engine is measured against. */
export interface PlainComplex {
  readonly re: number;
  readonly im: number;
}

export const plain = (re: number, im = 0): PlainComplex => ({ re, im });
export const plus = (a: PlainComplex, b: PlainComplex): PlainComplex => plain(a.re + b.re, a.im + b.im);
export const minus = (a: PlainComplex, b: PlainComplex): PlainComplex => plain(a.re - b.re, a.im - b.im);
export const times = (a: PlainComplex, b: PlainComplex): PlainComplex =>
  plain(a.re * b.re - a.im * b.im, a.re * b.im + a.im * b.re);
export const over = (a: PlainComplex, b: PlainComplex): PlainComplex => {
  const size = b.re * b.re + b.im * b.im;
  return plain((a.re * b.re + a.im * b.im) / size, (a.im * b.re - a.re * b.im) / size);
};
export const absolute = (a: PlainComplex): number => Math.hypot(a.re, a.im);
export const exponential = (a: PlainComplex): PlainComplex =>
  plain(Math.exp(a.re) * Math.cos(a.im), Math.exp(a.re) * Math.sin(a.im));

/** Solves a dense complex system by elimination with row exchange; both arguments are left as they are. */
export function plainSolve(
  matrix: readonly (readonly PlainComplex[])[],
  side: readonly PlainComplex[],
): PlainComplex[] {
  const rows = matrix.map((row, index) => [...row, side[index] ?? plain(NaN)]);
  const count = rows.length;
  const cell = (row: number, column: number) => rows[row]?.[column] ?? plain(NaN);
  for (let pivot = 0; pivot < count; pivot += 1) {
    let best = pivot;
    for (let row = pivot; row < count; row += 1) {
      if (absolute(cell(row, pivot)) > absolute(cell(best, pivot))) best = row;
    }
    const [a, b] = [rows[pivot], rows[best]];
    if (a === undefined || b === undefined) break;
    rows[pivot] = b;
    rows[best] = a;
    for (let row = pivot + 1; row < count; row += 1) {
      const factor = over(cell(row, pivot), cell(pivot, pivot));
      rows[row] = (rows[row] ?? []).map((value, column) =>
        column < pivot ? value : minus(value, times(factor, cell(pivot, column))),
      );
    }
  }
  const solution = side.map(() => plain(0));
  for (let row = count - 1; row >= 0; row -= 1) {
    let value = cell(row, count);
    for (let column = row + 1; column < count; column += 1) {
      value = minus(value, times(cell(row, column), solution[column] ?? plain(NaN)));
    }
    solution[row] = over(value, cell(row, row));
  }
  return solution;
}

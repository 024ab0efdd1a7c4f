/** A complex number given out by the engine; inner loops keep real and imaginary parts in plain arrays. */
export interface Complex {
  readonly re: number;
  readonly im: number;
}

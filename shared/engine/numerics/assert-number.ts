import { EngineInputError } from './engine-input-error.ts';

/** Bounds of a number; an end that is left out is open. */
export interface NumberBounds {
  readonly above?: number;
  readonly atLeast?: number;
  readonly below?: number;
  readonly atMost?: number;
}

/**
 * Refuses a number that is not finite or lies outside its bounds.
 *
 * @param path name of the number in the caller's input, as the message shows it
 * @param value the number
 * @param bounds its bounds
 * @throws EngineInputError naming the path and the bound
 * @source common practice
 */
export function assertNumber(path: string, value: number, bounds: NumberBounds = {}): void {
  if (typeof value !== 'number' || !Number.isFinite(value)) throw new EngineInputError(path, 'must be a finite number');
  if (bounds.above !== undefined && !(value > bounds.above)) {
    throw new EngineInputError(path, `must be above ${bounds.above}, it is ${value}`);
  }
  if (bounds.atLeast !== undefined && !(value >= bounds.atLeast)) {
    throw new EngineInputError(path, `must be at least ${bounds.atLeast}, it is ${value}`);
  }
  if (bounds.below !== undefined && !(value < bounds.below)) {
    throw new EngineInputError(path, `must be below ${bounds.below}, it is ${value}`);
  }
  if (bounds.atMost !== undefined && !(value <= bounds.atMost)) {
    throw new EngineInputError(path, `must be at most ${bounds.atMost}, it is ${value}`);
  }
}

/** An input outside the stated bounds of an engine function: its path in the input, and what is wrong with it. */
export class EngineInputError extends Error {
  readonly path: string;
  readonly problem: string;

  constructor(path: string, problem: string) {
    super(`${path} ${problem}`);
    this.name = 'EngineInputError';
    this.path = path;
    this.problem = problem;
  }
}

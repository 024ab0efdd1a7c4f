/** How well a method is founded; printed with every result that used it. */
export type MethodStanding = 'published' | 'closed form' | 'common practice' | 'from memory' | 'own model';

/** A method that a result rests on. */
export interface MethodNote {
  readonly name: string;
  readonly standing: MethodStanding;
  readonly source: string;
}

/** Something the reader of a result must know: a limit of validity passed, a fallback taken. */
export interface EngineWarning {
  readonly code: string;
  readonly text: string;
}

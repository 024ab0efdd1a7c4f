import type { EngineWarning, MethodNote } from '../methods/method-note.ts';
import { ENGINE_VERSION } from '../version.ts';

/** What every answer of the engine's commands starts with. */
export interface CommandHead {
  readonly schema: 'stillspan.engine/1';
  readonly engineVersion: string;
  readonly methods: readonly MethodNote[];
  readonly warnings: readonly EngineWarning[];
}

/** Head of an answer with the methods it used and what the reader must know. */
export function commandHead(methods: readonly MethodNote[], warnings: readonly EngineWarning[] = []): CommandHead {
  return { schema: 'stillspan.engine/1', engineVersion: ENGINE_VERSION, methods, warnings };
}

import { randomUUID } from 'node:crypto';
import { setImmediate as nextTurn } from 'node:timers/promises';
import { assessSpanWire, createEndResponseCache, EngineInputError, type MethodNote } from '#shared/engine/index.ts';
import { engineBasisOf, engineCaseOf } from '#server/data/engine-case.ts';
import { frozenCase, type FrozenChunk } from '#server/data/frozen-input.ts';
import type { NewFinding } from '#server/data/findings.repository.ts';
import { gradeOf } from './grade-of.ts';
import { reasonsOf } from './reasons-of.ts';

/** The event loop gets a turn this often, so that cancel requests and lock renewals are heard while computing. */
const turnEveryMs = 40;

function findingOf(chunk: FrozenChunk, itemIndex: number, cache: ReturnType<typeof createEndResponseCache>) {
  const frozen = frozenCase(chunk, itemIndex);
  const { methods, warnings, ...result } = assessSpanWire(engineCaseOf(frozen), engineBasisOf(frozen), cache);
  const { worst } = result;
  const finding: NewFinding = {
    id: randomUUID(),
    spanWireId: frozen.item.spanWireId,
    itemIndex,
    outcome: result.outcome,
    grade: gradeOf({ ...result, methods, warnings }, frozen.basis.spec),
    utilisationRatio: worst?.utilisationRatio ?? null,
    stressPa: worst?.stressPa ?? null,
    limitStressPa: worst?.limitStressPa ?? null,
    frequencyHz: worst?.frequencyHz ?? null,
    windSpeedMPerS: worst?.windSpeedMPerS ?? null,
    amplitudeM: worst?.amplitudeM ?? null,
    lifeYears: result.life.outcome === 'finite' ? result.life.years : null,
    reasons: reasonsOf(frozen, { ...result, methods, warnings }),
    warnings,
    result,
  };
  return { finding, methods };
}

/** Input that the engine does not take is a finding too: somebody has to look, and the others of the chunk go on. */
function refusedFinding(chunk: FrozenChunk, itemIndex: number, error: EngineInputError): NewFinding {
  const { item } = frozenCase(chunk, itemIndex);
  return {
    id: randomUUID(),
    spanWireId: item.spanWireId,
    itemIndex,
    outcome: 'refused',
    grade: 'notice',
    utilisationRatio: null,
    stressPa: null,
    limitStressPa: null,
    frequencyHz: null,
    windSpeedMPerS: null,
    amplitudeM: null,
    lifeYears: null,
    reasons: [{ code: 'refused-input', field: error.path, problem: error.problem }],
    warnings: [],
    result: {},
  };
}

function computeOrRefuse(chunk: FrozenChunk, itemIndex: number, cache: ReturnType<typeof createEndResponseCache>) {
  try {
    return findingOf(chunk, itemIndex, cache);
  } catch (error) {
    if (!(error instanceof EngineInputError)) throw error;
    return { finding: refusedFinding(chunk, itemIndex, error), methods: [] };
  }
}

/** Computes the findings of a chunk; stops between two span wires when the signal says so and then returns null. */
export async function assessChunk(
  chunk: FrozenChunk,
  signal: AbortSignal,
): Promise<{ findings: NewFinding[]; methods: readonly MethodNote[] } | null> {
  const findings: NewFinding[] = [];
  const methods = new Map<string, MethodNote>();
  const cache = createEndResponseCache();
  let turnAtMs = performance.now() + turnEveryMs;
  for (let itemIndex = 0; itemIndex < chunk.items.length; itemIndex += 1) {
    if (performance.now() >= turnAtMs) {
      await nextTurn();
      turnAtMs = performance.now() + turnEveryMs;
    }
    if (signal.aborted) return null;
    const computed = computeOrRefuse(chunk, itemIndex, cache);
    findings.push(computed.finding);
    for (const note of computed.methods) methods.set(note.name, note);
  }
  return { findings, methods: [...methods.values()] };
}

import type { VelocityTablesDamperModel } from '../dampers/damper-model.ts';
import { middleVelocity } from '../dampers/velocity-tables.ts';
import type { EndPair } from './span-row.ts';
import type { SpanSetup } from './span-setup.ts';
import { respondEnds, sweepSpan, type SpanSweep, type SweepVisitor } from './sweep-span.ts';

/** Clamp velocity of each damper of each end, in the order of the input, at each frequency. */
export type ClampVelocities = EndPair<Float64Array[]>;

const stepLimitCount = 60;
/** The iteration stops when no velocity moves by more than this. */
const toleranceRatio = 1e-6;
/** Share of a step that is taken: full steps swing where impedance falls fast with velocity. @source own model */
const stepShare = 0.5;
/** Motion too small to tell a velocity from. */
const leastMPerS = 1e-9;

/** The velocity tables among an end's dampers by their place in the input; null for other models. */
function velocityModels(setup: SpanSetup, end: 0 | 1): (VelocityTablesDamperModel | null)[] {
  const { models, inputIndexes } = setup.ends[end];
  return inputIndexes.map((_, input) => {
    const model = models[inputIndexes.indexOf(input)];
    return model?.kind === 'velocity-tables' ? model : null;
  });
}

/** True if the impedance of a damper depends on how it moves. */
export function hasVelocityTables(setup: SpanSetup): boolean {
  return setup.ends.some((end) => end.models.some((model) => model.kind === 'velocity-tables'));
}

/** Moves the velocities towards those of a sweep; returns the largest share by which one is off. */
function follow(
  velocities: ClampVelocities,
  sweep: SpanSweep,
  moving: EndPair<(VelocityTablesDamperModel | null)[]>,
): number {
  let most = 0;
  for (const end of [0, 1] as const) {
    moving[end].forEach((model, damper) => {
      const known = velocities[end][damper];
      const motions = sweep.responses[end].damperMotionRatio[damper];
      if (model === null || known === undefined || motions === undefined) return;
      const lowest = model.tables[0]?.clampVelocityMPerS ?? leastMPerS;
      const highest = model.tables.at(-1)?.clampVelocityMPerS ?? lowest;
      for (let index = 0; index < known.length; index += 1) {
        const w = 2 * Math.PI * (sweep.frequenciesHz[index] as number);
        const found = w * (sweep.endAmplitudesM[end][index] as number) * (motions[index] as number);
        if (!(found > 0)) continue;
        // Beyond the tables the nearest one is held, so only the part within them can move the result.
        const target = Math.min(Math.max(found, lowest), highest);
        const off = Math.log(target / (known[index] as number));
        most = Math.max(most, Math.abs(off));
        known[index] = (known[index] as number) * Math.exp(stepShare * off);
      }
    });
  }
  return most;
}

/**
 * Balance of a span at given frequencies; where dampers are told by tables at several clamp velocities, by iteration
 * until each damper's velocity is that of its table.
 *
 * @param setup         checked span with its methods
 * @param frequenciesHz f, [n] [Hz], > 0
 * @param visit         called per frequency with the solved state
 * @returns the sweep, and `isSettled`: false if some velocity still moves
 * @source closed form on the chosen methods; fixed-point iteration on the clamp velocities
 * @validity see solveSpanBalance
 * @accuracy velocities to 1e-6 where settled
 */
export function solveSweep(
  setup: SpanSetup,
  frequenciesHz: Float64Array,
  visit?: SweepVisitor,
): SpanSweep & { isSettled: boolean } {
  if (!hasVelocityTables(setup))
    return { ...sweepSpan(setup, respondEnds(setup, frequenciesHz), visit), isSettled: true };
  const moving: EndPair<(VelocityTablesDamperModel | null)[]> = [velocityModels(setup, 0), velocityModels(setup, 1)];
  const start = (model: VelocityTablesDamperModel | null) =>
    new Float64Array(frequenciesHz.length).fill(model === null ? 1 : middleVelocity(model));
  const velocities: ClampVelocities = [moving[0].map(start), moving[1].map(start)];
  let isSettled = false;
  for (let step = 0; step < stepLimitCount && !isSettled; step += 1) {
    const sweep = sweepSpan(setup, respondEnds(setup, frequenciesHz, velocities));
    isSettled = follow(velocities, sweep, moving) <= toleranceRatio;
  }
  return { ...sweepSpan(setup, respondEnds(setup, frequenciesHz, velocities), visit), isSettled };
}
